/** Drafts of entries, new or beside what is published, until a second person publishes or returns them. */
import type { Sequelize, Transaction } from 'sequelize';
import type { Role } from '$lib/schemas/terms';
import type { EntryContent } from '$lib/entry/content';
import { clashes, differences, merge, type Part, type Side } from '$lib/entry/difference';
import { hindrance, type Action } from '$lib/entry/workflow';
import { desk as words } from '$lib/strings/desk';
import { EntryWork } from '../db/models/desk';
import { Entry, Figure, Revision, Sample } from '../db/models/literature';
import { now } from '../people/secrets';
import { hindered, StaleEdit, unknownEntry } from './deskProblem';
import {
	contentOf,
	entryColumns,
	readEntry,
	sampleColumns,
	situationOf,
	type EntryNow,
	type Recorded
} from './entryState';

/** Who does something at the desk. */
export interface DeskPerson {
	id: string;
	name: string;
	roles: readonly Role[];
}

/** What a new revision says. */
interface NewRevision {
	content: EntryContent;
	state: Recorded['state'];
	person: DeskPerson;
	why: string;
	before: EntryContent | null;
	author?: string | null;
	more?: Partial<Recorded>;
}

/**
 * Writes the next revision of an entry.
 * @returns its number
 */
export async function appendRevision(
	entryId: number,
	number: number,
	{ content, state, person, why, before, author = null, more = {} }: NewRevision,
	transaction: Transaction
): Promise<number> {
	await Revision.create(
		{
			...{ entryId, number, at: now(), who: person.name, whoId: person.id, author, why },
			before: before && JSON.stringify(before),
			after: JSON.stringify({ state, ...content, ...more } satisfies Recorded)
		},
		{ transaction }
	);
	return number;
}

/**
 * Reads an entry for an action.
 * @param expected number of the revision the person acts on
 * @throws Problem 404 unknown, 403 or 409 if the rules forbid it; StaleEdit if somebody has saved meanwhile
 */
export async function entryFor(
	action: Action,
	id: number,
	person: DeskPerson,
	expected: number,
	transaction?: Transaction
): Promise<EntryNow> {
	const now = await readEntry(id, transaction);
	if (!now) throw unknownEntry();
	const why = hindrance(action, situationOf(now), person);
	if (why === 'role') throw hindered(why);
	if (now.number !== expected) throw new StaleEdit([], now.content, now.number, now.who);
	if (why) throw hindered(why);
	return now;
}

/** An entry nobody has seen published yet. */
interface NewEntry {
	content: EntryContent;
	why?: string;
}

/**
 * Writes new entries as drafts, or as published (which only an administrator's import does, and which needs `recordTable` afterwards).
 * A few hundred at a time: all in one transaction of the caller's.
 * @returns their ids, in the order given
 * @public for the import
 */
export async function createEntries(
	entries: readonly NewEntry[],
	person: Pick<DeskPerson, 'id' | 'name'>,
	{ publish = false }: { publish?: boolean },
	transaction: Transaction
): Promise<number[]> {
	let nextSample = ((await Sample.max<number | null, Sample>('id', { transaction })) ?? 0) + 1;
	let nextEntry = ((await Entry.max<number | null, Entry>('id', { transaction })) ?? 0) + 1;
	const rows = entries.map(({ content, why = words.why.created }) => ({
		...{ content, why, id: nextEntry++, sampleId: nextSample++ }
	}));
	const state = publish ? ('published' as const) : ('draft' as const);
	await Sample.bulkCreate(
		rows.map(({ content, sampleId }) => ({
			...{ ...sampleColumns(content), id: sampleId, poolable: null, seedKey: null }
		})),
		{ transaction }
	);
	await Entry.bulkCreate(
		rows.map(({ content, id, sampleId }) => ({
			...{ ...entryColumns(content), id, sampleId, state, confirmed: false, seedKey: null, seedHash: null }
		})),
		{ transaction }
	);
	if (publish) await writeFigures(rows, transaction);
	await Revision.bulkCreate(
		rows.map(({ content, why, id }) => ({
			...{ entryId: id, number: 1, at: now(), who: person.name, whoId: person.id, author: null, why },
			before: null,
			after: JSON.stringify({ state, ...content } satisfies Recorded)
		})),
		{ transaction }
	);
	if (!publish)
		await EntryWork.bulkCreate(
			rows.map(({ id }) => newWork(id, person, 1)),
			{ transaction }
		);
	return rows.map(({ id }) => id);
}

/** Replaces the figures of entries. */
export async function writeFigures(
	rows: readonly { id: number; content: EntryContent }[],
	transaction: Transaction
): Promise<void> {
	await Figure.destroy({ where: { entryId: rows.map(({ id }) => id) }, transaction });
	await Figure.bulkCreate(
		rows.flatMap(({ id, content }) =>
			content.figures.map((figure, position) => ({ ...figure, entryId: id, position }))
		),
		{ transaction }
	);
}

const newWork = (entryId: number, person: Pick<DeskPerson, 'id' | 'name'>, number: number) => ({
	...{ entryId, number, state: 'draft' as const, authorId: person.id, author: person.name, at: now() },
	editors: JSON.stringify([person.id])
});

/** Makes a draft of a new entry. */
export async function createDraft(db: Sequelize, content: EntryContent, person: DeskPerson): Promise<number> {
	return db.transaction(async (transaction) => {
		const [id] = await createEntries([{ content }], person, {}, transaction);
		return id;
	});
}

interface Save {
	content: EntryContent;
	/** The revision the edit began from. */
	expected: number;
	/** Whose version of each part stands, once somebody has been asked; then `expected` is the other's revision and `base` the own one. */
	choices?: ReadonlyMap<Part, Side>;
	base?: number;
}

/**
 * Saves a draft; of a published entry beside it. Where somebody has changed the content since the edit began, nothing is saved: the two
 * versions are handed back to choose from.
 * @returns the number of the new revision
 * @throws StaleEdit with the parts in which the two differ; Problem 404 unknown, 403 or 409 if the rules forbid it
 */
export async function saveDraft(
	db: Sequelize,
	id: number,
	person: DeskPerson,
	{ content, expected, choices, base }: Save
): Promise<number> {
	return db.transaction(async (transaction) => {
		const entry = await readEntry(id, transaction);
		if (!entry) throw unknownEntry();
		const why = hindrance('save', situationOf(entry), person);
		if (why) throw hindered(why);
		let saved = content;
		if (choices && base !== undefined) {
			const began = await contentAt(id, base, transaction);
			if (entry.number !== expected) throw stale(entry, began, content);
			saved = merge(began, content, entry.content, choices);
		} else if (entry.number !== expected) {
			const began = await contentAt(id, expected, transaction);
			// A revision that moved the entry on without changing what it says is no reason to ask anybody.
			const changed = differences(began, entry.content).length > 0;
			if (changed && differences(content, entry.content).length > 0) throw stale(entry, began, content);
		}
		return writeDraft(entry, saved, person, words.why.saved, transaction);
	});
}

const stale = (entry: EntryNow, base: EntryContent, yours: EntryContent) =>
	new StaleEdit(clashes(base, yours, entry.content), entry.content, entry.number, entry.who);

/** What an edit that began at a revision began from. */
async function contentAt(id: number, number: number, transaction?: Transaction): Promise<EntryContent> {
	const revision = await Revision.findOne({ where: { entryId: id, number }, transaction });
	const content = contentOf(revision?.after ?? null);
	if (!content) throw unknownEntry();
	return content;
}

/** Makes a content the draft of an entry. */
async function writeDraft(
	{ entry, content: before, work, standing, number, sample }: EntryNow,
	content: EntryContent,
	person: DeskPerson,
	why: string,
	transaction: Transaction
): Promise<number> {
	const next = await appendRevision(
		entry.id,
		number + 1,
		{ content, state: 'draft', person, why, before },
		transaction
	);
	if (work) {
		const editors = [...new Set([...(JSON.parse(work.editors) as string[]), person.id])];
		await work.update(
			{ number: next, state: 'draft', editors: JSON.stringify(editors), at: now() },
			{ transaction }
		);
	} else {
		await EntryWork.create(newWork(entry.id, person, next), { transaction });
	}
	// A new entry's rows follow its draft, so that lists and searches of the desk find it.
	if (standing === 'never') {
		await entry.update(entryColumns(content), { transaction, fields: ['locator', 'measure', 'provenance'] });
		if (entry.sourceId === content.source) await sample.update(sampleColumns(content), { transaction });
		else {
			const own = await Sample.create(
				{ ...sampleColumns(content), poolable: null, seedKey: null },
				{ transaction }
			);
			await Entry.update(
				{ sampleId: own.id, sourceId: content.source },
				{ where: { id: entry.id }, transaction }
			);
			await sample.destroy({ transaction });
		}
	}
	return next;
}

/** Makes an old state of an entry its draft; nothing is lost, the present one stays among the revisions. */
export async function restoreRevision(
	db: Sequelize,
	id: number,
	person: DeskPerson,
	{ revision, expected }: { revision: number; expected: number }
): Promise<number> {
	return db.transaction(async (transaction) => {
		const entry = await entryFor('restore', id, person, expected, transaction);
		const content = await contentAt(id, revision, transaction);
		return writeDraft(entry, content, person, words.why.restored(revision), transaction);
	});
}

/** A step of the work that changes no content. */
async function step(
	db: Sequelize,
	action: Action,
	{ id, person, expected }: { id: number; person: DeskPerson; expected: number },
	change: (
		entry: EntryNow,
		work: EntryWork
	) => { state: Recorded['state']; why: string; work: Partial<EntryWork> | null }
): Promise<EntryNow> {
	return db.transaction(async (transaction) => {
		const entry = await entryFor(action, id, person, expected, transaction);
		const { content, number } = entry;
		const work = entry.work!;
		const { state, why, work: columns } = change(entry, work);
		const before = content;
		const next = await appendRevision(id, number + 1, { content, state, person, why, before }, transaction);
		if (columns) await work.update({ ...columns, number: next, at: now() }, { transaction });
		else await work.destroy({ transaction });
		return { ...entry, number: next };
	});
}

interface StepRequest {
	id: number;
	person: DeskPerson;
	expected: number;
}

/** Sends a draft to a second person. */
export const askReview = (db: Sequelize, request: StepRequest, note: string) =>
	step(db, 'ask-review', request, () => ({
		...{ state: 'in-review', why: note || words.why.asked },
		work: { state: 'in-review', note, reasons: null }
	}));

/** Takes it back before anybody has judged it. */
export const takeBack = (db: Sequelize, request: StepRequest) =>
	step(db, 'take-back', request, () => ({
		...{ state: 'draft', why: words.why.takenBack },
		work: { state: 'draft' }
	}));

/**
 * Returns it to its author.
 * @param reasons at least one
 */
export const returnDraft = (db: Sequelize, request: StepRequest, reasons: readonly string[]) =>
	step(db, 'return', request, () => ({
		...{ state: 'draft', why: words.why.returned(reasons) },
		work: {
			state: 'draft',
			reasons: JSON.stringify(reasons),
			reviewerId: request.person.id,
			reviewer: request.person.name
		}
	}));

/** Puts a draft away. It stays among the revisions and can be restored. */
export const discardDraft = (db: Sequelize, request: StepRequest, why: string) =>
	step(db, 'discard', request, () => ({ state: 'discarded', why: why || words.why.discarded, work: null }));
