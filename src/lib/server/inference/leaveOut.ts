/** Each sample of a question left out in turn, and predicted from the others (inference, section 6). Pure. */
import { fitGrid } from './fitGrid';
import type { GridFit, GridResolution } from './fitGrid';
import { groupOfMethod, MethodLikelihood } from './methodLikelihood';
import { logBinomial } from './countPrediction';
import type { ModelName, MuPrior, Study } from './types';

/** A sample with the method that decides its group. */
export type MethodStudy = Study & { method: string };

/** One sample, predicted from the others. */
export interface LeftOut {
	/** ln of the predictive probability of the count that was seen. */
	logProbability: number;
	/** Fitted grid of the population the sample comes from: that of its own method, under the method model. */
	population(): GridFit;
}

/** From so many samples on, a sample's likelihood is divided out of one grid; below, the others are fitted anew. */
const FEWEST_TO_DIVIDE = 4;

/** What is divided out widens the posterior, so the grid must reach further than one that is only looked at. */
const REACH: Partial<GridResolution> = { depth: 24, muStep: 0.7 };
/** For an integral alone; on the shipped table's questions of three samples ln p is within 1e-4 of a grid twice as fine. */
const COARSE: Partial<GridResolution> = { depth: 13, minColumns: 11, columnStep: 0.5, muStep: 1.3 };

/**
 * Leaves each of two or more samples out.
 * @param studies the samples of one question
 * @param prior of mu, lent by other roots and so untouched by what is left out
 */
export function leaveEachOut(studies: readonly MethodStudy[], prior: MuPrior, model: ModelName): LeftOut[] {
	return studies.length < FEWEST_TO_DIVIDE
		? refitWithoutEach(studies, prior, model)
		: divideEachOut(studies, prior, model);
}

interface Fitted {
	grid: GridFit;
	method: MethodLikelihood | undefined;
}

function fit(
	studies: readonly MethodStudy[],
	prior: MuPrior,
	model: ModelName,
	resolution: Partial<GridResolution>,
	keepStudies = false
): Fitted {
	const method = model === 'method' ? new MethodLikelihood(studies) : undefined;
	return { grid: fitGrid(studies, prior, { keepStudies, resolution, likelihood: method }), method };
}

/** p(y | the others) = Z / Z of the others, Z the integral of the likelihood over the prior. */
function refitWithoutEach(studies: readonly MethodStudy[], prior: MuPrior, model: ModelName): LeftOut[] {
	const all = logIntegral(fit(studies, prior, model, COARSE).grid);
	return studies.map((study, left) => {
		const others = studies.filter((_, i) => i !== left);
		const rest = logIntegral(fit(others, prior, model, COARSE).grid);
		return {
			logProbability: all - rest + largestLogProbability(study),
			population: () => populationOf(fit(others, prior, model, REACH), study, null)
		};
	});
}

/** p(y | the others) = 1 / E[1 / p(y | mu, tau)] over the posterior of all. */
function divideEachOut(studies: readonly MethodStudy[], prior: MuPrior, model: ModelName): LeftOut[] {
	const fitted = fit(studies, prior, model, REACH, true);
	const { mass, logMarginal, rows, rowOf } = fitted.grid;
	return studies.map((study, left) => {
		let sum = 0;
		for (let i = 0; i < mass.length; i++) sum += mass[i] * Math.exp(-logMarginal![i * rows + rowOf[left]]);
		return {
			logProbability: largestLogProbability(study) - Math.log(sum),
			population: () => populationOf(fitted, study, rowOf[left])
		};
	});
}

/** ln Binomial(y | n, y / n), which the likelihoods of the grid are relative to. */
function largestLogProbability({ events, total }: Study): number {
	return logBinomial(events, total, events / total);
}

/** ln of the integral of likelihood and priors over (mu, tau), up to what depends on the priors alone. */
function logIntegral({ columns, scale, vStart, vStep }: GridFit): number {
	const top = Math.max(...columns.map(({ logDensity }) => logDensity));
	const sum = columns.reduce(
		(total, { logDensity }, j) => total + Math.exp(logDensity - top) * (j === 0 && vStart === 0 ? 0.5 : 1),
		0
	);
	return top + Math.log(sum * vStep * scale);
}

/** The population a study comes from, with one copy of a row divided out; null: nothing. */
function populationOf({ grid, method }: Fitted, study: MethodStudy, row: number | null): GridFit {
	const group = method ? groupOfMethod(study.method) : 'cbct';
	return gridOf(
		grid,
		grid.columns.map(({ tau, first, count, start, step }) => {
			const logMass = Float64Array.from({ length: count }, (_, k) => {
				const i = first + k;
				const term = row === null ? 0 : grid.logMarginal![i * grid.rows + row];
				return Math.log(grid.mass[i]) - term;
			});
			if (!method || group === 'cbct')
				return { tau, start, step, logDensity: logMass.map((log) => log - Math.log(step)) };
			const nodes = grid.mu.subarray(first, first + count);
			return { tau, ...method.population(group, tau, nodes, logMass, row) };
		})
	);
}

interface LogColumn {
	tau: number;
	start: number;
	step: number;
	/** ln of the joint density of mu and the column, up to a constant common to all columns. */
	logDensity: Float64Array;
}

/** A grid like those of `fitGrid`, from log densities alone: slopes and curvatures by central differences. */
function gridOf({ scale, vStart, vStep }: GridFit, parts: readonly LogColumn[]): GridFit {
	const size = parts.reduce((sum, { logDensity }) => sum + logDensity.length, 0);
	const all = {
		mu: new Float64Array(size),
		mass: new Float64Array(size),
		density: new Float64Array(size),
		slope: new Float64Array(size),
		curvature: new Float64Array(size)
	};
	const top = parts.reduce(
		(most, { logDensity }) => logDensity.reduce((a, b) => Math.max(a, b), most),
		-Infinity
	);
	const weights = parts.map(
		({ step, logDensity }) => step * logDensity.reduce((sum, log) => sum + Math.exp(log - top), 0)
	);
	const total = weights.reduce((a, b) => a + b);
	let first = 0;
	const columns = parts.map(({ tau, start, step, logDensity: log }, j) => {
		const count = log.length;
		for (let k = 0; k < count; k++) {
			const i = first + k;
			const density = Math.exp(log[k] - top) / weights[j];
			// The outermost nodes are too light for their slopes to matter.
			const inner = Math.min(Math.max(k, 2), count - 3);
			const [a, b, c, d, e] = log.subarray(inner - 2, inner + 3);
			const slope = (a - 8 * b + 8 * d - e) / (12 * step);
			const bend = (-a + 16 * b - 30 * c + 16 * d - e) / (12 * step * step);
			all.mu[i] = start + k * step;
			all.density[i] = density;
			all.mass[i] = (density * step * weights[j]) / total;
			all.slope[i] = density * slope;
			all.curvature[i] = density * (bend + slope * slope);
		}
		const column = {
			tau,
			weight: weights[j] / total,
			logDensity: Math.log(weights[j] / total),
			first,
			count,
			start,
			step
		};
		first += count;
		return column;
	});
	return { columns, scale, vStart, vStep, ...all, logMarginal: null, rows: 0, rowOf: new Int32Array(0) };
}
