/**
 * Distribution functions of a fitted grid: of mu, of a new population's logit N(mu, tau²), and of tau.
 */
import type { Column, GridFit } from './fitGrid';
import { normalCdf } from './normal';
import { gaussHermite } from './quadrature';

/** Columns lighter than this change nothing that is shown. */
const LEAST_WEIGHT = 1e-9;
/** Below this ratio of tau to a column's step in mu the nodes are too far apart to be summed as normals. */
const NARROW_RATIO = 1.15;
/** Coefficients of one cell of a column: value at its left end, then of t, t², …, t⁶. */
const PER_CELL = 7;

/**
 * Distribution function of mu within one column: the integral of the quintic Hermite interpolant of its density
 * (value, slope and curvature at each node are known), error about 1e-6 at the steps used.
 */
class ColumnCdf {
	private readonly cells: Float64Array;
	/** Trapezoid mass of the first 0, 1, 2, … nodes. */
	readonly massBefore: Float64Array;

	constructor(
		readonly column: Column,
		fit: GridFit
	) {
		const { first, count, step } = column;
		this.massBefore = new Float64Array(count + 1);
		for (let k = 0; k < count; k++)
			this.massBefore[k + 1] = this.massBefore[k] + step * fit.density[first + k];
		this.cells = new Float64Array((count - 1) * PER_CELL);
		let below = 0;
		for (let c = 0; c + 1 < count; c++) {
			const i = first + c;
			const p0 = step * fit.density[i];
			const p1 = step * fit.density[i + 1];
			const d0 = step * step * fit.slope[i];
			const d1 = step * step * fit.slope[i + 1];
			const c0 = step ** 3 * fit.curvature[i];
			const c1 = step ** 3 * fit.curvature[i + 1];
			const terms = [
				below,
				p0,
				d0 / 2,
				c0 / 6,
				(10 * (p1 - p0) - 6 * d0 - 4 * d1 - 1.5 * c0 + 0.5 * c1) / 4,
				(-15 * (p1 - p0) + 8 * d0 + 7 * d1 + 1.5 * c0 - c1) / 5,
				(6 * (p1 - p0) - 3 * d0 - 3 * d1 - 0.5 * c0 + 0.5 * c1) / 6
			];
			this.cells.set(terms, c * PER_CELL);
			below = terms.reduce((sum, term) => sum + term, 0);
		}
		for (let i = 0; i < this.cells.length; i++) this.cells[i] /= below;
	}

	at(x: number): number {
		const position = (x - this.column.start) / this.column.step;
		if (position <= 0) return 0;
		if (position >= this.column.count - 1) return 1;
		const cell = Math.floor(position);
		const t = position - cell;
		let sum = 0;
		for (let k = PER_CELL - 1; k >= 0; k--) sum = sum * t + this.cells[cell * PER_CELL + k];
		return sum;
	}
}

const PHI_STEPS_PER_UNIT = 64;
const PHI_LIMIT = 8.5;
const PHI_SIZE = 2 * PHI_LIMIT * PHI_STEPS_PER_UNIT + 1;
/** Φ and its slope per step at -8.5, -8.5 + 1/64, … */
const PHI_TABLE = Float64Array.from({ length: PHI_SIZE }, (_, i) =>
	normalCdf(i / PHI_STEPS_PER_UNIT - PHI_LIMIT)
);
const PHI_SLOPES = Float64Array.from({ length: PHI_SIZE }, (_, i) => {
	const x = i / PHI_STEPS_PER_UNIT - PHI_LIMIT;
	return Math.exp((-x * x) / 2) / Math.sqrt(2 * Math.PI) / PHI_STEPS_PER_UNIT;
});

/** Φ by cubic Hermite interpolation, within 3e-10: called some 200,000 times a question. */
function quickPhi(x: number): number {
	const position = (x + PHI_LIMIT) * PHI_STEPS_PER_UNIT;
	if (position <= 0) return 0;
	if (position >= PHI_SIZE - 1) return 1;
	const i = position | 0;
	const t = position - i;
	const rise = PHI_TABLE[i + 1] - PHI_TABLE[i];
	const d0 = PHI_SLOPES[i];
	const d1 = PHI_SLOPES[i + 1];
	return PHI_TABLE[i] + t * (d0 + t * (3 * rise - 2 * d0 - d1 + t * (d0 + d1 - 2 * rise)));
}

/** Nodes enough for a normal as wide as the column itself, and for one a fifth as wide. */
const WIDE_RULE = gaussHermite(20);
const NARROW_RULE = gaussHermite(6);

/** The three distributions of a fitted grid; logit scale throughout. */
export class Mixture {
	private readonly parts: ColumnCdf[];

	constructor(private readonly fit: GridFit) {
		this.parts = fit.columns.filter((c) => c.weight > LEAST_WEIGHT).map((c) => new ColumnCdf(c, fit));
	}

	/** P(mu <= x). */
	muCdf(x: number): number {
		let sum = 0;
		for (const part of this.parts) sum += part.column.weight * part.at(x);
		return sum;
	}

	/** P(eta <= x) for eta ~ N(mu, tau²): the logit of a new population. */
	predictiveCdf(x: number): number {
		const { mu, mass } = this.fit;
		let sum = 0;
		for (const part of this.parts) {
			const { tau, step, weight, first, count } = part.column;
			if (tau < NARROW_RATIO * step) {
				// Narrow beside the column: the column's distribution function, averaged over N(0, tau²).
				const { nodes, weights } = tau < 0.25 * step ? NARROW_RULE : WIDE_RULE;
				let average = 0;
				if (tau === 0) average = part.at(x);
				else for (let k = 0; k < nodes.length; k++) average += weights[k] * part.at(x - tau * nodes[k]);
				sum += weight * average;
			} else {
				// Nodes further than 8.5 tau below x count in full, those further above not at all.
				const { start } = part.column;
				const full = Math.min(Math.max(Math.ceil((x - PHI_LIMIT * tau - start) / step), 0), count);
				const none = Math.min(Math.max(Math.floor((x + PHI_LIMIT * tau - start) / step) + 1, full), count);
				sum += weight * part.massBefore[full];
				for (let i = first + full; i < first + none; i++) sum += mass[i] * quickPhi((x - mu[i]) / tau);
			}
		}
		return sum;
	}

	/** Where any of the mass lies: outermost nodes of mu, widened by `sds` of the heaviest columns' tau. */
	range(sds: number): [number, number] {
		let low = Infinity;
		let high = -Infinity;
		for (const { column } of this.parts) {
			low = Math.min(low, column.start - sds * column.tau);
			high = Math.max(high, column.start + (column.count - 1) * column.step + sds * column.tau);
		}
		return [low, high];
	}
}

/**
 * x in [low, high] with f(x) = p for an increasing f, by the Illinois form of regula falsi with bisection
 * where that stalls; within 1e-11 of the bracket's scale.
 */
export function solveIncreasing(f: (x: number) => number, p: number, low: number, high: number): number {
	let a = low;
	let b = high;
	let fa = f(a) - p;
	let fb = f(b) - p;
	if (fa >= 0) return a;
	if (fb <= 0) return b;
	let side = 0;
	for (let step = 0; step < 100 && b - a > 1e-11 * Math.max(1, Math.abs(a), Math.abs(b)); step++) {
		const x = step % 4 === 3 ? (a + b) / 2 : (a * fb - b * fa) / (fb - fa);
		const fx = f(x) - p;
		if (fx === 0) return x;
		if (fx < 0) {
			a = x;
			fa = fx;
			if (side === -1) fb /= 2;
			side = -1;
		} else {
			b = x;
			fb = fx;
			if (side === 1) fa /= 2;
			side = 1;
		}
	}
	return (a + b) / 2;
}
