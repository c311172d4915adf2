/** One group of methods at one tau: its likelihood on a grid of m = mu + delta, and its convolution with the offset's normal. */
import type { StudyLikelihood } from './studyLikelihood';

/** Standard deviation of an offset before any data, logits. */
const OFFSET_SD = 0.5;

/** Step in m, in standard deviations of the integrand at its mode: see `muStep` of the grid. */
const STEP = 1;
/** An integrand is followed until it has fallen by this many natural logarithms. */
const DEPTH = 17;
/** Most nodes on one side: those of a sample of ten million beside a smaller one; beyond, something is wrong. */
const MAX_NODES = 40_000;
/** 1 / variance of an offset before any data. */
export const OFFSET_PRECISION = 1 / (OFFSET_SD * OFFSET_SD);
const LOG_NORMAL = -Math.log(OFFSET_SD * Math.sqrt(2 * Math.PI));

/** ln ∫ exp(ell(m)) N(m; mu, 0.5²) dm and the raw moments 1 … 4 of m - mu under the integrand. */
export interface Convolved {
	value: number;
	moments: [number, number, number, number];
}

/** A group's log likelihood ell at one tau, at m = centre + k step for integers k; nodes are added as they are asked for. */
export class GroupColumn {
	readonly centre: number;
	readonly step: number;
	/** Of nodes 0, 1, … and of nodes -1, -2, …: ell, and each distinct study's part of it. */
	private readonly ell: [number[], number[]] = [[], []];
	private readonly parts: [Float64Array[], Float64Array[]] = [[], []];
	/** Where the last integrand had its mode: the next one's is near. */
	private near = 0;

	constructor(
		private readonly likelihood: StudyLikelihood,
		private readonly tau: number,
		private readonly size: number,
		mu: number
	) {
		const mode = modeOf(likelihood, mu, tau, size, mu);
		this.centre = mode.m;
		this.step = STEP / Math.sqrt(OFFSET_PRECISION - mode.curvature);
	}

	/** m of node k. */
	at(k: number): number {
		return this.centre + k * this.step;
	}

	/** ell at node k, without one copy of a distinct study if `row` >= 0. */
	logLikelihood(k: number, row: number): number {
		const side = k >= 0 ? 0 : 1;
		const place = k >= 0 ? k : -1 - k;
		const known = this.ell[side];
		while (known.length <= place) {
			const m = this.at(side === 0 ? known.length : -1 - known.length);
			const parts = new Float64Array(this.likelihood.size);
			known.push(this.likelihood.evaluate(m, this.tau, this.size, parts).value);
			this.parts[side].push(parts);
		}
		return row >= 0 ? known[place] - this.parts[side][place][row] : known[place];
	}

	/** The node nearest to the mode of a function that is concave in k. */
	climb(log: (k: number) => number): number {
		let top = this.near;
		let here = log(top);
		for (const direction of [1, -1]) {
			for (;;) {
				const next = log(top + direction);
				if (!(next > here) || Math.abs(top) > MAX_NODES) break;
				top += direction;
				here = next;
			}
		}
		this.near = top;
		return top;
	}

	/** Nodes on which such a function has not yet fallen by DEPTH, and the first on either side where it has. */
	reach(log: (k: number) => number): [number, number] {
		const top = this.climb(log);
		const floor = log(top) - DEPTH;
		let last = top + 1;
		while (last - top < MAX_NODES && log(last) > floor) last++;
		let first = top - 1;
		while (top - first < MAX_NODES && log(first) > floor) first--;
		return [first, last];
	}

	/** Convolves the group's likelihood with the normal around mu; see `logLikelihood` for `row`. */
	convolve(mu: number, row = -1): Convolved {
		const log = (k: number) => {
			const d = this.centre + k * this.step - mu;
			return this.logLikelihood(k, row) - 0.5 * OFFSET_PRECISION * d * d;
		};
		const top = this.climb(log);
		const highest = log(top);
		let [sum, first, second, third, fourth] = [0, 0, 0, 0, 0];
		for (const direction of [1, -1]) {
			for (let k = direction === 1 ? top : top - 1; Math.abs(k - top) < MAX_NODES; k += direction) {
				const depth = log(k) - highest;
				const weight = Math.exp(depth);
				const d = this.centre + k * this.step - mu;
				sum += weight;
				first += weight * d;
				second += weight * d * d;
				third += weight * d * d * d;
				fourth += weight * d * d * d * d;
				if (depth < -DEPTH) break;
			}
		}
		return {
			value: highest + Math.log(sum * this.step) + LOG_NORMAL,
			moments: [first / sum, second / sum, third / sum, fourth / sum]
		};
	}
}

/** Mode of ell(m) - (m - mu)² / (2 · 0.5²) from a start, within a twentieth of its width; ell and its curvature there. */
export function modeOf(likelihood: StudyLikelihood, mu: number, tau: number, size: number, start: number) {
	let m = start;
	for (let iteration = 0; ; iteration++) {
		const { value, slope, curvature: bend } = likelihood.evaluate(m, tau, size);
		const curvature = Math.min(bend, 0);
		const step = (slope - (m - mu) * OFFSET_PRECISION) / (OFFSET_PRECISION - curvature);
		// The last step's gain is counted on trust.
		const gain = (step * step * (OFFSET_PRECISION - curvature)) / 2;
		if (gain < 0.05 || iteration === 60)
			return { m: m + step, curvature, value: value - 0.5 * OFFSET_PRECISION * (m - mu) ** 2 + gain };
		m += Math.min(Math.max(step, -2), 2);
	}
}
