/** Which canal sequences the class tables of a root name, and how often each was seen there. Pure. */
import { isSequence } from '$lib/anatomy/sequence';
import { samplesLeft } from './filters';
import { rootTable, type TableIndex } from './tableIndex';
import type { Filters } from './types';

/** Over the samples that name a sequence: the smallest and largest share of their roots, and how many samples. */
export interface ObservedSequence {
	sequence: string;
	min: number;
	max: number;
	studies: number;
}

/**
 * How often each canal sequence was seen, over the class tables of all roots of this kind that the filters leave in.
 * A sequence keeps its own name here, whatever leaf of the tree its probability goes to. A class that a table does not
 * mention is no sample here, even where the table is complete.
 *
 * @param root a root the product answers for
 */
export function observedSequences(
	index: TableIndex,
	tooth: string,
	root: string,
	filters: Filters
): ObservedSequence[] {
	const observed = new Map<string, ObservedSequence>();
	const { samples } = samplesLeft(rootTable(index, tooth, root), index.sources, filters);
	for (const { measure, grant, counts, total } of samples) {
		if (measure !== 'configuration' || grant !== 'every') continue;
		for (const [sequence, count] of counts) {
			if (!isSequence(sequence)) continue;
			const share = count / total;
			const known = observed.get(sequence) ?? { sequence, min: 1, max: 0, studies: 0 };
			observed.set(sequence, {
				sequence,
				min: Math.min(known.min, share),
				max: Math.max(known.max, share),
				studies: known.studies + 1
			});
		}
	}
	return [...observed.values()];
}
