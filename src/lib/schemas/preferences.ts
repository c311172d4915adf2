import { z } from 'zod';
import { THRESHOLD_RANGE, USUAL_THRESHOLD } from './terms';

/** What a person may choose without an account; kept in one cookie. A form sends text, the cookie holds numbers as numbers. */
const preferencesSchema = z.object({
	theme: z.enum(['system', 'light', 'dark']).default('system'),
	numbers: z.enum(['iso', 'universal', 'palmer']).default('iso'),
	/** Probability of a shared exit from which canals are treated as joined. */
	threshold: z.coerce.number().min(THRESHOLD_RANGE[0]).max(THRESHOLD_RANGE[1]).default(USUAL_THRESHOLD),
	/** How probabilities and their ranges are written. */
	units: z.enum(['percent', 'in-100']).default('percent')
});

export type Preferences = z.infer<typeof preferencesSchema>;

const fields = Object.entries(preferencesSchema.shape);

/** Preferences from whatever a cookie holds: a field that cannot be read is as if unset, the others stay. */
export function readPreferences(value: unknown): Preferences {
	const kept: Record<string, unknown> = typeof value === 'object' && value !== null ? { ...value } : {};
	const readable = fields.filter(([name, schema]) => schema.safeParse(kept[name]).success);
	return preferencesSchema.parse(Object.fromEntries(readable.map(([name]) => [name, kept[name]])));
}

/**
 * Preferences after a form was sent: what it does not name stays as it was.
 * @returns null if it names none, or one of them wrongly
 */
export function changedPreferences(before: Preferences, form: FormData): Preferences | null {
	const named = fields.map(([name]) => name).filter((name) => form.has(name));
	if (named.length === 0) return null;
	const changes = Object.fromEntries(named.map((name) => [name, form.get(name)]));
	const result = preferencesSchema.safeParse({ ...before, ...changes });
	return result.success ? result.data : null;
}
