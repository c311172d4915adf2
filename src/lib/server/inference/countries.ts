/** Samples of several countries: which of them a filter asks for, and which part of which (inference, section 2). */
import type { Sample } from './samples';

/** The countries of a sample's code: `BRA+TUR` has two; `multi` and an unknown country name none. */
function countriesOf(code: string): string[] {
	return code === '' || code === 'multi' ? [] : code.split('+');
}

/** True for a code that stands for more than one country. */
export function isCombined(code: string): boolean {
	return code === 'multi' || code.includes('+');
}

/**
 * Whether a sample's country is among those asked for. A combined sample is, when all its countries are or its code
 * itself is: half of its teeth come from elsewhere otherwise. An unknown country never is.
 */
export function countryMatches(code: string, wanted: readonly string[]): boolean {
	if (wanted.includes(code)) return true;
	const countries = countriesOf(code);
	return countries.length > 0 && countries.every((country) => wanted.includes(country));
}

/** Whether the teeth of `part` are among those of `whole`, as far as the codes tell. */
function isPartOf(part: string, whole: string): boolean {
	if (part === whole || part === '') return false;
	if (whole === 'multi') return true;
	const countries = countriesOf(whole);
	const parts = countriesOf(part);
	return parts.length > 0 && parts.every((country) => countries.includes(country));
}

/** A sample or a row, as far as its teeth are told from others of the same source. */
type Counted = Pick<Sample, 'source' | 'root' | 'scope' | 'country' | 'method' | 'measure'>;

/** True when `whole` is a combined-country figure of the same source and measure that has the teeth of `part`. */
export function replaces(whole: Counted, part: Counted): boolean {
	return (
		whole.source === part.source &&
		whole.root === part.root &&
		whole.scope === part.scope &&
		whole.method === part.method &&
		whole.measure === part.measure &&
		isPartOf(part.country, whole.country)
	);
}
