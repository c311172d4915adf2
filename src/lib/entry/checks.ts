/**
 * The checks of an entry, one module for the form in the browser, the server, the API and the import. Pure and without zod.
 *
 * `checkEntry(text, context)` reads what was typed (or stands in the cells of a file) and answers with the entry and with remarks:
 * - `error`: cannot be kept, the field has to be mended (a total that is no whole number, a count above the total, no locator);
 * - `warning`: is kept, and a person should look (classes that do not sum to the total, a percentage that does not fit its count, a class
 *   this root has never shown, the same sample entered already). Sources do contradict themselves, so these cannot be errors;
 * - `note`: something was worked out, and from what.
 *
 * The content is null exactly if a remark is an error. What needs the database (known sources, what the root has shown, other entries of
 * the sample) comes in as the context; without it those checks are left out.
 */
import { rootOf, toothOf } from '$lib/anatomy/teeth';
import { ENTRY_ROOTS, MEASURES, METHODS, PROVENANCES } from '$lib/schemas/terms';
import { isCountryCode } from '$lib/strings/countries';
import { checks as words } from '$lib/strings/checks';
import { checkFigures } from './checkFigures';
import { wholeNumber } from './numbers';
import { sameSample, type EntryContent, type EntryText } from './content';

export type RemarkLevel = 'error' | 'warning' | 'note';

/** Something to say of one field. `path` is dotted: `total`, `figures` for the list as a whole, `figures.2.count`. */
export interface Remark {
	level: RemarkLevel;
	path: string;
	message: string;
}

/** What an entry is compared with; an absent part leaves its check out. */
export interface CheckContext {
	/** Whether the table has a source of this id. */
	hasSource?: (id: string) => boolean;
	/** Canal sequences that published entries of this tooth and root name; null: none has been published, so that nothing is new. */
	shown?: (tooth: string, root: string) => ReadonlySet<string> | null;
	/** Entries of the same source that this one may repeat, apart from itself. */
	others?: readonly { id: number; content: EntryContent }[];
}

export interface Checked {
	/** Null if anything is wrong with it. */
	content: EntryContent | null;
	remarks: Remark[];
}

/** Longest texts; those of the shipped table stay far below. */
const LONGEST = { source: 200, locator: 300, scope: 200, subgroup: 100 } as const;
const MULTI = 'multi';

/** Collects remarks. */
export class Remarks {
	readonly list: Remark[] = [];
	error = (path: string, message: string) => void this.list.push({ level: 'error', path, message });
	warning = (path: string, message: string) => void this.list.push({ level: 'warning', path, message });
	note = (path: string, message: string) => void this.list.push({ level: 'note', path, message });
	get failed(): boolean {
		return this.list.some(({ level }) => level === 'error');
	}
}

/** Checks an entry; see the head of this file. Never throws for anything typed. */
export function checkEntry(text: EntryText, context: CheckContext = {}): Checked {
	const remarks = new Remarks();
	const source = requiredText(text, 'source', remarks);
	if (source && context.hasSource && !context.hasSource(source))
		remarks.error('source', words.unknownSource(source));
	const locator = requiredText(text, 'locator', remarks);
	const tooth = text.tooth.trim();
	if (tooth !== '' && !toothOf(tooth)) remarks.error('tooth', words.unknownTooth);
	if (tooth === '') remarks.warning('tooth', words.pooledTeeth);
	const root = listed(text.root, ENTRY_ROOTS, 'root', words.root, remarks);
	if (root && toothOf(tooth) && root !== 'whole' && !rootOf(tooth, root))
		remarks.warning('root', words.unusualRoot);
	const scope = requiredText(text, 'scope', remarks);
	const subgroup = requiredText(text, 'subgroup', remarks);
	const country = checkCountry(text.country, remarks);
	const method = listed(text.method, METHODS, 'method', words.method, remarks);
	const measure = listed(text.measure, MEASURES, 'measure', words.measure, remarks);
	const provenance = listed(text.provenance, PROVENANCES, 'provenance', words.provenance, remarks);
	if (provenance === 'memory') remarks.warning('provenance', words.memory);
	const total = checkTotal(text.total, remarks);
	const figures = checkFigures(text.figures, { measure, total }, remarks);
	if (remarks.failed) return { content: null, remarks: remarks.list };

	const content: EntryContent = {
		...{ source, locator, tooth, root: root!, scope, subgroup, country, total, figures },
		...{ method: method!, measure: measure!, provenance: provenance! }
	};
	compareWithTable(content, context, remarks);
	return { content, remarks: remarks.list };
}

function requiredText(text: EntryText, field: keyof typeof LONGEST, remarks: Remarks): string {
	const value = text[field].trim();
	if (value === '') remarks.error(field, words.required[field]);
	if (value.length > LONGEST[field]) remarks.error(field, words.tooLong(LONGEST[field]));
	return value;
}

function listed<Word extends string>(
	typed: string,
	list: readonly Word[],
	path: string,
	message: (list: readonly string[]) => string,
	remarks: Remarks
): Word | null {
	const word = list.find((one) => one === typed.trim());
	if (word === undefined) remarks.error(path, message(list));
	return word ?? null;
}

function checkCountry(typed: string, remarks: Remarks): string {
	const country = typed.trim();
	if (country === '') remarks.warning('country', words.noCountry);
	else if (country !== MULTI && !country.split('+').every(isCountryCode))
		remarks.error('country', words.country);
	return country;
}

function checkTotal(typed: string, remarks: Remarks): number | null {
	const total = wholeNumber(typed);
	if (total === null) remarks.warning('total', words.noTotal);
	else if (Number.isNaN(total)) remarks.error('total', words.wholeNumber);
	else if (total === 0) remarks.error('total', words.zeroTotal);
	return total || null;
}

function compareWithTable(content: EntryContent, context: CheckContext, remarks: Remarks): void {
	const shown = content.measure === 'configuration' ? context.shown?.(content.tooth, content.root) : null;
	for (const [index, { category, count }] of content.figures.entries())
		if (shown && category !== 'other' && count !== 0 && !shown.has(category))
			remarks.warning(`figures.${index}.category`, words.newClass(category));
	const same = (context.others ?? []).filter(
		({ content: other }) => other.measure === content.measure && sameSample(other, content)
	);
	for (const { id, content: other } of same) {
		const categories = content.measure !== 'feature' || shareCategory(content, other);
		if (categories) remarks.warning('source', words.sameSample(id));
	}
}

/** Features of one sample stand in entries of their own, so only the same feature is a repetition. */
const shareCategory = (a: EntryContent, b: EntryContent) =>
	a.figures.some(({ category }) => b.figures.some((other) => other.category === category));
