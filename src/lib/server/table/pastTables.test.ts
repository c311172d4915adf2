import type { Sequelize } from 'sequelize';
import { beforeEach, expect, it } from 'vitest';
import { ada, bo, content, fakeEstimate } from '../../../../tests/support/deskTable';
import { temporaryDatabase } from '../../../../tests/support/database';
import { literature, observation } from '../../../../tests/support/madeUpLiterature';
import { askReview, createDraft, saveDraft } from './entryDrafts';
import { findTableRevision, pastCsv, pastJson } from './pastTables';
import { confirmEntry, publishDraft, withdrawEntry } from './publishing';
import { seedLiterature } from './seed';
import { listTableRevisions, tableRevisionOf } from './tableRecord';
import { publishedRevision, tableCsv, tableJson } from './wholeTable';

let db: Sequelize;

beforeEach(async () => {
	db = await temporaryDatabase();
	const observations = [
		observation({ note: 'a, "b"' }),
		observation({ category: '2-1', count: '', percent: '60' }),
		observation({ root: 'DB', provenance: 'memory', category: '1', count: '99', total: '' })
	];
	await seedLiterature(db, literature({ observations }));
});

async function all(pieces: AsyncGenerator<string>): Promise<string> {
	let text = '';
	for await (const piece of pieces) text += piece;
	return text;
}
const then = async (revision: number) => (await findTableRevision(revision))!;
const present = () => all(tableCsv(db, {}, 0 + revisions));
let revisions = 1;

/** Publishes a correction of the first entry, a new entry, a confirmation and a withdrawal; keeps the table of each revision. */
async function history(): Promise<string[]> {
	const tables = [await present()];
	const step = async (work: () => Promise<unknown>) => {
		await work();
		revisions++;
		tables.push(await present());
	};
	const settled = { person: bo, id: 0 };
	await saveDraft(db, 1, ada, { content: content({ total: 110 }), expected: 1 });
	await askReview(db, { id: 1, person: ada, expected: 2 }, '');
	await step(() => publishDraft(db, { ...settled, id: 1, expected: 3 }, '', fakeEstimate));
	const id = await createDraft(db, content({ root: 'P', country: 'BRA' }), ada);
	await askReview(db, { id, person: ada, expected: 1 }, '');
	await step(() => publishDraft(db, { ...settled, id, expected: 2 }, '', fakeEstimate));
	await step(() => confirmEntry(db, { ...settled, id: 2, expected: 1 }, 'table 9', fakeEstimate));
	await saveDraft(db, 1, ada, { content: content({ total: 120 }), expected: 4 });
	await step(() => withdrawEntry(db, { ...settled, id, expected: 3 }, 'Twice.', fakeEstimate));
	return tables;
}

it('the table of every revision can be put together again, and the newest is what is exported', async () => {
	revisions = 1;
	const tables = await history();
	expect(new Set(tables).size).toBe(5);
	for (const [index, table] of tables.entries())
		expect(await all(pastCsv(db, await then(index + 1)))).toBe(table);
	const newest = await publishedRevision();
	expect(newest.revision).toBe(5);
	expect(await all(pastJson(db, await then(5)))).toBe(await all(tableJson(db, {}, newest)));
	expect(await findTableRevision(6)).toBeNull();
});

it('the record says of each revision what changed and who checked it', async () => {
	revisions = 1;
	await history();
	const { revisions: record, next } = await listTableRevisions(db, { limit: 4 });
	expect(record.map(({ revision, who, author, changed }) => [revision, who, author, changed])).toEqual([
		[5, 'Bo Berg', null, 1],
		[4, 'Bo Berg', null, 1],
		[3, 'Bo Berg', 'Ada Aas', 1],
		[2, 'Bo Berg', 'Ada Aas', 1]
	]);
	expect(record[0].entries).toEqual([
		{
			entry: 3,
			change: 'withdrawn',
			tooth: 'maxillary-first-molar',
			root: 'P',
			measure: 'configuration',
			source: 'adams-2001'
		}
	]);
	expect(record.map(({ effects }) => effects.map(({ root }) => root))).toEqual([
		['P'],
		['DB'],
		['P'],
		['MB']
	]);
	expect(next).toBe(2);
	const { revisions: rest } = await listTableRevisions(db, { limit: 4, before: next! });
	expect(rest.map(({ revision, who, changed }) => [revision, who, changed])).toEqual([[1, null, 2]]);
	expect(await tableRevisionOf(db, 3)).toEqual(record[2]);
	expect(await tableRevisionOf(db, 9)).toBeNull();
});
