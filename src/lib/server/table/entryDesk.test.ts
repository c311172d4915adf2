import type { Sequelize } from 'sequelize';
import { beforeEach, describe, expect, it } from 'vitest';
import { ada, bo, content, cy, fakeEstimate, figuresAt, student } from '../../../../tests/support/deskTable';
import { temporaryDatabase } from '../../../../tests/support/database';
import { literature, observation } from '../../../../tests/support/madeUpLiterature';
import { EntryWork, TableEffect } from '../db/models/desk';
import { Entry, Revision, Sample, TableRevision } from '../db/models/literature';
import { StaleEdit } from './deskProblem';
import {
	askReview,
	createDraft,
	discardDraft,
	restoreRevision,
	returnDraft,
	saveDraft,
	takeBack
} from './entryDrafts';
import { readEntry } from './entryState';
import {
	changeTable,
	confirmEntry,
	finishEffects,
	markPoolable,
	publishDraft,
	withdrawEntry
} from './publishing';
import { seedLiterature } from './seed';
import { readSnapshot, tableRevision } from './snapshot';

let db: Sequelize;
const shipped = literature({
	observations: [
		observation(),
		observation({ category: '2-1', count: '60' }),
		observation({ measure: 'canal-count', category: '2', count: '60' }),
		observation({ root: 'DB', provenance: 'memory', category: '1', count: '99' })
	]
});

beforeEach(async () => {
	db = await temporaryDatabase();
	await seedLiterature(db, shipped);
});

const now = async (id: number) => (await readEntry(id))!;
const numberOf = async (id: number) => (await now(id)).number;
const request = async (id: number, person = ada) => ({ id, person, expected: await numberOf(id) });
const status = (work: Promise<unknown>) =>
	work.then(
		() => 200,
		(problem: { status: number }) => problem.status
	);

/** A draft of Ada's, in review. */
async function inReview(change = content()): Promise<number> {
	const id = await createDraft(db, change, ada);
	await askReview(db, await request(id), 'Please look at the total.');
	return id;
}

const publish = async (id: number, person = bo) =>
	publishDraft(db, await request(id, person), '', fakeEstimate);

describe('a new entry', () => {
	it('stays out of the table until somebody else has published it', async () => {
		const before = await readSnapshot(db);
		const id = await inReview();
		expect(await readSnapshot(db)).toEqual(before);
		expect(await status(publish(id, ada))).toBe(403);
		const { revision, effects } = await publish(id);
		await effects;
		expect(revision).toBe(before.revision + 1);
		const after = await readSnapshot(db);
		expect(after.revision).toBe(revision);
		expect(
			after.rows.filter(({ entry }) => entry === id).map(({ category, count }) => [category, count])
		).toEqual([
			['1', 40],
			['2', 25],
			['2-1', 35]
		]);
		const last = (await Revision.findOne({ where: { entryId: id }, order: [['number', 'DESC']] }))!;
		expect([last.who, last.whoId, last.author]).toEqual(['Bo Berg', 'bo', 'Ada Aas']);
		const record = (await TableRevision.findByPk(revision))!;
		expect([record.who, record.author, record.lastRevision]).toEqual(['Bo Berg', 'Ada Aas', last.id]);
		const effect = (await TableEffect.findAll()).map(({ root, before: was, after: is }) => [
			root,
			JSON.parse(was) as unknown,
			JSON.parse(is!) as unknown
		]);
		expect(effect).toEqual([['MB', figuresAt(1), figuresAt(2)]]);
		expect(await EntryWork.count()).toBe(0);
	});

	it('is not published by anybody who wrote in it, the first or the last', async () => {
		const id = await createDraft(db, content(), ada);
		await saveDraft(db, id, bo, { content: content({ total: 101 }), expected: 1 });
		await saveDraft(db, id, cy, { content: content({ total: 102 }), expected: 2 });
		await askReview(db, await request(id), '');
		for (const person of [ada, bo, cy]) expect(await status(publish(id, person))).toBe(403);
		expect(await status(publish(id, { ...bo, id: 'dan' }))).toBe(200);
	});

	it('comes back with reasons, is mended and sent again', async () => {
		const id = await inReview();
		expect(await status(returnDraft(db, await request(id), ['mine']))).toBe(403);
		await returnDraft(db, await request(id, bo), ['The total is 120.', 'Which table?']);
		const { work } = await now(id);
		expect([work?.state, work?.reviewer, JSON.parse(work!.reasons!)]).toEqual([
			'draft',
			'Bo Berg',
			['The total is 120.', 'Which table?']
		]);
		await saveDraft(db, id, ada, { content: content({ total: 120 }), expected: await numberOf(id) });
		await askReview(db, await request(id), '');
		expect((await now(id)).work?.reasons).toBeNull();
		await publish(id);
		expect((await now(id)).published?.total).toBe(120);
	});

	it('can be taken back, put away and restored, and no revision is ever lost', async () => {
		const id = await inReview();
		expect(await status(takeBack(db, await request(id, bo)))).toBe(403);
		await takeBack(db, await request(id));
		await saveDraft(db, id, ada, { content: content({ country: 'BRA' }), expected: await numberOf(id) });
		await discardDraft(db, await request(id), '');
		expect((await now(id)).work).toBeNull();
		expect(await status(saveDraft(db, id, ada, { content: content(), expected: await numberOf(id) }))).toBe(
			409
		);
		await restoreRevision(db, id, bo, { revision: 1, expected: await numberOf(id) });
		expect((await now(id)).content).toEqual(content());
		const numbers = (await Revision.findAll({ where: { entryId: id }, order: ['number'] })).map(
			({ number }) => number
		);
		expect(numbers).toEqual([1, 2, 3, 4, 5, 6]);
	});

	it('may move to another source while it is a draft', async () => {
		await seedLiterature(
			db,
			literature({
				sources: [
					{ id: 'baker-2002', title: 'B', DOI: '10.1/b' },
					{ id: 'adams-2001', title: 'A', DOI: '10.1/a' }
				]
			})
		);
		const id = await createDraft(db, content(), ada);
		const { sample } = await now(id);
		await saveDraft(db, id, ada, { content: content({ source: 'baker-2002', total: 7 }), expected: 1 });
		const moved = await now(id);
		expect([moved.entry.sourceId, moved.sample.total, moved.content.source]).toEqual([
			'baker-2002',
			7,
			'baker-2002'
		]);
		expect(await Sample.findByPk(sample.id)).toBeNull();
	});

	it('is closed to those who are no educators', async () => {
		const id = await inReview();
		expect(await status(publish(id, student))).toBe(403);
		expect(await status(askReview(db, await request(id, student), ''))).toBe(403);
		expect(await status(saveDraft(db, id, student, { content: content(), expected: 2 }))).toBe(403);
	});
});

describe('a draft of a published entry', () => {
	it('stands beside it and replaces it when it is published; other entries of the sample keep theirs', async () => {
		const before = await readSnapshot(db);
		const { published, sample, number } = await now(1);
		const mended = { ...published!, total: 110 };
		await saveDraft(db, 1, ada, { content: mended, expected: number });
		expect(await readSnapshot(db)).toEqual(before);
		expect((await now(1)).published).toEqual(published);
		await askReview(db, await request(1), '');
		expect(await readSnapshot(db)).toEqual(before);
		await publish(1);
		const after = await readSnapshot(db);
		expect(after.rows.filter(({ entry }) => entry === 1).map(({ total }) => total)).toEqual([110, 110]);
		expect(after.rows.filter(({ entry }) => entry === 2).map(({ total }) => total)).toEqual([100]);
		expect((await now(1)).sample.id).not.toBe(sample.id);
		expect((await now(2)).sample.id).toBe(sample.id);
	});

	it('joins the row of a sample that is described the same', async () => {
		const { published, sample } = await now(2);
		const id = await inReview({
			...published!,
			measure: 'feature',
			figures: [{ ...published!.figures[0], category: 'mb2' }]
		});
		await publish(id);
		expect((await now(id)).sample.id).toBe(sample.id);
	});

	it('keeps the seed away from the entry', async () => {
		const { published, number } = await now(1);
		await saveDraft(
			db,
			1,
			{ ...ada, name: 'seed' },
			{ content: { ...published!, total: 110 }, expected: number }
		);
		await seedLiterature(db, literature({ observations: [observation({ count: '41' })] }));
		const after = await now(1);
		expect(after.published!.figures[0].count).toBe(40);
		expect(after.standing).toBe('published');
	});
});

describe('two people editing one entry', () => {
	it('the second is given both versions, and merges them', async () => {
		const id = await createDraft(db, content(), ada);
		const figures = content().figures;
		await saveDraft(db, id, ada, { content: content({ country: 'BRA', total: 100 }), expected: 1 });
		const mine = content({ total: 90, figures: [{ ...figures[0], count: 30 }, figures[1], figures[2]] });
		const stale = (await saveDraft(db, id, bo, { content: mine, expected: 1 }).catch(
			(error: unknown) => error
		)) as StaleEdit;
		expect(stale).toBeInstanceOf(StaleEdit);
		expect([stale.status, stale.number, stale.who]).toEqual([409, 2, 'Ada Aas']);
		expect(stale.clashes.map(({ part, proposed, conflict }) => [part, proposed, conflict])).toEqual([
			['country', 'theirs', false],
			['total', 'yours', false],
			['figure:1', 'yours', false]
		]);
		expect(await numberOf(id)).toBe(2);
		const choices = new Map([['total', 'theirs'] as const]);
		await saveDraft(db, id, bo, { content: mine, expected: 2, base: 1, choices });
		expect((await now(id)).content).toMatchObject({ country: 'BRA', total: 100 });
		expect((await now(id)).content.figures[0].count).toBe(30);
	});

	it('a revision that changed nothing of what it says stops nobody', async () => {
		const { published, number } = await now(1);
		await markPoolable(db, await request(1), { poolable: false, reason: 'Counts twins.' }, fakeEstimate);
		await saveDraft(db, 1, bo, { content: { ...published!, total: 120 }, expected: number });
		expect((await now(1)).content.total).toBe(120);
	});

	it('an action on an old revision is refused', async () => {
		const id = await inReview();
		const old = await request(id, bo);
		await takeBack(db, await request(id));
		await askReview(db, await request(id), '');
		expect(await status(publishDraft(db, old, '', fakeEstimate))).toBe(409);
	});
});

describe('the published table', () => {
	it('loses what is withdrawn, which can be restored as a draft', async () => {
		await withdrawEntry(db, await request(1), 'Counted twice.', fakeEstimate);
		expect((await readSnapshot(db)).rows.some(({ entry }) => entry === 1)).toBe(false);
		expect((await TableRevision.findOne({ order: [['id', 'DESC']] }))!.why).toContain('Counted twice.');
		await restoreRevision(db, 1, ada, { revision: 1, expected: await numberOf(1) });
		await askReview(db, await request(1), '');
		await publish(1);
		expect((await readSnapshot(db)).rows.some(({ entry }) => entry === 1)).toBe(true);
	});

	it('takes recalled figures once somebody has seen them, until they are changed', async () => {
		const verified = async () => (await readSnapshot(db)).rows.find(({ entry }) => entry === 3)!.verified;
		expect(await verified()).toBe(false);
		await confirmEntry(db, await request(3), 'table 5', fakeEstimate);
		expect(await verified()).toBe(true);
		expect((await now(3)).published!.locator).toBe('table 5');
		expect(await status(confirmEntry(db, await request(3), 'table 5', fakeEstimate))).toBe(409);
		const { published, number } = await now(3);
		await saveDraft(db, 3, ada, { content: { ...published!, total: 101 }, expected: number });
		await askReview(db, await request(3), '');
		await publish(3);
		expect(await verified()).toBe(false);
		expect(await status(confirmEntry(db, await request(3), 'table 5', fakeEstimate))).toBe(403);
		expect(await status(confirmEntry(db, await request(3, bo), 'table 5', fakeEstimate))).toBe(200);
	});

	it('follows an editor’s mark on a sample, for all its entries', async () => {
		await markPoolable(db, await request(1), { poolable: false, reason: 'Counts twins.' }, fakeEstimate);
		const marks = (await readSnapshot(db)).rows.map(({ entry, poolable }) => [entry, poolable]);
		expect(marks).toEqual([
			[1, false],
			[1, false],
			[2, false],
			[3, null]
		]);
		expect([await numberOf(1), await numberOf(2), await numberOf(3)]).toEqual([2, 2, 1]);
	});

	it('changes as a whole or not at all', async () => {
		const before = await readSnapshot(db);
		const failing = changeTable(
			db,
			[],
			async (transaction) => {
				await Entry.update({ state: 'withdrawn' }, { where: { id: 1 }, transaction });
				throw new Error('no');
			},
			fakeEstimate
		);
		await expect(failing).rejects.toThrow('no');
		expect(await readSnapshot(db)).toEqual(before);
	});

	it('looks again where another publication came between', async () => {
		let looks = 0;
		const { revision, effects } = await withdrawEntry(db, await request(1), 'Why not.', async (roots) => {
			const answer = await fakeEstimate(roots);
			if (looks++ === 0) await TableRevision.create({ at: new Date().toISOString(), why: 'Another.' });
			return answer;
		});
		await effects;
		expect(revision).toBe(3);
		const [effect] = await TableEffect.findAll();
		expect([effect.before, effect.after]).toEqual([
			JSON.stringify(figuresAt(2)),
			JSON.stringify(figuresAt(3))
		]);
	});

	it('has its effects completed by the next change where a start was cut short', async () => {
		const never = () => Promise.reject(new Error('stopped'));
		const cut: typeof fakeEstimate = async (roots) =>
			(await tableRevision()) === 1 ? fakeEstimate(roots) : never();
		await (
			await withdrawEntry(db, await request(1), 'One.', cut)
		).effects;
		expect((await TableEffect.findAll())[0].after).toBeNull();
		await (
			await withdrawEntry(db, await request(2), 'Two.', fakeEstimate)
		).effects;
		await finishEffects(fakeEstimate);
		expect((await TableEffect.findAll()).map(({ after }) => after)).toEqual([
			JSON.stringify(figuresAt(2)),
			JSON.stringify(figuresAt(3))
		]);
	});
});
