/**
 * The posterior of (mu, tau) on a grid that has first looked where the mass is.
 */
import { StudyLikelihood } from './studyLikelihood';
import type { LogLikelihood } from './studyLikelihood';
import type { MuPrior, Study } from './types';

/**
 * Resolution of the grid; the defaults are what `pool` uses.
 *
 * Evidence: 25 data sets (the five of tests/reference/pooling.json; no study; 0 of 1; 0 of 10 million; one, two
 * and five times half of 10 million; none-and-all; 8 with n <= 4; 1,000 tiny; 400 and 2,000 ordinary or rare)
 * against 60 effect nodes, mu step 0.2, 150 columns, depth 32. Largest error of any proportion | of any tau:
 *   defaults 3.2e-5 | 3e-4. One thing changed at a time: mu step 0.6 2.4e-5, 1.4 6.6e-5; effect nodes 3 or 9 a
 *   logit 3.2e-5, 7 throughout 6e-4 | 1.4e-2; 24 columns 3.2e-5, 10 columns 4e-3 | 2e-3; column step 0.5
 *   4.3e-5 | 1.2e-3; depth 9 3.5e-5, 22 3.2e-5.
 */
export interface GridResolution {
	/**
	 * Nodes of the rule for each random effect: `effectNodes` at tau = 0 and `effectNodesPerTau` more for each
	 * logit, since the wider the normal, the less normal its product with a binomial likelihood.
	 */
	effectNodes: number;
	effectNodesPerTau: number;
	/** Step in mu, in conditional posterior standard deviations at the mode. */
	muStep: number;
	/** Fewest columns, and widest step between them on the scale of asinh(tau / scale). */
	minColumns: number;
	columnStep: number;
	/** The grid ends where the density has fallen by this many natural logarithms. */
	depth: number;
}

const RESOLUTION: GridResolution = {
	effectNodes: 5,
	effectNodesPerTau: 5,
	muStep: 1,
	minColumns: 16,
	columnStep: 0.35,
	depth: 16
};

/** Conditional posterior of mu at one tau, at nodes start, start + step, …: nodes first … first + count - 1. */
export interface Column {
	tau: number;
	/** Posterior mass of the column; the masses sum to 1. */
	weight: number;
	/** ln of the posterior density with respect to v = asinh(tau / scale), up to a constant. */
	logDensity: number;
	first: number;
	count: number;
	start: number;
	step: number;
}

/** The fitted grid. Arrays run over all nodes, column by column. */
export interface GridFit {
	columns: Column[];
	/** tau = scale sinh(v); columns lie at v = vStart + j vStep. */
	scale: number;
	vStart: number;
	vStep: number;
	mu: Float64Array;
	/** Joint posterior mass of each node; sums to 1. */
	mass: Float64Array;
	/** Density of mu given the column's tau, with its first two derivatives. */
	density: Float64Array;
	slope: Float64Array;
	curvature: Float64Array;
	/**
	 * ln of each distinct study's marginal likelihood at each node, node by node, relative to its largest
	 * binomial likelihood (a constant of the study); null unless asked for. `rowOf[i]` is study i's place.
	 */
	logMarginal: Float64Array | null;
	rows: number;
	rowOf: Int32Array;
}

/** More would not help: the rule for tau = 6 serves any wider normal too. */
const MAX_EFFECT_NODES = 41;
/** Where the search for the mass ends at first, far out in the prior's tail … */
const TAU_LIKELY = 6;
/** … and where it ends if there is mass even there: beyond the logits of 0 and of all of ten million apart. */
const TAU_MAX = 40;
/** Widest step in mu, logits: the logistic curve has poles at distance π, which a wider step would feel. */
const MAX_MU_STEP_LOGITS = 0.8;
/** Most nodes on one side of a column; reached only if something is wrong. */
const MAX_SIDE = 400;

/** What a grid is fitted to: the samples' likelihood as a function of (mu, tau), log-concave in mu. */
export interface Likelihood {
	readonly rows: { rowOf: Int32Array };
	readonly size: number;
	smallestError(): number;
	save(): unknown;
	restore(saved: unknown): void;
	evaluate(mu: number, tau: number, size: number, terms?: Float64Array, at?: number): LogLikelihood;
	/** A cheaper look, for finding where the mass is; without it `evaluate` is used. */
	evaluateRoughly?(mu: number, tau: number, size: number): LogLikelihood;
}

/** ln N(mu; mean, sd²) + ln likelihood, up to a constant, at (mu, tau). */
class Posterior {
	constructor(
		readonly likelihood: Likelihood,
		private readonly prior: MuPrior
	) {}

	at(mu: number, tau: number, nodes: number, terms?: Float64Array, offset = 0) {
		return this.withPrior(mu, this.likelihood.evaluate(mu, tau, nodes, terms, offset));
	}

	private withPrior(mu: number, result: LogLikelihood): LogLikelihood {
		const precision = 1 / (this.prior.sd * this.prior.sd);
		const d = mu - this.prior.mean;
		result.value -= 0.5 * d * d * precision;
		result.slope -= d * precision;
		// The marginal likelihood is log-concave in mu (Prékopa), so the prior's is the least curvature.
		result.curvature = Math.min(result.curvature, 0) - precision;
		return result;
	}

	/**
	 * Mode of mu at a given tau, near enough to anchor a grid: the last Newton step, half a width at most, is
	 * taken (and its gain counted) on trust.
	 */
	mode(start: number, tau: number, nodes: number, roughly = false) {
		let mu = start;
		for (let iteration = 0; ; iteration++) {
			const rough = roughly && this.likelihood.evaluateRoughly?.(mu, tau, nodes);
			const here = rough ? this.withPrior(mu, rough) : this.at(mu, tau, nodes);
			const step = -here.slope / here.curvature;
			const gain = (step * here.slope) / 2;
			if (gain < 0.125 || iteration === 60) {
				return { mu: mu + step, value: here.value + gain, width: 1 / Math.sqrt(-here.curvature) };
			}
			mu += Math.min(Math.max(step, -2), 2);
		}
	}
}

/** Nodes of the rule for each random effect at this tau. */
function nodesFor({ effectNodes, effectNodesPerTau }: GridResolution, tau: number): number {
	return Math.min(Math.ceil(effectNodes + effectNodesPerTau * tau), Math.max(MAX_EFFECT_NODES, effectNodes));
}

/** The stretch of v that holds the mass, by Laplace's approximation on a scan that zooms in until it sees it. */
function locate(posterior: Posterior, scale: number, start: number, resolution: GridResolution) {
	let low = 0;
	let high = Math.asinh(TAU_LIKELY / scale);
	let mu = start;
	for (let pass = 0; pass < 8; pass++) {
		const cells = 16;
		const cell = (high - low) / cells;
		const values: number[] = [];
		let best = 0;
		let bestMu = mu;
		for (let i = 0; i <= cells; i++) {
			const v = low + i * cell;
			const tau = scale * Math.sinh(v);
			const mode = posterior.mode(mu, tau, nodesFor(resolution, tau), true);
			mu = mode.mu;
			values.push(mode.value + Math.log(mode.width) - 0.5 * tau * tau + Math.log(Math.cosh(v)));
			if (values[i] >= values[best]) {
				best = i;
				bestMu = mu;
			}
		}
		mu = bestMu;
		const floor = values[best] - resolution.depth;
		if (pass === 0 && values[cells] > floor) {
			high = Math.asinh(TAU_MAX / scale);
			continue;
		}
		let first = 0;
		while (values[first] < floor) first++;
		let last = cells;
		while (values[last] < floor) last--;
		const from = low;
		// Where the chord crosses the floor, and a quarter of a cell more, as the curve lies above its chord.
		if (first > 0) {
			const t = (floor - values[first - 1]) / (values[first] - values[first - 1]);
			low = Math.max(0, from + (first - 1.25 + t) * cell);
		}
		if (last < cells) {
			const t = (floor - values[last]) / (values[last + 1] - values[last]);
			high = from + (last + 0.25 + t) * cell;
		}
		if (last - first >= 7) break;
	}
	return { low, high, mu };
}

/**
 * Fits the model of one proportion: y ~ Binomial(n, p), logit p ~ N(mu, tau²), mu ~ N(prior), tau ~ |N(0, 1)|.
 *
 * Columns are equally spaced in v = asinh(tau / scale), with the scale the standard error of the largest study:
 * linear in tau where tau is lost in binomial noise, logarithmic above. The posterior is an even, smooth
 * function of tau, hence of v, and nearly log-concave in mu, so that the plain trapezoid rule converges
 * exponentially in both directions (L. N. Trefethen and J. A. C. Weideman, SIAM Rev. 56 (2014) 385-458) and
 * some 20 × 20 nodes do what a fixed grid cannot. Half weight at tau = 0, if the mass reaches it.
 * @throws RangeError if a study has not 0 <= events <= total, total > 0, or the prior no positive sd
 */
export function fitGrid(
	studies: readonly Study[],
	prior: MuPrior,
	options: { keepStudies?: boolean; resolution?: Partial<GridResolution>; likelihood?: Likelihood } = {}
): GridFit {
	if (!(Number.isFinite(prior.mean) && Number.isFinite(prior.sd) && prior.sd > 0)) {
		throw new RangeError('the prior of mu needs a finite mean and a positive sd');
	}
	const resolution = { ...RESOLUTION, ...options.resolution };
	const { muStep, minColumns, columnStep, depth } = resolution;
	const likelihood: Likelihood = options.likelihood ?? new StudyLikelihood(studies);
	const posterior = new Posterior(likelihood, prior);
	const rows = likelihood.size;
	const scale = likelihood.smallestError();
	const found = locate(posterior, scale, prior.mean, resolution);
	const cells = Math.max(minColumns - 1, Math.ceil((found.high - found.low) / columnStep));
	const vStep = (found.high - found.low) / cells;

	const columns: Column[] = [];
	const all = {
		mu: [] as number[],
		density: [] as number[],
		slope: [] as number[],
		curvature: [] as number[]
	};
	const kept: Float64Array[] = [];
	let anchor = found.mu;
	for (let j = 0; j <= cells; j++) {
		const v = found.low + j * vStep;
		const tau = scale * Math.sinh(v);
		const effectNodes = nodesFor(resolution, tau);
		const mode = posterior.mode(anchor, tau, effectNodes);
		anchor = mode.mu;
		const step = Math.min(muStep * mode.width, MAX_MU_STEP_LOGITS);
		const stride = options.keepStudies ? step : 2 * step;
		const saved = likelihood.save();
		const walk = (direction: 1 | -1) => {
			const side: Node[] = [];
			likelihood.restore(saved);
			for (let k = direction === 1 ? 0 : 1; k < MAX_SIDE; k++) {
				const mu = mode.mu + direction * k * stride;
				const terms = options.keepStudies ? new Float64Array(rows) : undefined;
				const { value, slope, curvature } = posterior.at(mu, tau, effectNodes, terms);
				side.push({ mu, value, slope, curvature, terms });
				if (value < mode.value - depth) break;
			}
			return side;
		};
		const right = walk(1);
		const walked = [...walk(-1).reverse(), ...right];
		const nodes = options.keepStudies ? walked : withMidpoints(walked, stride);
		likelihood.restore(saved);
		let sum = 0;
		for (const { value } of nodes) sum += Math.exp(value - mode.value);
		const logDensity = mode.value + Math.log(sum * step) - 0.5 * tau * tau + Math.log(Math.cosh(v));
		columns.push({
			tau,
			weight: 0,
			logDensity,
			first: all.mu.length,
			count: nodes.length,
			start: nodes[0].mu,
			step
		});
		for (const { mu, value, slope, curvature, terms } of nodes) {
			const density = Math.exp(value - mode.value) / (sum * step);
			all.mu.push(mu);
			all.density.push(density);
			all.slope.push(density * slope);
			all.curvature.push(density * (curvature + slope * slope));
			if (terms) kept.push(terms);
		}
	}
	weighColumns(columns, found.low === 0);
	const mass = new Float64Array(all.mu.length);
	for (const { weight, first, count, step } of columns) {
		for (let i = first; i < first + count; i++) mass[i] = weight * step * all.density[i];
	}
	return {
		columns,
		scale,
		vStart: found.low,
		vStep,
		mu: Float64Array.from(all.mu),
		mass,
		density: Float64Array.from(all.density),
		slope: Float64Array.from(all.slope),
		curvature: Float64Array.from(all.curvature),
		logMarginal: options.keepStudies ? joined(kept, rows) : null,
		rows,
		rowOf: likelihood.rows.rowOf
	};
}

interface Node extends LogLikelihood {
	mu: number;
	terms?: Float64Array;
}

/**
 * Doubles the nodes of a column: between two of them the log density, nearly a parabola, is its quintic Hermite
 * interpolant (values, slopes and curvatures at both are known), which costs nothing beside an evaluation.
 */
function withMidpoints(nodes: Node[], h: number): Node[] {
	const out: Node[] = [nodes[0]];
	for (let i = 1; i < nodes.length; i++) {
		const a = nodes[i - 1];
		const b = nodes[i];
		const value =
			(a.value + b.value) / 2 +
			(5 / 32) * h * (a.slope - b.slope) +
			(1 / 64) * h * h * (a.curvature + b.curvature);
		const slope =
			((15 / 8) * (b.value - a.value)) / h -
			(7 / 16) * (a.slope + b.slope) +
			(1 / 32) * h * (b.curvature - a.curvature);
		const curvature = (1.5 * (b.slope - a.slope)) / h - 0.25 * (a.curvature + b.curvature);
		out.push({ mu: (a.mu + b.mu) / 2, value, slope, curvature }, b);
	}
	return out;
}

/** Trapezoid weights of the columns, made to sum to 1. */
function weighColumns(columns: Column[], fromZero: boolean): void {
	const top = Math.max(...columns.map((c) => c.logDensity));
	for (const c of columns) c.weight = Math.exp(c.logDensity - top);
	if (fromZero) columns[0].weight /= 2;
	const total = columns.reduce((sum, c) => sum + c.weight, 0);
	for (const c of columns) c.weight /= total;
}

function joined(parts: Float64Array[], size: number): Float64Array {
	const out = new Float64Array(parts.length * size);
	parts.forEach((part, i) => out.set(part, i * size));
	return out;
}
