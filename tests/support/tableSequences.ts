import { readFileSync } from 'node:fs';
import { parse } from 'csv-parse/sync';

/** Every canal sequence that the shipped table names, each once. */
export function tableSequences(): string[] {
	const csv = readFileSync('data/literature/observations.csv', 'utf8');
	const rows = parse<{ measure: string; category: string }>(csv, { columns: true });
	const categories = rows.filter((row) => row.measure === 'configuration').map((row) => row.category);
	return [...new Set(categories)].filter((category) => category !== 'other');
}
