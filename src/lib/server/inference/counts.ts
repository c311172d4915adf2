/** How many roots or canals a whole tooth has: samples to show. Pure. */
import { samplesLeft } from './filters';
import { askedRoot } from './scope';
import { rootTable } from './tableIndex';
import type { TableIndex } from './tableIndex';
import type { Filters } from './types';

/** One sample's distribution of a count over whole teeth. */
export interface CountSample {
	source: string;
	entry: number;
	locator: string;
	country: string;
	method: string;
	/** Teeth examined. The counts may sum to less where a source gives only some of them. */
	total: number;
	/** By category (`1`, `2`, `2+`), in the order of the table. */
	counts: { category: string; count: number }[];
}

/**
 * Root counts or canal counts of the whole tooth, from samples of scope `all`, subgroup `all` (or the sum of its
 * halves), largest total first. They are shown, not pooled, so a source may have more than one sample here.
 */
export function gatherCounts(
	index: TableIndex,
	tooth: string,
	measure: 'root-count' | 'canal-count',
	filters: Filters
): CountSample[] {
	const table = rootTable(index, tooth, askedRoot(tooth, 'whole'));
	return samplesLeft(table, index.sources, filters)
		.samples.filter(
			(sample) => sample.measure === measure && sample.root === 'whole' && sample.scope === 'all'
		)
		.map(({ source, entries, locator, country, method, total, counts }) => ({
			source,
			entry: entries[0],
			locator,
			country,
			method,
			total,
			counts: [...counts].map(([category, count]) => ({ category, count }))
		}))
		.sort((a, b) => b.total - a.total);
}
