import fc from 'fast-check';
import { QueryTypes, type Sequelize } from 'sequelize';
import { beforeAll, describe, expect, it } from 'vitest';
import { temporaryDatabase } from '../../../../tests/support/database';
import { cslSource, literature, observation } from '../../../../tests/support/madeUpLiterature';
import { seedLiterature } from '../table/seed';
import { Entry, Figure, Sample, Source } from './models/literature';
import { migration } from './migrations/2026.12.02T10.00.00.tableIndex';

let db: Sequelize;
beforeAll(async () => {
	db = await temporaryDatabase();
	const observations = Array.from({ length: 12 }, (_, index) =>
		observation({
			source_id: ['adams-2001', 'baker-2010'][index % 2],
			locator: `table ${index}`,
			note: `note${index}`
		})
	);
	await seedLiterature(
		db,
		literature({ sources: [cslSource('adams-2001'), cslSource('baker-2010')], observations })
	);
});

const WORDS = ['birch', 'alder', 'willow', 'ashen'];
const rows = (sql: string) => db.query<Record<string, unknown>>(sql, { type: QueryTypes.SELECT });

/** All that the index holds: its rows, and the rows each word finds. */
async function contents() {
	const found = async (table: string) =>
		Promise.all(
			[...WORDS, 'adams', 'baker', 'note3', 'MB', 'DB'].map((word) =>
				rows(`SELECT rowid FROM ${table} WHERE ${table} MATCH '${word}' ORDER BY rowid`)
			)
		);
	return {
		sources: await rows('SELECT source_id, author, authors, title, year FROM source_row ORDER BY source_id'),
		entries: await rows('SELECT * FROM entry_row ORDER BY entry_id'),
		entryWords: await found('entry_search'),
		sourceWords: (await found('source_search')).map((list) => list.length)
	};
}

/** The index made anew, as the migration makes it over a table that is there already. */
async function rebuild() {
	for (const name of ['source_search', 'entry_search', 'source_row', 'entry_row'])
		await db.query(`DELETE FROM ${name}`);
	for (const statement of migration.up.filter((sql) => /^\s*INSERT/.test(sql))) await db.query(statement);
}

const word = fc.constantFrom(...WORDS);
const entryId = fc.integer({ min: 1, max: 12 });
const change = fc.oneof(
	fc.record({ kind: fc.constant('title' as const), word, id: fc.constantFrom('adams-2001', 'baker-2010') }),
	fc.record({ kind: fc.constant('author' as const), word, id: fc.constantFrom('adams-2001', 'baker-2010') }),
	fc.record({ kind: fc.constant('scope' as const), word, id: entryId }),
	fc.record({ kind: fc.constant('locator' as const), word, id: entryId }),
	fc.record({ kind: fc.constant('withdrawn' as const), id: entryId }),
	fc.record({ kind: fc.constant('note' as const), word, id: entryId }),
	fc.record({ kind: fc.constant('figures' as const), word, id: entryId })
);
type Change = typeof change extends fc.Arbitrary<infer T> ? T : never;

async function apply(one: Change) {
	if (one.kind === 'title') await Source.update({ title: one.word }, { where: { id: one.id } });
	if (one.kind === 'author') {
		const csl = JSON.stringify(cslSource(one.id, { author: [{ family: one.word }] }));
		await Source.update({ csl }, { where: { id: one.id } });
	}
	if (one.kind === 'scope')
		await Sample.update(
			{ scope: one.word, root: 'DB', total: 7 },
			{ where: { id: (await Entry.findByPk(one.id))!.sampleId } }
		);
	if (one.kind === 'locator') await Entry.update({ locator: one.word }, { where: { id: one.id } });
	if (one.kind === 'withdrawn') await Entry.update({ state: 'withdrawn' }, { where: { id: one.id } });
	if (one.kind === 'note') await Figure.update({ note: one.word }, { where: { entryId: one.id } });
	if (one.kind === 'figures') {
		await Figure.destroy({ where: { entryId: one.id } });
		const shared = { entryId: one.id, count: 1, percent: null, countDerived: false };
		await Figure.bulkCreate([{ ...shared, position: 0, category: one.word, note: '' }]);
	}
}

describe('the index of the table', () => {
	it('is kept true by its triggers, whatever is written: as one made anew', async () => {
		await fc.assert(
			fc.asyncProperty(fc.array(change, { minLength: 1, maxLength: 6 }), async (changes) => {
				for (const one of changes) await apply(one);
				const kept = await contents();
				await rebuild();
				expect(kept).toEqual(await contents());
			}),
			{ numRuns: 25 }
		);
	});

	it('forgets a source that goes', async () => {
		await Source.create({
			...(await Source.findByPk('adams-2001'))!.get({ plain: true }),
			id: 'brief',
			title: 'sycamore'
		});
		expect(await rows("SELECT rowid FROM source_search WHERE source_search MATCH 'sycamore'")).toHaveLength(
			1
		);
		await Source.destroy({ where: { id: 'brief' } });
		expect(await rows("SELECT rowid FROM source_search WHERE source_search MATCH 'sycamore'")).toEqual([]);
		expect(await rows("SELECT id FROM source_row WHERE source_id = 'brief'")).toEqual([]);
	});

	it('sorts accented names with plain ones, and a source without authors under its title', async () => {
		const names = ['Ørsted', 'Çelik', 'Adams', 'Zhou', 'İnan', 'Oak', ''];
		await Source.bulkCreate(
			names.map((family, index) => ({
				...Source.build().get({ plain: true }),
				id: `sorted-${index}`,
				csl: JSON.stringify({ id: 'x', author: family ? [{ family }] : [] }),
				title: '[“Mill streams”, title not seen]',
				type: 'book',
				citable: true,
				authorsKnown: true,
				retracted: false
			}))
		);
		const sorted = await rows(
			"SELECT authors FROM source_row WHERE source_id LIKE 'sorted-%' ORDER BY author"
		);
		expect(sorted.map(({ authors }) => authors)).toEqual([
			'Adams',
			'Çelik',
			'İnan',
			'',
			'Oak',
			'Ørsted',
			'Zhou'
		]);
	});
});
