import { FATES, leafFacts } from '$lib/anatomy/sequence';
import type { Fate, Leaf } from '$lib/anatomy/sequence';
import { leafMeans } from './distribution';
import { betaMean, expectedSearch, ofResult } from './likelihoods';
import type { Evidence, FindingLikelihood } from './likelihoods';
import { gridMean } from './predictiveGrid';
import type { LeafWeights, QuestionId, RootModel } from './types';

/** A leaf and, where a draw test needs it, whether there is an isthmus; with its posterior weight. */
export interface State {
	leaf: Leaf;
	isthmus: boolean | null;
	weight: number;
}

/** E[theta] of each leaf: products of predictive means along its path. */
export function expectedLeaves(model: RootModel): LeafWeights {
	const means = model.questions.map(({ id, grid }) => [id, gridMean(grid)]);
	return leafMeans(Object.fromEntries(means) as Record<QuestionId, number>);
}

/** How a finding's expected likelihoods are taken: as they are, or weakened for a cautious look. */
export type Reading = (likelihood: FindingLikelihood) => { meet: number; never: number };

const asExpected: Reading = ({ expected }) => expected;

/**
 * Exact posterior weights of leaves, E[theta] E[L], not normalised.
 * @param leaves the possible leaves
 * @param priors E[theta] of each leaf
 */
export function exactWeights(
	leaves: Leaf[],
	priors: LeafWeights,
	{ likelihoods, search }: Pick<Evidence, 'likelihoods' | 'search'>,
	reading: Reading = asExpected
): number[] {
	let meet = 1;
	let never = 1;
	for (const likelihood of likelihoods) {
		const expected = reading(likelihood);
		meet *= expected.meet;
		never *= expected.never;
	}
	return leaves.map((leaf) => {
		const { width, stepsDown } = leafFacts(leaf);
		return priors[leaf] * expectedSearch(search, width) * (stepsDown ? meet : never);
	});
}

/** The states behind the weights: a leaf that never steps down is split by the isthmus where a draw test counts. */
export function statesOf(leaves: Leaf[], weights: number[], { likelihoods, isthmus }: Evidence): State[] {
	const draw = likelihoods.find(({ neverIsthmus }) => neverIsthmus !== null);
	return leaves.flatMap((leaf, index): State[] => {
		const weight = weights[index];
		if (!draw || !draw.neverIsthmus || leafFacts(leaf).stepsDown) return [{ leaf, isthmus: null, weight }];
		const present = isthmus.mean * ofResult(draw.result, betaMean(draw.neverIsthmus));
		const share = present / draw.expected.never;
		return [
			{ leaf, isthmus: true, weight: weight * share },
			{ leaf, isthmus: false, weight: weight * (1 - share) }
		];
	});
}

/** Sum of the weights of the leaves that `holds` names, over the sum of all. */
export function shareOf(leaves: Leaf[], weights: number[], holds: (leaf: Leaf) => boolean): number {
	let sum = 0;
	let total = 0;
	for (let i = 0; i < leaves.length; i++) {
		total += weights[i];
		if (holds(leaves[i])) sum += weights[i];
	}
	return sum / total;
}

/** The fates an answer lists: 'one-canal' only while a width of 1 is possible. */
export function fatesOf(leaves: Leaf[]): Fate[] {
	return FATES.filter((fate) => fate !== 'one-canal' || leaves.includes('1'));
}

/** Probability of each fate that an answer lists. */
export function fateShares(leaves: Leaf[], weights: number[]): FateProbabilities {
	const shares: FateProbabilities = {};
	for (const fate of fatesOf(leaves)) {
		shares[fate] = shareOf(leaves, weights, (leaf) => leafFacts(leaf).fate === fate);
	}
	return shares;
}

/** Probabilities of fates; 'one-canal' is absent where two canals or more are known. */
export type FateProbabilities = Partial<Record<Fate, number>>;
