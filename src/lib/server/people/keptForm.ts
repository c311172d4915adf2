/** Fields that are never sent back to a browser. */
const SECRET_FIELD = /password|code|secret|token/i;
/** What is carried through a sign-in stands in a page, so it has an end. */
const MOST_CHARACTERS = 500_000;

/** What a form held, as far as it can be given back. */
export interface KeptForm {
	fields: [name: string, value: string][];
	/** Names of files and secrets, which cannot: they have to be given again. */
	lost: string[];
}

/** The fields of a form that can be given back after a sign-in, in their order. */
export function keptFields(form: FormData): KeptForm {
	const fields: KeptForm['fields'] = [];
	const lost = new Set<string>();
	let characters = 0;
	for (const [name, value] of form) {
		if (typeof value !== 'string' || SECRET_FIELD.test(name)) {
			if (typeof value === 'string' || value.size > 0) lost.add(name);
			continue;
		}
		characters += name.length + value.length;
		if (characters > MOST_CHARACTERS) lost.add(name);
		else fields.push([name, value]);
	}
	return { fields, lost: [...lost] };
}

/** Fields as an object; a name that repeats holds a list. */
export function valuesOf(fields: KeptForm['fields']): Record<string, string | string[]> {
	const values: Record<string, string | string[]> = {};
	for (const [name, value] of fields) {
		const before = Object.hasOwn(values, name) ? values[name] : undefined;
		values[name] = before === undefined ? value : [before, value].flat();
	}
	return values;
}

/** A kept form as text of a hidden field. */
export const packForm = (kept: KeptForm): string => JSON.stringify(kept);

/** A kept form from a hidden field; null for anything else. */
export function unpackForm(text: unknown): KeptForm | null {
	if (typeof text !== 'string' || text === '') return null;
	try {
		const value = JSON.parse(text) as Partial<KeptForm>;
		const pairs =
			Array.isArray(value.fields) &&
			value.fields.every(
				(pair) => Array.isArray(pair) && pair.length === 2 && pair.every((one) => typeof one === 'string')
			);
		const lost = Array.isArray(value.lost) && value.lost.every((one) => typeof one === 'string');
		return pairs && lost ? { fields: value.fields!, lost: value.lost! } : null;
	} catch {
		return null;
	}
}
