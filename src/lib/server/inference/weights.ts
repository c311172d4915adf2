/** How much each sample of a question counts for the middle population. Pure. */
import { OFFSET_PRECISION } from './groupColumn';
import { groupOfMethod } from './methodLikelihood';
import type { ModelName } from './types';

/** The shares of the information about the middle population; together with `borrowed` they sum to 1. */
export interface StudyWeights {
	/** In the order of the studies; they sum to 1 among themselves. Empty without a study. */
	studies: number[];
	/** Share of all the information that the prior lent by other roots brings: 1 without a study. */
	borrowed: number;
}

/**
 * Weights of the studies of one question: the share of the information that each gives about mu, the logit of the
 * middle population, at the posterior medians of the middle population and of tau.
 *
 * A study of n roots tells logit p_s with variance v = 1 / (n p (1 - p)) (delta method, expected information of the
 * binomial), p_s itself lies tau² around mu, so it informs about mu with 1 / (tau² + v): the weights of generalised
 * least squares for this model, those of R. DerSimonian and N. Laird (Control Clin Trials 7 (1986) 177-188) with the
 * expected v. Where populations differ much (large tau) a large study counts little more than a small one.
 * Under the method model a group's studies share an offset of N(0, 0.5²): a group with W = sum of 1 / (tau² + v) informs
 * with 1 / (1 / W + 0.5²), shared out in proportion; CBCT has no offset.
 *
 * @param studies totals of at least 1; the count itself does not enter
 * @param at `middle` strictly between 0 and 1, `tau` at least 0 (logits), `priorSd` above 0 (logits)
 * @throws RangeError outside that domain
 * @example studyWeights([{ total: 100, method: 'cbct' }, { total: 400, method: 'cbct' }], { middle: 0.5, tau: 0.2, priorSd: 2.5, model: 'plain' }).studies // [0.3846, 0.6154]
 */
export function studyWeights(
	studies: readonly { total: number; method: string }[],
	at: { middle: number; tau: number; priorSd: number; model: ModelName }
): StudyWeights {
	const { middle, tau, priorSd, model } = at;
	if (
		!(middle > 0 && middle < 1) ||
		!(tau >= 0) ||
		!(priorSd > 0) ||
		studies.some(({ total }) => !(total > 0))
	)
		throw new RangeError('Weights need a proportion inside 0 to 1, tau of at least 0 and totals above 0.');
	const information = studies.map(({ total }) => 1 / (tau * tau + 1 / (total * middle * (1 - middle))));
	const groups = new Map<string, number>();
	const groupAt = studies.map(({ method }) => (model === 'method' ? groupOfMethod(method) : 'cbct'));
	groupAt.forEach((group, i) => groups.set(group, (groups.get(group) ?? 0) + information[i]));
	const counted = information.map((own, i) => {
		const whole = groups.get(groupAt[i]) ?? own;
		return groupAt[i] === 'cbct' ? own : own / (1 + whole / OFFSET_PRECISION);
	});
	const sum = counted.reduce((total, each) => total + each, 0);
	const prior = 1 / (priorSd * priorSd);
	return { studies: counted.map((each) => each / sum), borrowed: prior / (prior + sum) };
}
