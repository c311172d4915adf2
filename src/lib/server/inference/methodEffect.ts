/**
 * Pooling with an effect of the method, and the choice between it and the plain model by what each predicts. Pure.
 *
 * logit p_s ~ N(mu + delta_g, tau²), delta_g ~ N(0, 0.5²) for the groups of OFFSET_GROUPS, 0 for CBCT; priors of mu and
 * tau as in the plain model. Micro-CT and clearing find more canals than CBCT, CBCT more than radiographs.
 */
import { fitGrid } from './fitGrid';
import type { GridFit } from './fitGrid';
import { leaveEachOut } from './leaveOut';
import type { LeftOut, MethodStudy } from './leaveOut';
import { groupOfMethod, MethodLikelihood } from './methodLikelihood';
import { solveIncreasing } from './mixture';
import { normalCdf } from './normal';
import { summariseFit } from './pool';
import { OFFSET_GROUPS } from './types';
import type { MethodOffset, MuPrior, OffsetGroup, Pooled, QuestionMethod } from './types';

/** A sample is predicted only from two others or more (inference, section 6). */
export const FEWEST_SAMPLES = 3;

/** Columns of the grid lighter than this change nothing that is shown. */
const LEAST_WEIGHT = 1e-9;

/** The choice for one question, with each sample as both models predict it. */
interface Choice extends Omit<QuestionMethod, 'offsets'> {
	/** Null as `logScore` is. */
	leftOut: Record<QuestionMethod['shown'], LeftOut[]> | null;
}

/** Shows the model that gave the left-out counts the higher probability; the plain one in a tie or without a comparison. */
export function chooseModel(studies: readonly MethodStudy[], prior: MuPrior): Choice {
	const groups = new Set(studies.map(({ method }) => groupOfMethod(method)));
	if (studies.length < FEWEST_SAMPLES || groups.size < 2)
		return { shown: 'plain', logScore: null, leftOut: null };
	const leftOut = {
		plain: leaveEachOut(studies, prior, 'plain'),
		method: leaveEachOut(studies, prior, 'method')
	};
	const logScore = { plain: logScoreOf(leftOut.plain), method: logScoreOf(leftOut.method) };
	return { shown: logScore.method > logScore.plain ? 'method' : 'plain', logScore, leftOut };
}

/** Sum of ln of the predictive probabilities. */
export function logScoreOf(leftOut: readonly LeftOut[]): number {
	return leftOut.reduce((sum, { logProbability }) => sum + logProbability, 0);
}

/**
 * Pools with an effect of the method. With samples of CBCT alone it is `pool`, digit for digit.
 * @returns the figures of a population examined by CBCT, and the offsets of the groups that have samples
 */
export function poolByMethod(
	studies: readonly MethodStudy[],
	options: { prior: MuPrior; level?: number }
): Pooled & { offsets: MethodOffset[] } {
	const level = options.level ?? 0.95;
	const likelihood = new MethodLikelihood(studies);
	const fit = fitGrid(studies, options.prior, { likelihood });
	const offsets = OFFSET_GROUPS.flatMap((group) => {
		const count = studies.filter(({ method }) => groupOfMethod(method) === group).length;
		return count > 0 ? [{ group, ...offsetOf(fit, likelihood, group, level), studies: count }] : [];
	});
	return { ...summariseFit(fit, studies, level), offsets };
}

/** An offset's distribution at one tau, by its moments. */
interface OffsetColumn {
	weight: number;
	mean: number;
	sd: number;
	skew: number;
	/** Kurtosis less 3. */
	excess: number;
}

/**
 * Mean and equal-tailed interval of an offset. At one tau it is near a normal, a normal prior times a log-concave
 * likelihood, so that its first four moments give its distribution function by Edgeworth's expansion (H. Cramér,
 * Mathematical Methods of Statistics, 1946, 17.7); the columns' are then summed.
 */
function offsetOf(
	fit: GridFit,
	likelihood: MethodLikelihood,
	group: OffsetGroup,
	level: number
): { mean: number; interval: [number, number] } {
	const columns = fit.columns
		.filter(({ weight }) => weight > LEAST_WEIGHT)
		.map(({ tau, first, count, weight }): OffsetColumn => {
			const raw = [0, 0, 0, 0];
			for (let i = first; i < first + count; i++) {
				const moments = likelihood.offsetMoments(group, fit.mu[i], tau);
				for (let j = 0; j < 4; j++) raw[j] += (fit.mass[i] / weight) * moments[j];
			}
			return { weight, ...shapeOf(raw) };
		});
	const cdf = (x: number) =>
		columns.reduce(
			(sum, column) => sum + column.weight * edgeworth((x - column.mean) / column.sd, column),
			0
		);
	const low = Math.min(...columns.map(({ mean, sd }) => mean - 8 * sd));
	const high = Math.max(...columns.map(({ mean, sd }) => mean + 8 * sd));
	return {
		mean: columns.reduce((sum, { weight, mean }) => sum + weight * mean, 0),
		interval: [
			solveIncreasing(cdf, (1 - level) / 2, low, high),
			solveIncreasing(cdf, (1 + level) / 2, low, high)
		]
	};
}

/** From the first four raw moments. */
function shapeOf([mean, square, cube, fourth]: number[]): Omit<OffsetColumn, 'weight'> {
	const variance = square - mean * mean;
	const sd = Math.sqrt(variance);
	const third = cube - 3 * mean * square + 2 * mean ** 3;
	const central = fourth - 4 * mean * cube + 6 * mean * mean * square - 3 * mean ** 4;
	return { mean, sd, skew: third / sd ** 3, excess: central / variance ** 2 - 3 };
}

function edgeworth(z: number, { skew, excess }: OffsetColumn): number {
	const hermite2 = z * z - 1;
	const hermite3 = z ** 3 - 3 * z;
	const hermite5 = z ** 5 - 10 * z ** 3 + 15 * z;
	const bend = (skew / 6) * hermite2 + (excess / 24) * hermite3 + ((skew * skew) / 72) * hermite5;
	return normalCdf(z) - (Math.exp((-z * z) / 2) / Math.sqrt(2 * Math.PI)) * bend;
}
