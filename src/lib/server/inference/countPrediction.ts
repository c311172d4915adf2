/** What a fitted grid says of a count yet to be seen: predictive distribution plus binomial spread. Pure. */
import type { GridFit } from './fitGrid';
import { Mixture } from './mixture';
import { makeGrid } from './pool';
import { betaCdf, expit, logBeta } from './special';
import type { Study } from './types';

/** ln Binomial(y | n, p); 0 ln 0 = 0. */
export function logBinomial(y: number, n: number, p: number): number {
	const choose = -Math.log(n + 1) - logBeta(y + 1, n - y + 1);
	return choose + (y > 0 ? y * Math.log(p) : 0) + (y < n ? (n - y) * Math.log1p(-p) : 0);
}

/** Predictive probability of one count, and of all smaller and all larger ones. The three sum to 1. */
export interface CountProbabilities {
	at: number;
	below: number;
	above: number;
}

/**
 * A function from counts of a new sample to their predictive probabilities.
 *
 * Within each of the several hundred cells of the predictive distribution its density is taken as even in p; then a
 * cell's part is an incomplete beta function in closed form, so that a sample of ten million costs what one of ten does
 * and no count is ever enumerated. Where p is near 1 the mirrored count is taken, as 1 - p keeps its digits.
 * @param population fitted grid of the population the sample comes from
 */
export function predictCounts(population: GridFit): (study: Study) => CountProbabilities {
	const { grid, edges } = makeGrid(new Mixture(population));
	const middle = edges.findIndex((x) => x > 0);
	const lower = middle === -1 ? edges.length - 1 : Math.max(middle - 1, 0);
	const left = edges.slice(0, lower + 1).map(expit);
	const right = edges
		.slice(lower)
		.map((x) => expit(-x))
		.reverse();
	const leftMass = grid.mass.slice(0, lower);
	const rightMass = grid.mass.slice(lower).reverse();
	return ({ events, total }) => {
		const here = evenCells(left, leftMass, events, total);
		const mirrored = evenCells(right, rightMass, total - events, total);
		const at = here.at + mirrored.at;
		const above = here.above + mirrored.below;
		return { at, above, below: Math.max(0, 1 - at - above) };
	};
}

/** Sums over cells with p ascending, each mass spread evenly over its cell. */
function evenCells(edges: Float64Array, mass: Float64Array, y: number, n: number): CountProbabilities {
	const out = { at: 0, below: 0, above: 0 };
	let before: { at: number; above: number } | null = null;
	for (let i = 0; i < edges.length; i++) {
		const p = edges[i];
		// ∫₀ᵖ Bin(y | n, t) dt, and ∫₀ᵖ P(Y > y | n, t) dt by parts.
		const at = betaCdf(p, y + 1, n - y + 1) / (n + 1);
		const above = y < n ? p * betaCdf(p, y + 1, n - y) - ((y + 1) / (n + 1)) * betaCdf(p, y + 2, n - y) : 0;
		if (before) {
			const density = mass[i - 1] / (p - edges[i - 1]);
			const cellAt = density * (at - before.at);
			const cellAbove = density * Math.max(above - before.above, 0);
			out.at += cellAt;
			out.above += cellAbove;
			out.below += Math.max(mass[i - 1] - cellAt - cellAbove, 0);
		}
		before = { at, above };
	}
	return out;
}

/**
 * Whether a count lies in the equal-tailed interval [lo, hi] of counts: lo the largest count with P(Y < lo) <= α/2, hi
 * the smallest with P(Y > hi) <= α/2. It is the shortest interval that leaves at most α/2 on either side, as a person
 * would read "95 %"; it holds at least its level, a little more where counts are few. A count below lo is one with
 * P(Y <= y) <= α/2, so lo and hi need not be found.
 */
export function isInside({ at, below, above }: CountProbabilities, level: number): boolean {
	const tail = (1 - level) / 2;
	return below + at > tail && above + at > tail;
}
