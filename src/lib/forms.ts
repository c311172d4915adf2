/** What a form action answers with, whichever form of a page it was: the page shows it at that form. */
export interface FormOutcome {
	/** Which form of the page. */
	at: string;
	/** What was typed, so that nothing is lost; never secrets. */
	values: Record<string, string | string[]>;
	/** A sentence for each field that is wrong; '' is the form as a whole. */
	errors: Record<string, string>;
	/** What was done, in a sentence; empty if nothing was. */
	said: string;
}

/** One typed value of a form's outcome, or what stood there before. */
export function typed(
	outcome: FormOutcome | null | undefined,
	at: string,
	name: string,
	before = ''
): string {
	const value = outcome?.at === at ? outcome.values[name] : undefined;
	return typeof value === 'string' ? value : before;
}

/** The boxes ticked in a form's outcome, or those that were before. */
export function ticked(
	outcome: FormOutcome | null | undefined,
	at: string,
	name: string,
	before: readonly string[] = []
): readonly string[] {
	if (outcome?.at !== at || Object.keys(outcome.errors).length === 0) return before;
	return [outcome.values[name] ?? []].flat();
}

/** What is wrong with a field, or with the whole form ('' as the name). */
export const wrong = (
	outcome: FormOutcome | null | undefined,
	at: string,
	name: string
): string | undefined => (outcome?.at === at ? outcome.errors?.[name] : undefined);
