import { createHash } from 'node:crypto';
import type { CslSource, CsvRow, LiteratureFiles } from '$lib/server/table/literatureFiles';

type Cells = Record<string, string>;

/** Cells of a row of observations.csv that can be placed, with what a test changes about them. */
export function observation(change: Cells = {}): Cells {
	return {
		source_id: 'adams-2001',
		locator: 'table 1',
		tooth: 'maxillary-first-molar',
		root: 'MB',
		scope: 'all',
		country: 'BRA',
		method: 'cbct',
		subgroup: 'all',
		measure: 'configuration',
		category: '1',
		count: '40',
		total: '100',
		percent: '',
		count_derived: 'no',
		provenance: 'read',
		note: '',
		...change
	};
}

/** Cells of a row of measurements.csv. */
export function measurement(change: Cells = {}): Cells {
	const { source_id, locator, tooth, root, scope, country, method, provenance, note } = observation();
	return {
		...{ source_id, locator, tooth, root, scope, country, method },
		...{ quantity: 'root-length', n: '50', mean: '12.5', sd: '1.1', min: '', max: '', unit: 'mm' },
		...{ provenance, note, ...change }
	};
}

/** A source with title, author, journal and year. */
export function cslSource(id: string, change: Partial<CslSource> = {}): CslSource {
	return {
		id,
		type: 'article-journal',
		title: `Canals as ${id} saw them`,
		author: [{ family: 'Adams', given: 'A' }],
		issued: { 'date-parts': [[2001]] },
		'container-title': 'Journal of Roots',
		...change
	};
}

/** Rows as they would be read from a file with a header line. */
export function csvRows(cells: Cells[]): CsvRow[] {
	return cells.map((row, index) => ({ line: index + 2, cells: row }));
}

/** Literature files from the parts a test is about; the others are empty. */
export function literature({
	sources = [cslSource('adams-2001')],
	observations = [],
	measurements = [],
	diagnostics = [],
	characteristics = [],
	standards = []
}: {
	sources?: CslSource[];
	observations?: Cells[];
	measurements?: Cells[];
	diagnostics?: Cells[];
	characteristics?: Cells[];
	standards?: Cells[];
}): LiteratureFiles {
	const parts = { sources, observations, measurements, diagnostics, characteristics, standards };
	return {
		digest: createHash('sha256').update(JSON.stringify(parts)).digest('hex'),
		sources,
		observations: csvRows(observations),
		measurements: csvRows(measurements),
		diagnostics: csvRows(diagnostics),
		characteristics: csvRows(characteristics),
		standards: csvRows(standards)
	};
}
