import { countriesNamed } from '$lib/strings/countries';

/** Words the table writes otherwise than people type them. */
const SAME: Record<string, string> = { upper: 'maxillary', lower: 'mandibular' };
/** A country is looked for by name from this many letters: fewer name a dozen countries. */
const COUNTRY_FROM_LETTERS = 4;

/**
 * What a person typed as a full-text expression: every word must be there, each may be the beginning of one, and what stands in quotes
 * must stand together. Everything typed is taken as text, never as an operator.
 * @returns null where nothing typed has a letter or a digit in it: nothing can be found by that
 */
export function matchExpression(typed: string): string | null {
	const parts = [...typed.matchAll(/"([^"]*)"|[^\s"]+/g)].map(([whole, quoted]) => quoted ?? whole);
	// NUL would end the text for SQLite; a word of signs alone has no token.
	const words = parts
		.map((part) => part.replaceAll('\0', ' ').trim())
		.filter((part) => /[\p{L}\p{N}]/u.test(part));
	return words.length === 0 ? null : words.map(alternatives).join(' AND ');
}

function alternatives(word: string): string {
	const other = SAME[word.toLowerCase()];
	const countries = word.length >= COUNTRY_FROM_LETTERS ? countriesNamed(word) : [];
	const all = [
		beginning(word),
		...(other ? [beginning(other)] : []),
		...countries.map((code) => `"${code}"`)
	];
	return all.length === 1 ? all[0] : `(${all.join(' OR ')})`;
}

const beginning = (word: string) => `"${word.replaceAll('"', ' ')}" *`;
