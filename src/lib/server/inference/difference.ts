/** How far two proportions that are known as distributions lie apart. Pure. */
import { expit, logit } from './special';
import type { PredictiveGrid, Summary } from './types';

/** The first less the second, as proportions: -1..1. */
export interface Difference {
	mean: number;
	/** 95 %, equal tails. */
	interval: [number, number];
	/** Probability that the first is the larger, 0..1. */
	firstLarger: number;
}

/** Bins of the difference from -1 to 1: fine enough for whole percent. */
const BINS = 4000;
const TAILS = [0.025, 0.975] as const;
/** Points of the grid that stands for a middle population. */
const POINTS = 400;
const Z_95 = 1.959963984540054;

/**
 * The difference of two proportions that are independent of each other, from their point masses. Every pair of masses
 * is put into its bin of 0.0005; equal values count half to either side.
 *
 * @param first masses that sum to 1, as of `pool`
 * @example differenceOf({ p: [0.2], mass: [1] }, { p: [0.5], mass: [1] }).mean // -0.3
 */
export function differenceOf(first: PredictiveGrid, second: PredictiveGrid): Difference {
	const bins = new Float64Array(BINS + 1);
	let mean = 0;
	let firstLarger = 0;
	for (let i = 0; i < first.p.length; i++) {
		for (let j = 0; j < second.p.length; j++) {
			const mass = first.mass[i] * second.mass[j];
			const apart = first.p[i] - second.p[j];
			mean += mass * apart;
			firstLarger += apart > 0 ? mass : apart === 0 ? mass / 2 : 0;
			bins[Math.round(((apart + 1) / 2) * BINS)] += mass;
		}
	}
	const [from, to] = TAILS.map((tail) => {
		let below = 0;
		let bin = 0;
		while (bin < BINS && below + bins[bin] < tail) below += bins[bin++];
		return (2 * bin) / BINS - 1;
	});
	return { mean, interval: [from, to], firstLarger };
}

/**
 * Point masses of a proportion of which only median and 95 % interval are kept: on the logit scale two halves of
 * normals that meet at the median, so that all three are kept. The posterior of a middle population is near a normal
 * there, so what lies between is close.
 *
 * @param summary of a proportion strictly between 0 and 1
 */
export function gridOfSummary({ median, interval }: Summary): PredictiveGrid {
	const middle = logit(median);
	const below = (middle - logit(interval[0])) / Z_95;
	const above = (logit(interval[1]) - middle) / Z_95;
	const p = new Float64Array(POINTS);
	const mass = new Float64Array(POINTS);
	let total = 0;
	for (let i = 0; i < POINTS; i++) {
		const z = -4 + (8 * (i + 0.5)) / POINTS;
		p[i] = expit(middle + z * (z < 0 ? below : above));
		// In z either half holds half of the mass, whatever its width.
		mass[i] = Math.exp((-z * z) / 2);
		total += mass[i];
	}
	return { p, mass: mass.map((each) => each / total) };
}
