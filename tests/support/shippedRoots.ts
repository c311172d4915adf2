import { gatherLenders } from '$lib/server/inference/borrowing';
import { buildRootModel } from '$lib/server/inference/rootModel';
import type { RootModel } from '$lib/server/inference/types';
import { shippedIndex } from './literatureTable';

let kept: { index: ReturnType<typeof shippedIndex>; lenders: ReturnType<typeof gatherLenders> } | undefined;

/** The model of a root of the shipped table, without filters. */
export function shippedRoot(tooth: string, root: string): RootModel {
	if (!kept) {
		const index = shippedIndex();
		kept = { index, lenders: gatherLenders(index, {}) };
	}
	return buildRootModel(kept.index, tooth, root, {}, { lenders: kept.lenders });
}
