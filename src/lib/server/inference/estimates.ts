import type { Leaf } from '$lib/anatomy/sequence';
import { intervalsOf } from './intervals';
import type { Evidence } from './likelihoods';
import { exactWeights, shareOf, statesOf } from './posterior';
import type { LeafWeights, RootModel } from './types';

const LEVEL = 0.95;

/** A probability and how far literature and tests leave it open (95 %, equal tails). */
export interface Estimate {
	mean: number;
	interval: [number, number];
}

/** Estimates the probability that the root's leaf is one of those that `holds` names. */
export type Estimator = (holds: (leaf: Leaf) => boolean) => Estimate;

/**
 * Estimates of any sum of leaf probabilities under some evidence: exact mean, interval from the draws.
 * @param leaves the possible leaves
 * @param priors E[theta] of each leaf
 */
export function estimatorOf(
	model: RootModel,
	leaves: Leaf[],
	priors: LeafWeights,
	evidence: Evidence
): Estimator {
	const weights = exactWeights(leaves, priors, evidence);
	const intervalOf = intervalsOf(model, evidence, leaves, statesOf(leaves, weights, evidence), LEVEL);
	return (holds) => ({
		mean: shareOf(leaves, weights, holds),
		interval: intervalOf(leaves.flatMap((leaf, place) => (holds(leaf) ? [place] : [])))
	});
}
