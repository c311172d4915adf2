import type { Leaf } from '$lib/anatomy/sequence';
import type { Characteristics } from './characteristics';
import type { ConfluenceQuestion } from './confluenceQuestion';
import type { Evidence, FindingLikelihood } from './likelihoods';
import type { LeafWeights } from './types';

/** Everything the steps of one answer share. */
export interface Inquiry {
	question: ConfluenceQuestion;
	/** The possible leaves. */
	leaves: Leaf[];
	/** E[theta] of each leaf. */
	priors: LeafWeights;
	characteristics: Characteristics;
	/** Isthmus and search, which do not change with the findings. */
	context: Pick<Evidence, 'isthmus' | 'search'>;
	/** The clear findings, in the order given. */
	entered: FindingLikelihood[];
	hasEvidence: boolean;
}
