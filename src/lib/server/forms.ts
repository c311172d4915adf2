import { fail } from '@sveltejs/kit';
import type { z } from 'zod';
import type { FormOutcome } from '$lib/forms';
import { keptFields, valuesOf } from './people/keptForm';

/** A form that is not what its page expects is answered as a form with mistakes. */
const UNPROCESSABLE = 422;

/** Answers a form action with what is wrong, and gives back what was typed (never secrets). */
export const refused = (at: string, form: FormData, errors: Record<string, string>, status = UNPROCESSABLE) =>
	fail<FormOutcome>(status, { at, values: valuesOf(keptFields(form).fields), errors, said: '' });

/** Answers a form action that has done what was asked. */
export const done = (at: string, said: string): FormOutcome => ({ at, values: {}, errors: {}, said });

/**
 * Validates a form with a schema.
 * @param lists names that may repeat and become arrays
 * @returns the data, or one sentence for each field that is wrong
 */
export function checkForm<Schema extends z.ZodType>(
	form: FormData,
	schema: Schema,
	lists: readonly string[] = []
): { data: z.infer<Schema>; errors?: undefined } | { data?: undefined; errors: Record<string, string> } {
	const values = Object.fromEntries(
		[...new Set([...form.keys(), ...lists])].map((name) => [
			name,
			lists.includes(name) ? form.getAll(name) : form.get(name)
		])
	);
	const result = schema.safeParse(values);
	if (result.success) return { data: result.data };
	const errors: Record<string, string> = {};
	for (const { path, message } of result.error.issues) errors[String(path[0] ?? '')] ??= message;
	return { errors };
}

/** A text field of a form; '' if it is missing or a file. */
export function field(form: FormData, name: string): string {
	const value = form.get(name);
	return typeof value === 'string' ? value : '';
}
