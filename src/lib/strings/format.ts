/**
 * How numbers read on screen: units always, false precision never. One place, so that a second language changes only
 * this file and the catalogue of strings.
 */

const LOCALE = 'en-GB';
/** A number and its unit stay on one line. */
export const NO_BREAK = '\u00a0';

const whole = new Intl.NumberFormat(LOCALE, { maximumFractionDigits: 0 });
const tenths = new Intl.NumberFormat(LOCALE, { maximumFractionDigits: 1 });
const hundredths = new Intl.NumberFormat(LOCALE, { minimumFractionDigits: 2, maximumFractionDigits: 2 });
const thousandths = new Intl.NumberFormat(LOCALE, { minimumFractionDigits: 3, maximumFractionDigits: 3 });

/** Rare probabilities are said as 1 in one of these. */
const RARE_DENOMINATORS = [10, 15, 20, 30, 50, 100];
const TENTHS_FROM = 0.095;
const TENTHS_TO = 0.925;
const NEARLY_ALL_FROM = 0.975;

/** The number of percent without its sign: whole, or "under 1" and "over 99"; 0 and 1 only when exact. */
function percentNumber(probability: number): string {
	if (probability > 0 && probability < 0.01) return 'under 1';
	if (probability < 1 && probability > 0.99) return 'over 99';
	return whole.format(probability * 100);
}

/**
 * A probability as whole percent: `63 %`, `under 1 %`, `over 99 %`. The space does not break.
 *
 * @param probability 0..1
 */
export function percent(probability: number): string {
	return `${percentNumber(probability)}${NO_BREAK}%`;
}

/**
 * An interval of probabilities: `35 to 88 %`; one figure where both ends read alike.
 *
 * @param interval lower and upper end, 0..1
 */
export function range(interval: readonly [number, number]): string {
	const [lower, upper] = [percentNumber(interval[0]), percentNumber(interval[1])];
	return lower === upper ? percent(interval[0]) : `${lower} to ${upper}${NO_BREAK}%`;
}

/** How probabilities and their ranges are written: `63 %` or `63 in 100`. */
export type Units = 'percent' | 'in-100';

/** Probabilities as a person chose to read them. */
export interface Format {
	/** `63 %` or `63 in 100`. @param probability 0..1 */
	percent: (probability: number) => string;
	/** `35 to 88 %` or `35 to 88 in 100`. @param interval lower and upper end, 0..1 */
	range: (interval: readonly [number, number]) => string;
	/** A figure with its range behind it: `63 % (35 to 88 %)`; once where both read alike. */
	figure: (probability: number, interval: readonly [number, number]) => string;
	/** What the numbers along a scale from 0 to 100 are: `%` or `in 100`. */
	readonly unit: string;
}

/**
 * The formatter for the units a person chose.
 *
 * @param units asked each time, so that a choice may change under a page; default percent
 */
export function formatFor(units: () => Units = () => 'percent'): Format {
	// "In 100" is the same number with its unit in words; the words hold together as the sign does.
	const written = (text: string) =>
		units() === 'percent' ? text : text.replace(`${NO_BREAK}%`, `${NO_BREAK}in${NO_BREAK}100`);
	const format: Format = {
		percent: (probability) => written(percent(probability)),
		range: (interval) => written(range(interval)),
		figure: (probability, interval) => {
			const [one, many] = [format.percent(probability), format.range(interval)];
			return one === many ? one : `${one} (${many})`;
		},
		get unit() {
			return units() === 'percent' ? '%' : `in${NO_BREAK}100`;
		}
	};
	return format;
}

/**
 * A probability as people say it: `about 6 in 10`, `about 1 in 20`, `fewer than 1 in 100`, `nearly all`.
 *
 * @param probability 0..1; exactly 0 is `none`, exactly 1 is `all`
 */
export function inWords(probability: number): string {
	if (probability <= 0) return 'none';
	if (probability >= 1) return 'all';
	if (probability < 0.01) return 'fewer than 1 in 100';
	if (probability >= NEARLY_ALL_FROM) return 'nearly all';
	if (probability > TENTHS_TO) return 'about 19 in 20';
	if (probability >= TENTHS_FROM) return `about ${whole.format(probability * 10)} in 10`;
	const distance = (denominator: number) => Math.abs(Math.log(probability * denominator));
	const nearest = RARE_DENOMINATORS.reduce((best, next) => (distance(next) < distance(best) ? next : best));
	return `about 1 in ${nearest}`;
}

/**
 * A length in millimetres to one tenth: `3.7 mm`.
 *
 * @param length mm
 */
export function mm(length: number): string {
	return `${tenths.format(length)}${NO_BREAK}mm`;
}

/**
 * A range of lengths: `2.1 to 3.9 mm`; one figure where both ends read alike.
 *
 * @param interval lower and upper end, mm
 */
export function mmRange(interval: readonly [number, number]): string {
	const [lower, upper] = [mm(interval[0]), mm(interval[1])];
	return lower === upper ? lower : `${tenths.format(interval[0])} to ${upper}`;
}

/**
 * The diameter of an instrument or a canal to one hundredth: `0.43 mm`.
 *
 * @param width mm
 */
export function diameter(width: number): string {
	return `${hundredths.format(width)}${NO_BREAK}mm`;
}

/** A p-value with its sign: `p = 0.036`; `p under 0.001` below that. */
export function pValue(p: number): string {
	if (p < 0.001) return 'p under 0.001';
	return `p = ${p < 0.1 ? thousandths.format(p) : hundredths.format(p)}`;
}

/** A count with its thousands set apart: `1,234`. */
export function count(number: number): string {
	return whole.format(number);
}

const day = new Intl.DateTimeFormat(LOCALE, {
	day: 'numeric',
	month: 'long',
	year: 'numeric',
	timeZone: 'UTC'
});

/**
 * The day of a moment, in UTC: `1 December 2026`.
 *
 * @param moment ISO 8601
 */
export function date(moment: string): string {
	return day.format(new Date(moment));
}

const dayAndTime = {
	day: 'numeric',
	month: 'short',
	year: 'numeric',
	hour: '2-digit',
	minute: '2-digit'
} as const;
const inUtc = new Intl.DateTimeFormat(LOCALE, { ...dayAndTime, timeZone: 'UTC' });

/** A moment for readers whose clock is not known: `1 Dec 2026, 13:04 UTC`. */
export function momentUtc(iso: string): string {
	return `${inUtc.format(new Date(iso))} UTC`;
}

/** A moment by the clock of the device that shows it: `1 Dec 2026, 14:04`. */
export function momentHere(iso: string): string {
	return new Intl.DateTimeFormat(LOCALE, dayAndTime).format(new Date(iso));
}

/**
 * The size of a file: `640 kB`, `2.4 MB`.
 *
 * @param bytes whole number; a kilobyte has 1,000 (SI)
 */
export function size(bytes: number): string {
	return bytes < 1_000_000
		? `${whole.format(Math.max(1, bytes / 1000))}${NO_BREAK}kB`
		: `${tenths.format(bytes / 1_000_000)}${NO_BREAK}MB`;
}
