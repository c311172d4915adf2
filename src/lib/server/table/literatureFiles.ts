import crypto from 'node:crypto';
import fs from 'node:fs/promises';
import path from 'node:path';
import { parse } from 'csv-parse/sync';
import { originalCell } from './harmlessCells';

/** Names of the shipped files, in the order their digest is taken. */
const FILES = [
	'sources.json',
	'observations.csv',
	'measurements.csv',
	'diagnostics.csv',
	'finding-characteristics.csv',
	'standards.csv'
] as const;
type FileName = (typeof FILES)[number];

/** A CSV row with the line it starts on, so that a row that cannot be placed can be found again. */
export interface CsvRow {
	line: number;
	cells: Record<string, string>;
}

/** A source as CSL-JSON: open by definition, so only the fields this product reads are named. */
export interface CslSource {
	id: string;
	type?: string;
	title?: string;
	author?: { family?: string; given?: string; literal?: string }[];
	issued?: { 'date-parts'?: (number | string)[][] };
	'container-title'?: string;
	DOI?: string;
	PMID?: string;
	PMCID?: string;
	[field: string]: unknown;
}

/** The shipped literature as read from disk. */
export interface LiteratureFiles {
	/** SHA-256 over all files: the same digest means that there is nothing to seed. */
	digest: string;
	sources: CslSource[];
	observations: CsvRow[];
	measurements: CsvRow[];
	diagnostics: CsvRow[];
	characteristics: CsvRow[];
	standards: CsvRow[];
}

/**
 * Reads CSV text with a header line (RFC 4180).
 * @throws when a row has another number of cells than the header
 */
function readCsv(text: string): CsvRow[] {
	const rows: { record: Record<string, string>; info: { lines: number } }[] = parse(text, {
		columns: true,
		// A table that was downloaded here can be put back in: see harmlessCells.
		cast: originalCell,
		bom: true,
		info: true,
		skip_empty_lines: true
	});
	return rows.map(({ record, info }) => ({ line: info.lines, cells: record }));
}

/**
 * Reads every shipped file.
 * @param folder `data/literature`
 * @throws when a file is missing or is not well formed
 */
export async function readLiteratureFiles(folder: string): Promise<LiteratureFiles> {
	const texts = await Promise.all(FILES.map((name) => fs.readFile(path.join(folder, name), 'utf8')));
	const hash = crypto.createHash('sha256');
	for (const text of texts) hash.update(text).update('\0');
	const text = (name: FileName) => texts[FILES.indexOf(name)];
	return {
		digest: hash.digest('hex'),
		sources: JSON.parse(text('sources.json')) as CslSource[],
		observations: readCsv(text('observations.csv')),
		measurements: readCsv(text('measurements.csv')),
		diagnostics: readCsv(text('diagnostics.csv')),
		characteristics: readCsv(text('finding-characteristics.csv')),
		standards: readCsv(text('standards.csv'))
	};
}
