import { fileURLToPath } from 'node:url';
import { indexTable } from '$lib/server/inference/tableIndex';
import type { TableIndex } from '$lib/server/inference/tableIndex';
import type { ObservationRow, SourceFacts } from '$lib/server/inference/types';
import { citable, yearOf } from '$lib/server/table/citable';
import { readLiteratureFiles } from '$lib/server/table/literatureFiles';
import { planSamples } from '$lib/server/table/plan';

const files = await readLiteratureFiles(fileURLToPath(new URL('../../data/literature/', import.meta.url)));

let entries = 0;

/** A row that may enter, with what a test changes about it. Each has its own entry unless the test gives one. */
export function row(change: Partial<ObservationRow> = {}): ObservationRow {
	entries += 1;
	return {
		entry: entries,
		source: 'source-a',
		locator: 'table 1',
		tooth: 'maxillary-first-molar',
		root: 'MB',
		scope: 'all',
		country: 'BRA',
		method: 'cbct',
		subgroup: 'all',
		measure: 'configuration',
		category: '1',
		count: 40,
		total: 100,
		percent: null,
		provenance: 'read',
		verified: false,
		poolable: null,
		note: '',
		...change
	};
}

/** Rows of one table: a count for each category, one entry. */
export function rows(counts: Record<string, number>, change: Partial<ObservationRow> = {}): ObservationRow[] {
	const { entry } = row();
	return Object.entries(counts).map(([category, count]) => row({ entry, ...change, category, count }));
}

/** A source as the inference knows it. */
export function source(id: string, change: Partial<SourceFacts> = {}): SourceFacts {
	return { id, citable: true, year: 2015, retracted: false, ...change };
}

/** An index over hand-made rows; every source they name is citable and of 2015. */
export function indexOf(table: ObservationRow[], sources: SourceFacts[] = []): TableIndex {
	const named = [...new Set(table.map((each) => each.source))].map((id) => source(id));
	return indexTable(table, [...named, ...sources]);
}

/** The shipped table as the seed plans it, entries numbered in order, and every source as the inference knows it. */
export function shippedTable(): { rows: ObservationRow[]; sources: SourceFacts[] } {
	const { samples } = planSamples(files.observations, new Set(files.sources.map(({ id }) => id)));
	let number = 0;
	return {
		rows: samples.flatMap(({ sourceId, key: _, entries: planned, ...sample }) =>
			planned.flatMap(({ locator, measure, provenance, figures }) => {
				number += 1;
				return figures.map(({ countDerived: __, ...figure }) => ({
					...sample,
					...figure,
					entry: number,
					source: sourceId,
					locator,
					measure,
					provenance,
					verified: provenance !== 'memory',
					poolable: null
				}));
			})
		),
		sources: files.sources.map((each) => ({
			id: each.id,
			citable: citable(each),
			year: yearOf(each),
			retracted: false
		}))
	};
}

/** The shipped table made ready. */
export function shippedIndex(): TableIndex {
	const table = shippedTable();
	return indexTable(table.rows, table.sources);
}
