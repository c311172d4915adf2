/** Numbers as people type them into a table of figures. Pure. */

/**
 * A whole number from 0 to 10,000,000.
 * @returns null for an empty text; NaN for anything else that is no such number (`1,234` and `12.0` too: they may be meant otherwise)
 */
export function wholeNumber(typed: string): number | null {
	const text = typed.trim();
	if (text === '') return null;
	const number = /^\d{1,8}$/.test(text) ? Number(text) : NaN;
	return number <= 10_000_000 ? number : NaN;
}

/**
 * A percentage from 0 to 100, with a point or a comma before its decimals.
 * @returns null for an empty text; NaN for anything else
 */
export function percentage(typed: string): number | null {
	const text = typed.trim().replace(/\s*%$/, '');
	if (text === '') return null;
	const number = /^\d{1,3}([.,]\d{1,12})?$/.test(text) ? Number(text.replace(',', '.')) : NaN;
	return number <= 100 ? number : NaN;
}

/** Half of the last decimal that a percentage was printed with, in percent: 63.4 may stand for 63.35 to 63.45. */
export function roundingOf(percent: number): number {
	const decimals = String(percent).split('.')[1]?.length ?? 0;
	return 0.5 * 10 ** -decimals;
}
