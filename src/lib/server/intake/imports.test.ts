import { stringify } from 'csv-stringify/sync';
import type { Sequelize } from 'sequelize';
import { afterAll, beforeEach, describe, expect, it, vi } from 'vitest';
import { temporaryDatabase, temporaryFolder } from '../../../../tests/support/database';
import { cslSource, literature, observation } from '../../../../tests/support/madeUpLiterature';
import { environment } from '../config';
import { EntryWork } from '../db/models/desk';
import type { TableImport } from '../db/models/intake';
import { Entry, Figure, Revision, Sample, TableRevision } from '../db/models/literature';
import { Audit } from '../db/models/people';
import { readLiteratureFiles } from '../table/literatureFiles';
import { seedLiterature } from '../table/seed';
import type { Estimate } from '../table/estimates';
import { tableRevision } from '../table/snapshot';
import { tableCsv } from '../table/wholeTable';
import {
	cancelImport,
	findImport,
	progressOf,
	readImport,
	recoverImports,
	startImport,
	takeUpload
} from './imports';
import { COLUMNS } from './mapping';
import { kindOf } from './reader';
import { writeEntries } from './writeImport';

/** Estimates are the estimator's own tests' matter. */
const still: Estimate = async () => ({ revision: await tableRevision(), roots: [] });
const person = { id: 'ida', name: 'Ida Editor' };
let db: Sequelize;

beforeEach(async () => {
	environment.DATA_DIR = temporaryFolder();
	db = await temporaryDatabase();
	await seedLiterature(db, literature({ sources: [cslSource('adams-2001')], observations: [observation()] }));
});
afterAll(() => vi.restoreAllMocks());

const csvOf = (rows: Record<string, string>[]) =>
	Buffer.from(stringify([[...COLUMNS], ...rows.map((row) => COLUMNS.map((column) => row[column] ?? ''))]));
const newRows = (count: number) =>
	Array.from({ length: count }, (_, index) =>
		observation({ locator: `table ${index + 10}`, note: `row ${index}` })
	);

async function upload(bytes: Buffer): Promise<TableImport> {
	const taken = await takeUpload(person, { name: 'mine.csv', bytes });
	if ('failure' in taken) throw new Error(taken.failure);
	return (await findImport(person.id, taken.id))!;
}

async function ended(row: TableImport) {
	await vi.waitFor(
		async () => {
			await row.reload();
			expect(['done', 'failed', 'cancelled']).toContain(row.state);
			expect(progressOf(row.id).total).toBe(0);
		},
		{ timeout: 20_000, interval: 20 }
	);
	return row.state;
}
const counts = async () => [
	await Entry.count(),
	await Sample.count(),
	await Figure.count(),
	await Revision.count()
];

describe('an import', () => {
	it('writes its entries as published ones, each with a revision, and moves the table once', async () => {
		const row = await upload(csvOf([...newRows(300), observation()]));
		const answer = await readImport(db, row);
		expect(answer).toMatchObject({
			preview: { rows: 301, fresh: 300, already: { total: 1 }, problems: { total: 0 } }
		});
		const revisions = await TableRevision.count();
		expect(await startImport(db, row, person, true, still)).toBeNull();
		expect(await ended(row)).toBe('done');
		expect(await Entry.count({ where: { state: 'published' } })).toBe(301);
		expect(await TableRevision.count()).toBe(revisions + 1);
		const revision = await Revision.findOne({ where: { who: person.name } });
		expect(JSON.parse(revision!.after!)).toMatchObject({
			...{ state: 'published', source: 'adams-2001', tooth: 'maxillary-first-molar', total: 100 },
			figures: [{ category: '1', count: 40, countDerived: false }]
		});
		expect(await Audit.count({ where: { action: 'table imported', actorId: 'ida' } })).toBe(1);
		// The same file again brings nothing.
		const again = await upload(csvOf(newRows(300)));
		expect(await startImport(db, again, person, true, still)).toBe('nothing new');
	});

	it('as drafts leaves the published table as it is', async () => {
		const row = await upload(csvOf(newRows(5)));
		const revisions = await TableRevision.count();
		await startImport(db, row, person, false, still);
		expect(await ended(row)).toBe('done');
		expect(await Entry.count({ where: { state: 'draft' } })).toBe(5);
		expect(await EntryWork.count({ where: { authorId: 'ida', state: 'draft' } })).toBe(5);
		// Each has a sample of its own, which its edits may change.
		expect(await Sample.count()).toBe(6);
		const again = await readImport(db, await upload(csvOf(newRows(1))));
		expect(again).toMatchObject({
			preview: { problems: { total: 1, first: [{ message: expect.stringMatching(/draft/) as string }] } }
		});
		expect(await TableRevision.count()).toBe(revisions);
	});

	it('of an entry that stands otherwise in the table is refused, with its number', async () => {
		const row = await upload(csvOf([...newRows(2), observation({ count: '41' })]));
		const answer = await readImport(db, row);
		if (!('preview' in answer)) throw new Error(answer.unreadable);
		expect(answer.preview.problems.first).toMatchObject([{ row: 4, column: 'source_id' }]);
		const { id } = (await Entry.findOne())!;
		expect(answer.preview.problems.first[0].message).toContain(`entry ${id}`);
		expect(await startImport(db, row, person, true, still)).toBe('problems');
		expect(await counts()).toEqual([1, 1, 1, 1]);
	});

	it('that is cancelled leaves nothing behind', async () => {
		const row = await upload(csvOf(newRows(2_000)));
		expect(await startImport(db, row, person, true, still)).toBeNull();
		expect(await startImport(db, row, person, true, still)).toBe('busy');
		await vi.waitFor(() => expect(progressOf(row.id).written).toBeGreaterThan(0), { timeout: 20_000 });
		expect(await Entry.count()).toBeGreaterThan(1);
		expect(await cancelImport(row)).toBe(true);
		expect(await ended(row)).toBe('cancelled');
		expect(await counts()).toEqual([1, 1, 1, 1]);
	});

	it('that fails half way leaves nothing behind', async () => {
		// The database itself refuses one row far down.
		await db.query(
			`CREATE TRIGGER refuse BEFORE INSERT ON figure WHEN new.note = 'row 900' BEGIN SELECT RAISE(ABORT, 'disk full'); END`
		);
		const row = await upload(csvOf(newRows(1_000)));
		await startImport(db, row, person, true, still);
		expect(await ended(row)).toBe('failed');
		expect(row.message).toMatch(/Nothing was kept/);
		expect(await counts()).toEqual([1, 1, 1, 1]);
	});

	it('cut short by the end of the server is undone, or carried to its end, by the next start', async () => {
		const row = await upload(csvOf(newRows(200)));
		const answer = await readImport(db, row);
		if (!('preview' in answer)) throw new Error(answer.unreadable);
		const job = { id: row.id, publish: true, person, why: 'Imported.' };
		const write = () => writeEntries(db, job, answer.entries, new AbortController().signal, () => {});
		await write();
		await row.update({ state: 'writing' });
		await recoverImports(db, still);
		expect(await ended(row)).toBe('failed');
		expect(await counts()).toEqual([1, 1, 1, 1]);

		await write();
		await row.update({ state: 'finishing', publish: true });
		await recoverImports(db, still);
		expect(await ended(row)).toBe('done');
		expect(await Entry.count({ where: { state: 'published' } })).toBe(201);
	});

	it('of somebody else is not there', async () => {
		const row = await upload(csvOf(newRows(1)));
		expect(await findImport('somebody', row.id)).toBeNull();
	});
});

describe('a table that is exported and imported', () => {
	it('is the same table', async () => {
		const text = async () => {
			let all = '';
			for await (const piece of tableCsv(db, {}, await TableRevision.max<number, TableRevision>('id')))
				all += piece;
			return all;
		};
		const files = await readLiteratureFiles('data/literature');
		db = await temporaryDatabase();
		await seedLiterature(db, files);
		const exported = await text();
		db = await temporaryDatabase();
		await seedLiterature(db, { ...files, observations: [] });
		const row = await upload(Buffer.from(exported));
		expect(await startImport(db, row, person, true, still)).toBeNull();
		expect(await ended(row)).toBe('done');
		expect(await text()).toBe(exported);
	});
});

describe('what is uploaded', () => {
	it.each([
		['nothing', Buffer.alloc(0), /empty/],
		[
			'an executable',
			Buffer.concat([Buffer.from('\x7fELF\x02\x01\x01'), Buffer.alloc(200)]),
			/another kind \(elf\)/
		],
		['a PDF', Buffer.from('%PDF-1.7\n'), /another kind \(pdf\)/],
		[
			'an old spreadsheet',
			Buffer.concat([Buffer.from('d0cf11e0a1b11ae1', 'hex'), Buffer.alloc(600)]),
			/old kind/
		],
		['too much', Buffer.alloc(20 * 1024 * 1024 + 1, 'a'), /larger than 20 MB/]
	])('as a table but is %s is refused', async (_, bytes, sentence) => {
		const kind = await kindOf(bytes);
		expect('failure' in kind && kind.failure).toMatch(sentence);
	});
});
