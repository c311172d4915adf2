import type { Root, Tooth } from '$lib/anatomy/teeth';
import type { FiltersInForce } from '$lib/schemas/common';
import { differenceOf, gridOfSummary, type Difference } from './difference';
import { estimator } from './estimator';
import type { QuestionId } from './types';

/** One side of a comparison: a root under some filters. */
export interface Side {
	tooth: Tooth;
	root: Root;
	filters: FiltersInForce;
}

/** One question, compared. */
export interface QuestionDifference {
	id: QuestionId;
	/** Of the middle populations, and of a new population of each; null where either side has no sample of its own. */
	middle: Difference | null;
	next: Difference | null;
	/** Sources that answer the question on both sides: then the two are not independent. */
	shared: number;
}

/**
 * How far two sides lie apart on each question. Filters have been checked by whoever asked for the sides' expectations.
 */
export async function differencesOf(first: Side, second: Side): Promise<QuestionDifference[]> {
	const current = await estimator();
	const [one, other] = await Promise.all(
		[first, second].map(({ tooth, root, filters }) => current.root(tooth.id, root.id, filters))
	);
	return one.model.questions.map((a, i) => {
		const b = other.model.questions[i];
		const known = !a.borrowed && !b.borrowed;
		const sources = new Set(a.evidence.map(({ source }) => source));
		return {
			id: a.id,
			middle: known ? differenceOf(gridOfSummary(a.pooled), gridOfSummary(b.pooled)) : null,
			next: known ? differenceOf(a.grid, b.grid) : null,
			shared: new Set(b.evidence.flatMap(({ source }) => (sources.has(source) ? [source] : []))).size
		};
	});
}
