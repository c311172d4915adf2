/**
 * Inverse distribution functions, tabulated at the 4,096 midpoints (n + 0.5) / 4096: the Sobol points with
 * their offset have no other coordinates, so a table look-up is the exact inverse and costs nothing.
 */
import { SOBOL_POINTS } from './sobol';
import { betaCdf, betaQuantile, expit, logBeta, logit } from './special';
import type { PredictiveGrid } from './types';

/** Nodes of the spline on the logit scale; see makeBetaTable. */
const BETA_NODES = 129;
/** Tables kept (32 kB each): every Beta of the shipped table with its updates is about 60. */
const MOST_BETA_TABLES = 256;

const midpoint = (n: number) => (n + 0.5) / SOBOL_POINTS;
const MIDPOINT_LOGITS = Float64Array.from({ length: SOBOL_POINTS }, (_, n) => logit(midpoint(n)));

/** Gauss-Legendre rule of three points on [0, 1]. */
const RULE = [
	{ at: 0.5 - Math.sqrt(0.15), weight: 5 / 18 },
	{ at: 0.5, weight: 8 / 18 },
	{ at: 0.5 + Math.sqrt(0.15), weight: 5 / 18 }
];

/** The spline's nodes: y = logit(quantile), v = logit(distribution function there), and dy/dv. */
interface Nodes {
	y: Float64Array;
	v: Float64Array;
	slope: Float64Array;
}

/**
 * Nodes evenly spaced in y between the outermost quantiles needed. The masses between them are integrals of the
 * density of y, x^a (1 - x)^b / B(a, b), summed from both ends so that neither tail loses digits: far cheaper
 * than inverting the distribution function at each.
 */
function betaNodes(a: number, b: number): Nodes {
	const first = outerLogit(betaQuantile(midpoint(0), a, b));
	const last = -outerLogit(betaQuantile(midpoint(0), b, a));
	const step = (last - first) / (BETA_NODES - 1);
	const scale = logBeta(a, b);
	const density = (y: number) =>
		Math.exp(-a * Math.log1p(Math.exp(-y)) - b * Math.log1p(Math.exp(y)) - scale);
	const y = Float64Array.from({ length: BETA_NODES }, (_, i) => first + i * step);
	const lower = new Float64Array(BETA_NODES);
	const upper = new Float64Array(BETA_NODES);
	lower[0] = betaCdf(expit(first), a, b);
	upper[BETA_NODES - 1] = betaCdf(expit(-last), b, a);
	const masses = Array.from({ length: BETA_NODES - 1 }, (_, i) =>
		RULE.reduce((sum, { at, weight }) => sum + weight * step * density(y[i] + at * step), 0)
	);
	for (let i = 1; i < BETA_NODES; i++) lower[i] = lower[i - 1] + masses[i - 1];
	for (let i = BETA_NODES - 2; i >= 0; i--) upper[i] = upper[i + 1] + masses[i];
	return {
		y,
		v: lower.map((value, i) => Math.log(value / upper[i])),
		slope: y.map((value, i) => (lower[i] * upper[i]) / density(value))
	};
}

/** A Beta with a tiny parameter has quantiles that round to 0. */
function outerLogit(x: number): number {
	return logit(Math.max(x, Number.MIN_VALUE));
}

/**
 * y as a function of v is nearly straight, so a cubic Hermite spline is right to better than 1e-6 in the
 * quantile for a, b of 0.5 and more (1e-4 for a tenth of that).
 */
function makeBetaTable(a: number, b: number): Float64Array {
	const { y, v, slope } = betaNodes(a, b);
	const table = new Float64Array(SOBOL_POINTS);
	let i = 0;
	for (let n = 0; n < SOBOL_POINTS; n++) {
		while (i < BETA_NODES - 2 && v[i + 1] < MIDPOINT_LOGITS[n]) i++;
		const width = v[i + 1] - v[i];
		const t = Math.min(Math.max((MIDPOINT_LOGITS[n] - v[i]) / width, 0), 1);
		const r = 1 - t;
		table[n] = expit(
			r * r * ((1 + 2 * t) * y[i] + t * width * slope[i]) +
				t * t * ((1 + 2 * r) * y[i + 1] - r * width * slope[i + 1])
		);
	}
	return table;
}

const betaTables = new Map<string, Float64Array>();

/** Quantiles of Beta(a, b) at the midpoints (n + 0.5) / 4096, each within 1e-6; a, b > 0. */
export function betaTable({ a, b }: { a: number; b: number }): Float64Array {
	const key = `${a} ${b}`;
	const known = betaTables.get(key);
	if (known) return known;
	const [oldest] = betaTables.keys();
	if (betaTables.size >= MOST_BETA_TABLES) betaTables.delete(oldest);
	const made = makeBetaTable(a, b);
	betaTables.set(key, made);
	return made;
}

/** How a predictive density is weighted before a draw: not at all, by p (the answer is yes), by 1 - p (no). */
type Weighting = 'plain' | 'yes' | 'no';

/** Quantiles of a weighted grid: linear between the middles of its steps, constant beyond the outer ones. */
function makeGridTable({ p, mass }: PredictiveGrid, weighting: Weighting): Float64Array {
	const weight = (i: number) => mass[i] * (weighting === 'plain' ? 1 : weighting === 'yes' ? p[i] : 1 - p[i]);
	let total = 0;
	for (let i = 0; i < p.length; i++) total += weight(i);
	const table = new Float64Array(SOBOL_POINTS);
	let below = 0;
	let n = 0;
	let lastMiddle = 0;
	for (let i = 0; i < p.length; i++) {
		const middle = (below + weight(i) / 2) / total;
		below += weight(i);
		const slope = i === 0 || middle === lastMiddle ? 0 : (p[i] - p[i - 1]) / (middle - lastMiddle);
		while (n < SOBOL_POINTS && midpoint(n) <= middle) {
			table[n] = p[i] + (midpoint(n) - middle) * slope;
			n++;
		}
		lastMiddle = middle;
	}
	table.fill(p[p.length - 1], n);
	return table;
}

const gridTables = new WeakMap<PredictiveGrid, Partial<Record<Weighting, Float64Array>>>();

/** Quantiles of a predictive distribution, weighted as said, at the midpoints (n + 0.5) / 4096. */
export function gridTable(grid: PredictiveGrid, weighting: Weighting): Float64Array {
	const known = gridTables.get(grid) ?? {};
	gridTables.set(grid, known);
	return (known[weighting] ??= makeGridTable(grid, weighting));
}
