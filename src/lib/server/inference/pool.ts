import { fitGrid } from './fitGrid';
import type { GridFit, GridResolution } from './fitGrid';
import { Mixture, solveIncreasing } from './mixture';
import { expit } from './special';
import { summariseTau } from './tauSummary';
import type { MuPrior, Pooled, PredictiveGrid, Study, Summary } from './types';

/** mu's prior unless a question lends another (inference, section 1). */
export const DEFAULT_PRIOR: MuPrior = { mean: 0, sd: 2.5 };
const DEFAULT_LEVEL = 0.95;

/** Cells of the predictive grid, and of the coarse pass that decides where they go. */
const CELLS = 400;
const COARSE_CELLS = 80;
/** Probability left beyond either end of the grid (it is kept, in the outermost cells). */
const TAIL = 1e-7;
/** A logit beyond this cannot be told from its neighbours as a double in (0, 1). */
const LOGIT_LIMIT = 32;

/**
 * Edges on the logit scale, half of them shared out evenly over the range and half by probability: a single
 * large study gives a needle on a broad base, and neither may be coarse.
 */
function placeEdges(cdf: (x: number) => number, low: number, high: number): Float64Array {
	const coarse = Float64Array.from({ length: COARSE_CELLS + 1 }, (_, i) =>
		cdf(low + ((high - low) * i) / COARSE_CELLS)
	);
	const blend = (i: number) =>
		0.5 * (i / COARSE_CELLS + (coarse[i] - coarse[0]) / (coarse[COARSE_CELLS] - coarse[0]));
	const edges = new Float64Array(CELLS + 1);
	let cell = 0;
	for (let e = 0; e <= CELLS; e++) {
		const target = e / CELLS;
		while (cell < COARSE_CELLS - 1 && blend(cell + 1) < target) cell++;
		const t = (target - blend(cell)) / (blend(cell + 1) - blend(cell));
		edges[e] = low + ((high - low) * (cell + Math.min(t, 1))) / COARSE_CELLS;
	}
	return edges;
}

/** Point masses of the predictive distribution at the logit midpoints of the cells, with the cells' edges (logits). */
export function makeGrid(mixture: Mixture): {
	grid: PredictiveGrid;
	edges: Float64Array;
	below: Float64Array;
} {
	const cdf = (x: number) => mixture.predictiveCdf(x);
	const [outerLow, outerHigh] = mixture.range(8);
	const clamp = (x: number) => Math.min(Math.max(x, -LOGIT_LIMIT), LOGIT_LIMIT);
	const low = clamp(solveIncreasing(cdf, TAIL, outerLow, outerHigh));
	const high = clamp(solveIncreasing(cdf, 1 - TAIL, outerLow, outerHigh));
	const edges = placeEdges(cdf, low, high);
	const below = edges.map(cdf);
	const p = new Float64Array(CELLS);
	const mass = new Float64Array(CELLS);
	let total = 0;
	for (let c = 0; c < CELLS; c++) {
		p[c] = expit((edges[c] + edges[c + 1]) / 2);
		const from = c === 0 ? 0 : below[c];
		const to = c === CELLS - 1 ? 1 : below[c + 1];
		mass[c] = Math.max(to - from, 0);
		total += mass[c];
	}
	for (let c = 0; c < CELLS; c++) mass[c] /= total;
	return { grid: { p, mass }, edges, below };
}

function summarisePooled(fit: GridFit, mixture: Mixture, probabilities: number[]): Summary {
	let mean = 0;
	for (let i = 0; i < fit.mu.length; i++) mean += fit.mass[i] * expit(fit.mu[i]);
	const [low, high] = mixture.range(0);
	const [from, median, to] = probabilities.map((p) =>
		expit(solveIncreasing((x) => mixture.muCdf(x), p, low, high))
	);
	return { mean, median, interval: [from, to] };
}

function summarisePredictive(
	{ grid, edges, below }: ReturnType<typeof makeGrid>,
	mixture: Mixture,
	probabilities: number[]
): Summary {
	let mean = 0;
	for (let c = 0; c < CELLS; c++) mean += grid.mass[c] * grid.p[c];
	const [from, median, to] = probabilities.map((p) => {
		let c = 0;
		while (c < CELLS - 1 && below[c + 1] < p) c++;
		return expit(solveIncreasing((x) => mixture.predictiveCdf(x), p, edges[c], edges[c + 1]));
	});
	return { mean, median, interval: [from, to] };
}

/**
 * Pools one proportion over studies by the random-effects model of the design (inference, section 1):
 * y ~ Binomial(n, p), logit p ~ N(mu, tau²), mu ~ N(prior.mean, prior.sd²), tau ~ HalfNormal(1).
 *
 * Returns the middle population expit(mu), a new population expit(N(mu, tau²)), tau, the observed range, and the
 * predictive distribution as a grid whose mean is `predictive.mean`. All intervals are equal-tailed.
 * Pure and deterministic; the order of the studies does not change a digit. No study: the prior's figures.
 *
 * @param studies up to thousands, totals up to ten million; `events` may be 0 or all
 * @param options prior of mu (default N(0, 2.5²)), level of the intervals (default 0.95)
 * @throws RangeError for a study without 0 <= events <= total, total > 0, a prior without a positive sd,
 *   or a level outside (0, 1)
 * @example pool([{ events: 7, total: 20 }]).predictive.mean // 0.3877
 */
export function pool(
	studies: readonly Study[],
	options: { prior?: MuPrior; level?: number; resolution?: Partial<GridResolution> } = {}
): Pooled {
	const level = options.level ?? DEFAULT_LEVEL;
	if (!(level > 0 && level < 1)) throw new RangeError('the level must lie between 0 and 1');
	const { resolution } = options;
	return summariseFit(fitGrid(studies, options.prior ?? DEFAULT_PRIOR, { resolution }), studies, level);
}

/** The summaries of a grid fitted to these studies. */
export function summariseFit(fit: GridFit, studies: readonly Study[], level = DEFAULT_LEVEL): Pooled {
	const mixture = new Mixture(fit);
	const tails: [number, number] = [(1 - level) / 2, (1 + level) / 2];
	const probabilities = [tails[0], 0.5, tails[1]];
	const made = makeGrid(mixture);
	const proportions = studies.map((s) => s.events / s.total);
	return {
		studies: studies.length,
		pooled: summarisePooled(fit, mixture, probabilities),
		predictive: summarisePredictive(made, mixture, probabilities),
		tau: summariseTau(fit, tails),
		observed: proportions.length
			? {
					min: proportions.reduce((a, b) => Math.min(a, b)),
					max: proportions.reduce((a, b) => Math.max(a, b))
				}
			: null,
		grid: made.grid
	};
}
