import type { ObservationRow } from '../inference/types';
import { readCsv } from './literatureFiles';

const PROVENANCES = ['read', 'secondary', 'memory'] as const;

/**
 * Reads observations.csv (columns: data/literature/README.md) as the rows the inference works on.
 * Rows of one sample, measure, locator and provenance share an entry, numbered from 1 in the order of the file, the
 * way the seed groups them; `verified` is false and `poolable` null, because only an editor sets them.
 *
 * @param text the file's text
 * @throws when a row has another number of cells than the header, a number that is none, or an unknown provenance
 */
export function readObservationRows(text: string): ObservationRow[] {
	const entries = new Map<string, number>();
	return readCsv(text).map(({ cells, line }) => {
		const key = JSON.stringify([
			cells.source_id,
			cells.tooth,
			cells.root,
			cells.scope,
			cells.country,
			cells.method,
			cells.subgroup,
			cells.total,
			cells.measure,
			cells.locator,
			cells.provenance
		]);
		const entry = entries.get(key) ?? entries.size + 1;
		entries.set(key, entry);
		return {
			entry,
			source: cells.source_id,
			locator: cells.locator,
			tooth: cells.tooth,
			root: cells.root,
			scope: cells.scope,
			country: cells.country,
			method: cells.method,
			subgroup: cells.subgroup,
			measure: cells.measure,
			category: cells.category,
			count: readNumber(cells.count, line),
			total: readNumber(cells.total, line),
			percent: readNumber(cells.percent, line),
			provenance: readProvenance(cells.provenance, line),
			verified: false,
			poolable: null,
			note: cells.note
		};
	});
}

function readNumber(cell: string, line: number): number | null {
	if (cell.trim() === '') return null;
	const value = Number(cell);
	if (!Number.isFinite(value)) throw new Error(`Line ${line}: '${cell}' is not a number.`);
	return value;
}

function readProvenance(cell: string, line: number): ObservationRow['provenance'] {
	const found = PROVENANCES.find((provenance) => provenance === cell);
	if (!found) throw new Error(`Line ${line}: '${cell}' is not a provenance.`);
	return found;
}
