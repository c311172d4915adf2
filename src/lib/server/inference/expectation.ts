import { LEAVES, leafFacts } from '$lib/anatomy/sequence';
import type { Fate, Leaf } from '$lib/anatomy/sequence';
import { estimatorOf, type Estimate } from './estimates';
import type { Evidence } from './likelihoods';
import { expectedLeaves, fatesOf } from './posterior';
import type { RootModel } from './types';

/** What to expect of a root before it is opened: exact means, with intervals over the populations a patient may come from. */
export interface Expectation {
	sequences: ({ sequence: Leaf } & Estimate)[];
	orifices: ({ count: number } & Estimate)[];
	exits: ({ count: number } & Estimate)[];
	fates: Record<Fate, Estimate>;
}

/** Nothing found and nothing searched; the isthmus matters to no figure here. */
const NO_EVIDENCE: Evidence = {
	likelihoods: [],
	isthmus: { mean: 0.5, beta: null },
	search: null,
	superseded: null
};

/**
 * The distribution over canal sequences of a root (inference, section 2), summed by orifices, exits and fate.
 * Means are exact products of predictive means; intervals come from the same 4,096 Sobol points as the findings'.
 * @param model the root under the person's filters
 */
export function expectRoot(model: RootModel): Expectation {
	const leaves = [...LEAVES];
	const estimate = estimatorOf(model, leaves, expectedLeaves(model), NO_EVIDENCE);
	const counts = (of: (leaf: Leaf) => number) =>
		[...new Set(leaves.map(of))]
			.sort((a, b) => a - b)
			.map((count) => ({ count, ...estimate((leaf) => of(leaf) === count) }));
	const fates = fatesOf(leaves).map((fate) => [fate, estimate((leaf) => leafFacts(leaf).fate === fate)]);
	return {
		sequences: leaves.map((sequence) => ({ sequence, ...estimate((leaf) => leaf === sequence) })),
		orifices: counts((leaf) => leafFacts(leaf).orifices),
		exits: counts((leaf) => leafFacts(leaf).exits),
		fates: Object.fromEntries(fates) as Expectation['fates']
	};
}
