import { readFileSync } from 'node:fs';
import path from 'node:path';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { observation } from '../../../../tests/support/madeUpLiterature';
import { checkRows, type TableContext } from './checkRows';
import { readCsv, type Sheet } from './decode';
import { COLUMNS } from './mapping';
import { DATE_MARK } from './spreadsheet';

const table: TableContext = { sources: new Set(['adams-2001']), shown: new Map() };

function sheetOf(rows: Record<string, string>[], headings: readonly string[] = COLUMNS): Sheet {
	return {
		rows: [[...headings], ...rows.map((row) => COLUMNS.map((column) => row[column] ?? ''))],
		encoding: 'UTF-8',
		delimiter: ','
	};
}
const check = (sheet: Sheet, chosen: Record<string, string> = {}) => checkRows(sheet, chosen, table);
const places = (sheet: Sheet) => check(sheet).problems.first.map(({ row, column }) => `${row} ${column}`);

describe('rows of a file', () => {
	it('of one sample and place become one entry', () => {
		const sheet = sheetOf([
			observation({ category: '1', count: '60' }),
			observation({ category: '2-1', count: '40' }),
			observation({ measure: 'canal-count', category: '2', count: '40' })
		]);
		const { entries, problems } = check(sheet);
		expect(problems.total).toBe(0);
		expect(entries.map(({ rows, content }) => [rows, content.figures.length])).toEqual([
			[[2, 3], 2],
			[[4], 1]
		]);
		expect(entries[0].content).toMatchObject({ source: 'adams-2001', total: 100, measure: 'configuration' });
	});

	it('are all named where something is wrong, by row and column, and nothing is planned', () => {
		const sheet = sheetOf([
			observation(),
			observation({ category: '2-2' }),
			observation({ count: '140', locator: 'table 9' }),
			observation({ source_id: 'nobody-1999' })
		]);
		expect(places(sheet)).toEqual(['3 category', '4 count', '5 source_id']);
		expect(check(sheet).entries).toEqual([]);
	});

	it('with something wrong of their sample are named each', () => {
		const wrong = [observation({ total: 'many' }), observation({ total: 'many', category: '2' })];
		expect(places(sheetOf(wrong))).toEqual(['2 total', '3 total']);
	});

	it('of a class that stands twice are named at the second', () => {
		expect(places(sheetOf([observation(), observation()]))).toEqual(['3 category']);
	});

	it('may carry the mark that spreadsheets make harmless cells with', () => {
		const { entries } = check(sheetOf([observation({ note: "'=not a formula" })]));
		expect(entries[0].content.figures[0].note).toBe('=not a formula');
	});

	it('in which a program has turned a sequence into a date say so', () => {
		const { problems } = check(sheetOf([observation({ category: `${DATE_MARK}2026-02-01` })]));
		expect(problems.first[0]).toMatchObject({ row: 2, column: 'category', value: '2026-02-01' });
		expect(problems.first[0].message).toMatch(/into a date/);
	});

	it('by the thousand are reported in part and counted in full', () => {
		const { problems } = check(
			sheetOf(
				Array.from({ length: 5_000 }, (_, index) => observation({ count: 'x', locator: `table ${index}` }))
			)
		);
		expect(problems.total).toBe(5_000);
		expect(problems.rows).toBe(5_000);
		expect(problems.first).toHaveLength(200);
		expect(problems.byColumn).toEqual([['count', 5_000]]);
	});
});

describe('headings', () => {
	it('in other words, in any order, with blanks and capitals, find their columns', () => {
		const headings = COLUMNS.map((column) =>
			column === 'count' ? 'N' : column.replace('_', ' ').toUpperCase()
		);
		const result = check(sheetOf([observation()], headings));
		expect(result.problems.total).toBe(0);
		expect(result.headings.find(({ heading }) => heading === 'N')).toEqual({
			heading: 'N',
			column: 'count',
			exact: false
		});
	});

	it('that nobody knows are left out until a person says which they are', () => {
		const headings = COLUMNS.map((column) => (column === 'scope' ? 'Umfang' : column));
		const sheet = sheetOf([observation()], headings);
		expect(check(sheet).missing).toEqual(['scope']);
		expect(places(sheet)).toEqual(['1 scope']);
		expect(check(sheet, { Umfang: 'scope' }).problems.total).toBe(0);
		expect(check(sheet, { Umfang: 'scope', note: '' }).problems.total).toBe(0);
		expect(check(sheet, { Umfang: 'count' }).twice).toEqual(['count']);
	});
});

describe('any file', () => {
	it('of the shipped table has no problem', () => {
		const folder = path.resolve(import.meta.dirname, '../../../../data/literature');
		const sources = JSON.parse(readFileSync(path.join(folder, 'sources.json'), 'utf8')) as { id: string }[];
		const sheet = readCsv(readFileSync(path.join(folder, 'observations.csv')));
		const { problems, rows } = checkRows(
			// Rows without a place in their source cannot be kept, as the seed lists them.
			{ ...sheet, rows: sheet.rows.filter((row) => row[1]?.trim() !== '') },
			{},
			{ sources: new Set(sources.map(({ id }) => id)), shown: new Map() }
		);
		expect(problems.first).toEqual([]);
		expect(rows).toBeGreaterThan(2000);
	});

	it('gets an answer, and entries exactly where there is no problem', () => {
		const cell = fc.oneof(fc.string(), fc.constantFrom('', '2-1', '40', 'adams-2001', 'cbct', 'read', '100'));
		const rows = fc.array(fc.array(cell, { maxLength: COLUMNS.length + 2 }), { maxLength: 6 });
		fc.assert(
			fc.property(rows, (body) => {
				const result = check({ rows: [[...COLUMNS], ...body], encoding: null, delimiter: null });
				if (result.problems.total > 0) expect(result.entries).toEqual([]);
				else expect(result.entries.length).toBeGreaterThan(0);
				for (const { row } of result.problems.first)
					expect(row).toBeLessThanOrEqual(Math.max(2, body.length + 1));
			})
		);
	});
});
