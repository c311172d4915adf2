import type { MEASUREMENT_KINDS } from '$lib/schemas/terms';
import { chiSquareUpper } from './chiSquare';
import { truncatedNormal } from './truncatedNormal';

type MeasurementKind = (typeof MEASUREMENT_KINDS)[number];

/** Working lengths of the two canals, mm. */
export interface WorkingLengths {
	first: number;
	second: number;
}

/** A measurement as it is taken at the chair, mm (the schema says what `value` is of each kind). */
export interface LevelMeasurement {
	kind: MeasurementKind;
	value: number;
	/** Cone mark: how far the marked cone stopped short of the first canal's working length. */
	coneShortBy?: number;
}

/** A measurement as a level above the common end, with its standard deviation, mm. */
export interface MeasuredLevel {
	level: number;
	sd: number;
}

/** Normal prior of the level, mm: the published mean and standard deviation of a root; null: flat. */
type LevelPrior = { mean: number; sd: number } | null;

/** What is known of the level J of a confluence, mm above the common end. */
interface LevelPosterior {
	mean: number;
	sd: number;
	/** Equal-tailed, 95 %. */
	interval: [number, number];
}

/** How well two or more measurements agree. */
interface Disagreement {
	/** P(chi-square with n - 1 degrees of freedom >= the one found) if all measure one level. */
	pValue: number;
	/** False below 0.05: one number is wrong, or something other than a confluence stops the cone. */
	consistent: boolean;
}

/** A confluence is never looked for higher than this above the common end, mm (inference, section 5). */
export const HIGHEST_LEVEL_MM = 12;
const CONSISTENT_FROM = 0.05;
const TAILS = [0.025, 0.975] as const;

/** Upper end of the level's range, min(12, WL₂), mm. */
export function highestLevel({ second }: WorkingLengths): number {
	return Math.min(HIGHEST_LEVEL_MM, second);
}

/**
 * The level above the common end that a measurement speaks of, mm (inference, section 5). Cone mark: the mark's distance
 * from the cone's tip + how far that cone stopped short. Shortfall of the second cone and a CBCT reading: as measured.
 * File contact: WL₂ - the length at which contact showed. Negative where the numbers contradict each other.
 */
export function measuredLevel(
	{ kind, value, coneShortBy = 0 }: LevelMeasurement,
	{ second }: WorkingLengths
): number {
	if (kind === 'cone-mark') return value + coneShortBy;
	return kind === 'file-contact' ? second - value : value;
}

interface Precise {
	/** Precision-weighted mean, mm, and its standard deviation. */
	mean: number;
	sd: number;
}

/** Precision-weighted mean of independent normal measurements; summed in one order, so that theirs does not matter. */
function combine(measured: readonly MeasuredLevel[]): Precise {
	const ordered = [...measured].sort((a, b) => a.level - b.level || a.sd - b.sd);
	const precision = ordered.reduce((sum, { sd }) => sum + sd ** -2, 0);
	const mean = ordered.reduce((sum, { level, sd }) => sum + level * sd ** -2, 0) / precision;
	return { mean, sd: precision ** -0.5 };
}

/**
 * Posterior of the level: each measurement ~ Normal(J, sd²), prior Normal or flat, truncated to (0, highest]. With
 * nothing measured and a flat prior it is uniform. The order of measurements does not matter, to the last digit.
 * @param measured levels in mm with sd > 0
 * @param highest upper end of the range, mm, above 0 (`highestLevel`)
 */
export function levelPosterior(
	measured: readonly MeasuredLevel[],
	prior: LevelPrior,
	highest: number
): LevelPosterior {
	const known = prior ? [...measured, { level: prior.mean, sd: prior.sd }] : measured;
	if (known.length === 0) {
		const [lower, upper] = TAILS.map((p) => p * highest);
		return { mean: highest / 2, sd: highest / Math.sqrt(12), interval: [lower, upper] };
	}
	const whole = combine(known);
	const { mean, sd, quantile } = truncatedNormal(whole.mean, whole.sd, highest);
	return { mean, sd, interval: [quantile(TAILS[0]), quantile(TAILS[1])] };
}

/**
 * Chi-square of the measurements about their weighted mean, df = n - 1; the prior is no measurement and stays out.
 * @returns null with fewer than two. Example: 3.0 (sd 0.5) and 1.2 (sd 0.7): 1.8² / 0.74 = 4.378, p = 0.036.
 */
export function disagreementOf(measured: readonly MeasuredLevel[]): Disagreement | null {
	if (measured.length < 2) return null;
	const { mean } = combine(measured);
	const ordered = measured.map(({ level, sd }) => ((level - mean) / sd) ** 2).sort((a, b) => a - b);
	const pValue = chiSquareUpper(
		ordered.reduce((sum, term) => sum + term, 0),
		measured.length - 1
	);
	return { pValue, consistent: pValue >= CONSISTENT_FROM };
}
