import crypto from 'node:crypto';
import type { Provenance } from '../db/models/literature';
import type { CsvRow } from './literatureFiles';

/** A sample as the seed will write it, with its entries. */
export interface PlannedSample {
	key: string;
	sourceId: string;
	tooth: string;
	root: string;
	scope: string;
	country: string;
	method: string;
	subgroup: string;
	total: number | null;
	entries: PlannedEntry[];
}

/** An entry: a sample's figures for one measure, from one place in the source. */
export interface PlannedEntry {
	key: string;
	/** Changes when any figure changes: a re-seed touches only entries whose hash is new. */
	hash: string;
	locator: string;
	measure: string;
	provenance: Provenance;
	figures: PlannedFigure[];
}

interface PlannedFigure {
	category: string;
	count: number | null;
	percent: number | null;
	countDerived: boolean;
	note: string;
}

/** A row that could not be placed, and why. */
export interface Unplaced {
	file: string;
	line: number;
	sourceId: string;
	summary: string;
	reason: string;
}

const SAMPLE_FIELDS = [
	'source_id',
	'tooth',
	'root',
	'scope',
	'country',
	'method',
	'subgroup',
	'total'
] as const;
const ENTRY_FIELDS = ['measure', 'locator', 'provenance'] as const;

const digest = (parts: unknown) =>
	crypto.createHash('sha256').update(JSON.stringify(parts)).digest('hex').slice(0, 32);

/**
 * Sorts observation rows into samples and entries.
 * A row without a source of the table, without a locator, or with a number that is none, cannot be placed and is listed with its reason.
 * @param rows rows of observations.csv
 * @param sources ids of the sources that exist
 */
export function planSamples(
	rows: CsvRow[],
	sources: ReadonlySet<string>
): { samples: PlannedSample[]; unplaced: Unplaced[] } {
	const samples = new Map<string, PlannedSample>();
	const entries = new Map<string, PlannedEntry>();
	const unplaced: Unplaced[] = [];

	for (const row of rows) {
		const { cells } = row;
		const reason = whyNotPlaced(cells, sources);
		if (reason) {
			unplaced.push(describeUnplaced('observations.csv', row, reason));
			continue;
		}
		const sampleKey = digest(SAMPLE_FIELDS.map((field) => cells[field]));
		let sample = samples.get(sampleKey);
		if (!sample) {
			sample = {
				key: sampleKey,
				sourceId: cells.source_id,
				tooth: cells.tooth,
				root: cells.root,
				scope: cells.scope,
				country: cells.country,
				method: cells.method,
				subgroup: cells.subgroup,
				total: numberOrNull(cells.total),
				entries: []
			};
			samples.set(sampleKey, sample);
		}
		const entryKey = digest([sampleKey, ...ENTRY_FIELDS.map((field) => cells[field])]);
		let entry = entries.get(entryKey);
		if (!entry) {
			entry = {
				key: entryKey,
				hash: '',
				locator: cells.locator.trim(),
				measure: cells.measure,
				provenance: cells.provenance as Provenance,
				figures: []
			};
			entries.set(entryKey, entry);
			sample.entries.push(entry);
		}
		entry.figures.push({
			category: cells.category,
			count: numberOrNull(cells.count),
			percent: numberOrNull(cells.percent),
			countDerived: cells.count_derived === 'yes',
			note: cells.note
		});
	}
	for (const entry of entries.values()) entry.hash = digest(entry.figures);
	return { samples: [...samples.values()], unplaced };
}

/** Why a row of any literature file cannot be placed in words, or null if it can. */
function whyNotPlaced(cells: Record<string, string>, sources: ReadonlySet<string>): string | null {
	const basic = whyNotCited(cells, sources);
	if (basic) return basic;
	if (!cells.measure || !cells.category) return 'The row names no measure or no category.';
	const count = numberOrNull(cells.count);
	const total = numberOrNull(cells.total);
	const percent = numberOrNull(cells.percent);
	if ([count, total].some((value) => value !== null && !(Number.isInteger(value) && value >= 0)))
		return 'Count and total must be whole numbers.';
	if (count === null && percent === null) return 'The row gives neither a count nor a percentage.';
	if (total === 0) return 'The total is zero.';
	if (count !== null && total !== null && count > total) return 'The count is larger than the total.';
	if (percent !== null && !(percent >= 0 && percent <= 100)) return 'The percentage is not from 0 to 100.';
	return null;
}

/** The part every file shares: a source of the table, a place in it, a known provenance. */
export function whyNotCited(cells: Record<string, string>, sources: ReadonlySet<string>): string | null {
	if (!cells.source_id) return 'The row names no source.';
	if (!sources.has(cells.source_id)) return `The source ${cells.source_id} is not among the sources.`;
	if (cells.locator !== undefined && cells.locator.trim() === '')
		return 'The row has no locator: nobody could find the figure in its source.';
	if (!['read', 'secondary', 'memory'].includes(cells.provenance))
		return `The provenance "${cells.provenance}" is none of read, secondary, memory.`;
	return null;
}

/** An entry for the list of rows not placed. */
export function describeUnplaced(file: string, row: CsvRow, reason: string): Unplaced {
	const { source_id, ...rest } = row.cells;
	const summary = Object.entries(rest)
		.filter(([, value]) => value !== '')
		.map(([name, value]) => `${name}: ${value}`)
		.join('; ');
	return { file, line: row.line, sourceId: source_id ?? '', summary, reason };
}

/** A cell's number; null for an empty cell; NaN (which no check lets pass) for anything else. */
export function numberOrNull(cell: string): number | null {
	return cell.trim() === '' ? null : Number(cell);
}
