/** What changes the published table: each change makes a revision of it, in one short transaction, and says how far estimates moved. */
import { Op, type Sequelize, type Transaction } from 'sequelize';
import type { EntryContent } from '$lib/entry/content';
import { desk as words } from '$lib/strings/desk';
import { TableEffect } from '../db/models/desk';
import { Entry, Sample, TableRevision } from '../db/models/literature';
import { log } from '../log';
import { now } from '../people/secrets';
import { appendRevision, entryFor, writeFigures, type DeskPerson } from './entryDrafts';
import {
	entryColumns,
	readEntry,
	sampleColumns,
	staysConfirmed,
	type EntryNow,
	type Recorded
} from './entryState';
import { estimateRoots, placesOf, type Estimate, type Figures, type Place } from './estimates';
import { tableRevision } from './snapshot';

/** Other publications may come between the look at the estimates and the change; then the look is taken again. */
const MOST_TRIES = 5;

/** What a change writes into the record. */
interface Change {
	why: string;
	who: string;
	author?: string | null;
}

/** A change of the table that has been made. */
export interface Published {
	revision: number;
	/** Settled when the record says how far the estimates moved; never fails. */
	effects: Promise<void>;
}

/**
 * Changes the published table and keeps the record of it: the new revision, and how far the estimates of the affected roots moved. They
 * are worked out before and after the transaction, never inside it.
 * @param places the roots the change is about
 * @param change writes it; what it throws undoes everything
 */
export async function changeTable(
	db: Sequelize,
	places: readonly Place[],
	change: (transaction: Transaction) => Promise<Change>,
	estimate: Estimate = estimateRoots
): Promise<Published> {
	for (let tried = 1; ; tried++) {
		const before = await estimate(places);
		const revision = await db.transaction(async (transaction) => {
			const latest = (await TableRevision.max<number | null, TableRevision>('id', { transaction })) ?? 0;
			if (latest !== before.revision && tried < MOST_TRIES) return null;
			return recordTable(await change(transaction), before, transaction);
		});
		if (revision !== null) return { revision, effects: finishEffects(estimate) };
	}
}

/** Makes a revision of the table out of what the transaction has changed. */
async function recordTable({ why, who, author = null }: Change, before: Figures, transaction: Transaction) {
	const { id } = await TableRevision.create({ at: now(), why, who, author }, { transaction });
	await TableEffect.bulkCreate(
		before.roots.map(({ tooth, root, figures }) => ({
			...{ tableRevisionId: id, tooth, root, before: JSON.stringify(figures), after: null }
		})),
		{ transaction }
	);
	return id;
}

/**
 * Works out how far estimates moved, wherever the record does not say it yet: after a change, and after a start that was cut short before
 * it. A revision that is no longer the newest is completed only by the next one's beginning.
 */
export async function finishEffects(estimate: Estimate = estimateRoots): Promise<void> {
	try {
		const open = await TableEffect.findAll({ where: { after: null }, order: ['id'] });
		for (const effect of open) {
			const next = await TableEffect.findOne({
				where: {
					tooth: effect.tooth,
					root: effect.root,
					tableRevisionId: { [Op.gt]: effect.tableRevisionId }
				},
				order: ['tableRevisionId']
			});
			if (next && next.tableRevisionId === effect.tableRevisionId + 1) {
				await effect.update({ after: next.before });
				continue;
			}
			if ((await tableRevision()) !== effect.tableRevisionId) continue;
			const { revision, roots } = await estimate([effect]);
			if (revision === effect.tableRevisionId)
				await effect.update({ after: JSON.stringify(roots[0].figures) });
		}
	} catch (error) {
		log.error({ err: error }, 'how far estimates moved could not be worked out');
	}
}

interface Request {
	id: number;
	person: DeskPerson;
	/** Number of the revision the person acts on. */
	expected: number;
}

/** Publishes a draft that somebody else has written. */
export async function publishDraft(
	db: Sequelize,
	{ id, person, expected }: Request,
	note = '',
	estimate?: Estimate
): Promise<Published & { entry: EntryNow }> {
	const entry = await entryFor('publish', id, person, expected);
	const places = placesOf([entry.content, ...(entry.published ? [entry.published] : [])]);
	const published = await changeTable(
		db,
		places,
		async (transaction) => {
			const fresh = await entryFor('publish', id, person, expected, transaction);
			const { content, published: before, work, number } = fresh;
			const confirmed = fresh.entry.confirmed && before !== null && staysConfirmed(before, content);
			const sampleId = await sampleFor(fresh, transaction);
			await Entry.update(
				{ ...entryColumns(content), sampleId, state: 'published', confirmed },
				{ where: { id }, transaction }
			);
			await dropIfUnused(fresh.sample.id, transaction);
			await writeFigures([{ id, content }], transaction);
			const why = note || (before ? words.why.replaced : words.why.published);
			await appendRevision(
				id,
				number + 1,
				{ content, state: 'published', person, why, before, author: work!.author, more: { confirmed } },
				transaction
			);
			const author = work!.author;
			await work!.destroy({ transaction });
			return { why: words.record.published(id, before !== null), who: person.name, author };
		},
		estimate
	);
	return { ...published, entry };
}

/** The sample row of what is published: one a sample, so that a mark on it holds for all its entries. */
async function sampleFor({ sample, content, standing }: EntryNow, transaction: Transaction): Promise<number> {
	const columns = sampleColumns(content);
	const shared = await Sample.findAll({ where: columns, order: ['id'], transaction });
	const inUse = await Entry.findAll({
		where: { sampleId: shared.map(({ id }) => id), state: ['published', 'withdrawn'] },
		order: ['sampleId'],
		transaction
	});
	if (inUse.length > 0) return inUse[0].sampleId;
	if (standing === 'never') return sample.id;
	// A mark of an editor goes with the sample through a correction of its description.
	const { poolable, poolableReason } = sample;
	return (await Sample.create({ ...columns, poolable, poolableReason, seedKey: null }, { transaction })).id;
}

/** A sample without an entry is nothing; one of the shipped table is kept, because the seed knows it by its key. */
async function dropIfUnused(sampleId: number, transaction: Transaction): Promise<void> {
	if ((await Entry.count({ where: { sampleId }, transaction })) > 0) return;
	await Sample.destroy({ where: { id: sampleId, seedKey: null }, transaction });
}

/** Takes an entry out of the table, with the reason. A draft beside it stays. */
export async function withdrawEntry(
	db: Sequelize,
	{ id, person, expected }: Request,
	reason: string,
	estimate?: Estimate
): Promise<Published> {
	const entry = await entryFor('withdraw', id, person, expected);
	return changeTable(
		db,
		placesOf([entry.published!]),
		async (transaction) => {
			const { published, number } = await entryFor('withdraw', id, person, expected, transaction);
			await Entry.update({ state: 'withdrawn' }, { where: { id }, transaction });
			const before = published;
			await appendRevision(
				id,
				number + 1,
				{ content: published!, state: 'withdrawn', person, why: reason, before },
				transaction
			);
			return { why: words.record.withdrawn(id, reason), who: person.name };
		},
		estimate
	);
}

/**
 * Confirms recalled figures: somebody has seen them in the source.
 * @param locator where they stand
 */
export async function confirmEntry(
	db: Sequelize,
	{ id, person, expected }: Request,
	locator: string,
	estimate?: Estimate
): Promise<Published> {
	const entry = await entryFor('confirm', id, person, expected);
	return changeTable(
		db,
		placesOf([entry.published!]),
		async (transaction) => {
			const { published: before, number } = await entryFor('confirm', id, person, expected, transaction);
			await Entry.update({ locator, confirmed: true }, { where: { id }, transaction });
			const content: EntryContent = { ...before!, locator };
			const why = words.why.confirmed(locator);
			await appendRevision(
				id,
				number + 1,
				{ content, state: 'published', person, why, before, more: { confirmed: true } },
				transaction
			);
			return { why: words.record.confirmed(id), who: person.name };
		},
		estimate
	);
}

/**
 * Marks a sample to be pooled or not whatever its scope says, or leaves it to the scope again. It holds for all entries of the sample.
 * @param poolable null: as its scope says
 */
export async function markPoolable(
	db: Sequelize,
	{ id, person, expected }: Request,
	{ poolable, reason }: { poolable: boolean | null; reason: string },
	estimate?: Estimate
): Promise<Published> {
	const entry = await entryFor('mark-poolable', id, person, expected);
	return changeTable(
		db,
		placesOf([entry.published!]),
		async (transaction) => {
			const { sample } = await entryFor('mark-poolable', id, person, expected, transaction);
			await sample.update({ poolable, poolableReason: reason }, { transaction });
			const siblings = await Entry.findAll({
				attributes: ['id'],
				where: { sampleId: sample.id, state: 'published' },
				transaction
			});
			const more: Partial<Recorded> = { poolable, poolableReason: reason };
			for (const sibling of siblings) {
				const { published, number } = (await readEntry(sibling.id, transaction))!;
				const why = words.why.poolable(poolable, reason);
				await appendRevision(
					sibling.id,
					number + 1,
					{ content: published!, state: 'published', person, why, before: published, more },
					transaction
				);
			}
			return { why: words.record.poolable(id, poolable, reason), who: person.name };
		},
		estimate
	);
}
