import { readFileSync } from 'node:fs';
import { indexTable } from '$lib/server/inference/tableIndex';
import type { TableIndex } from '$lib/server/inference/tableIndex';
import type { ObservationRow, SourceFacts } from '$lib/server/inference/types';
import { citable, yearOf } from '$lib/server/table/citable';
import type { CitationFields } from '$lib/server/table/citable';
import { readObservationRows } from '$lib/server/table/csvRows';

const FOLDER = new URL('../../data/literature/', import.meta.url);

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

/** The shipped table: all rows, and every source as the inference knows it. */
export function shippedTable(): { rows: ObservationRow[]; sources: SourceFacts[] } {
	const sources = JSON.parse(readFileSync(new URL('sources.json', FOLDER), 'utf8')) as (CitationFields & {
		id: string;
	})[];
	return {
		rows: readObservationRows(readFileSync(new URL('observations.csv', FOLDER), 'utf8')),
		sources: sources.map((each) => ({
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
