import { getContext, hasContext, setContext } from 'svelte';
import { formatFor, type Format, type Units } from '$lib/strings/format';

const KEY = Symbol('format');
const inPercent = formatFor();

/** Hands the formatter of a person's units to every component below; called once, by the root layout. */
export function setFormat(units: () => Units): void {
	setContext(KEY, formatFor(units));
}

/** The formatter of probabilities, in the units the person chose; percent where no layout has said. */
export function getFormat(): Format {
	return hasContext(KEY) ? getContext<Format>(KEY) : inPercent;
}
