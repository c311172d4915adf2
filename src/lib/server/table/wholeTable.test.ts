import { writeFileSync } from 'node:fs';
import path from 'node:path';
import type { Sequelize } from 'sequelize';
import { beforeAll, describe, expect, it } from 'vitest';
import { OBSERVATION_COLUMNS, wholeTableSchema } from '$lib/schemas/table';
import { temporaryDatabase, temporaryFolder } from '../../../../tests/support/database';
import { cslSource, literature, observation } from '../../../../tests/support/madeUpLiterature';
import { Entry, TableRevision } from '../db/models/literature';
import { readLiteratureFiles } from './literatureFiles';
import { planSamples } from './plan';
import { seedLiterature } from './seed';
import { publishedRevision, tableCsv, tableJson } from './wholeTable';

/** More entries than one piece holds, some with several figures, and cells that spreadsheets and CSV find hard. */
const OBSERVATIONS = [
	...Array.from({ length: 600 }, (_, index) => observation({ locator: `table ${index}`, count: '7' })),
	...[
		'=1+1',
		'+1',
		'-1',
		'@x',
		"'quoted",
		"'=both",
		'\ttab',
		'a,"b"',
		'two\nlines',
		'two\r\nlines',
		'Ørsted'
	].map((note, index) => observation({ locator: 'odd', category: `odd ${index}`, note })),
	observation({ locator: 'percent', count: '', total: '', percent: '12.5', country: 'CHN' }),
	observation({ locator: 'derived', count_derived: 'yes', provenance: 'memory' })
];
const SOURCES = new Set(['adams-2001']);

let db: Sequelize;
beforeAll(async () => {
	db = await temporaryDatabase();
	await seedLiterature(db, literature({ sources: [cslSource('adams-2001')], observations: OBSERVATIONS }));
});

async function textOf(pieces: AsyncGenerator<string>) {
	const all: string[] = [];
	for await (const piece of pieces) all.push(piece);
	return { text: all.join(''), pieces: all.length };
}

/** The rows of a text as the import reads observations.csv. */
async function imported(observations: string) {
	const folder = temporaryFolder();
	const empty = { 'measurements.csv': 'x\n', 'diagnostics.csv': 'x\n', 'standards.csv': 'x\n' };
	for (const [name, text] of Object.entries({
		...empty,
		'finding-characteristics.csv': 'x\n',
		'sources.json': '[]',
		'observations.csv': observations
	}))
		writeFileSync(path.join(folder, name), text);
	return (await readLiteratureFiles(folder)).observations;
}

describe('the whole table as CSV', () => {
	it('has the columns of the import, in its order', async () => {
		const { text } = await textOf(tableCsv(db, {}, 1));
		expect(text.slice(0, text.indexOf('\n'))).toBe(Object.keys(observation()).join(','));
		expect(OBSERVATION_COLUMNS).toEqual(Object.keys(observation()));
	});

	it('is read by the import as the very table it came from, in more than one piece', async () => {
		const { text, pieces } = await textOf(tableCsv(db, {}, 1));
		expect(pieces).toBeGreaterThan(2);
		const plan = planSamples(await imported(text), SOURCES);
		expect(plan.unplaced).toEqual([]);
		const original = planSamples(
			OBSERVATIONS.map((cells, index) => ({ line: index, cells })),
			SOURCES
		);
		expect(plan.samples).toEqual(original.samples);
	});

	it('has no cell a spreadsheet would run', async () => {
		const { text } = await textOf(tableCsv(db, { q: 'odd' }, 1));
		expect(text).toContain("'=1+1");
		expect(text).toContain("''quoted");
		expect(text).not.toMatch(/(^|,|\n)"?[=+@-]/);
	});

	it('holds what filters leave, and nothing withdrawn', async () => {
		const lines = async () => (await textOf(tableCsv(db, { country: 'CHN' }, 1))).text.trim().split('\n');
		expect(await lines()).toHaveLength(2);
		await Entry.update({ state: 'withdrawn' }, { where: { locator: 'percent' } });
		expect(await lines()).toHaveLength(1);
		await Entry.update({ state: 'published' }, { where: { locator: 'percent' } });
	});
});

describe('the whole table as JSON', () => {
	it('is as its schema says, with revision, date and licence note', async () => {
		const published = await publishedRevision();
		const table = JSON.parse((await textOf(tableJson(db, {}, published))).text) as unknown;
		expect(wholeTableSchema.strict().parse(table)).toEqual(table);
		expect(table).toMatchObject({ revision: 1, date: published.date, filters: {} });
		const { rows } = table as { rows: { locator: string }[] };
		expect(rows).toHaveLength(OBSERVATIONS.length);
		expect(rows.find(({ locator }) => locator === 'percent')).toEqual({
			...observation({ locator: 'percent', country: 'CHN' }),
			...{ count: null, total: null, percent: 12.5 }
		});
	});

	it('is JSON where nothing fits, too', async () => {
		const { text } = await textOf(tableJson(db, { q: 'zzzz' }, await publishedRevision()));
		expect(JSON.parse(text)).toMatchObject({ rows: [], filters: { q: 'zzzz' } });
	});
});

describe('a table published anew while it is sent', () => {
	it('breaks off rather than mix two revisions', async () => {
		const pieces = tableCsv(db, {}, 1);
		await pieces.next();
		await pieces.next();
		const later = await TableRevision.create({
			at: new Date().toISOString(),
			why: 'Later.',
			seedDigest: null
		});
		await expect(pieces.next()).rejects.toThrow(/published anew/);
		await later.destroy();
	});
});
