import type { Sequelize } from 'sequelize';
import type { z } from 'zod';
import { checkEntry } from '$lib/entry/checks';
import { entryText, type EntryContent, type EntryText } from '$lib/entry/content';
import { checkContext } from '$lib/entry/context';
import type { Remark } from '$lib/entry/remarks';
import type { deskEntrySchema, EntryBody } from '$lib/schemas/entries';
import { numberOfPath } from '../api/ifMatch';
import { Problem } from '../api/problem';
import { contextFor } from './deskContext';
import { unknownEntry } from './deskProblem';
import { revisionsOf } from './entries';
import { readEntry, type EntryNow } from './entryState';

/** The body of a request as it would have been typed. */
function bodyText(body: EntryBody): EntryText {
	const written = (number: number | null | undefined) =>
		number === null || number === undefined ? '' : String(number);
	return {
		...body,
		total: written(body.total),
		figures: body.figures.map(({ category, count, percent, note = '' }) => ({
			...{ category, note, count: written(count), percent: written(percent) }
		}))
	};
}

/** Checks an entry against the table. */
async function checkAgainstTable(db: Sequelize, text: EntryText, self: number | null) {
	return checkEntry(text, checkContext(await contextFor(db, text, self)));
}

/**
 * Checks an entry that a program sent.
 * @throws Problem 422 at each field that is wrong
 */
export async function contentOfBody(
	db: Sequelize,
	body: EntryBody,
	self: number | null
): Promise<EntryContent> {
	const { content, remarks } = await checkAgainstTable(db, bodyText(body), self);
	if (!content) throw new Problem(422, 'Some values are missing or out of range.', errorsOf(remarks));
	return content;
}

const errorsOf = (remarks: readonly Remark[]) =>
	remarks.filter(({ level }) => level === 'error').map(({ path, message }) => ({ path, message }));

/**
 * An entry that an address names.
 * @throws Problem 404
 */
export async function existingEntry(name: string): Promise<EntryNow & { id: number }> {
	const id = numberOfPath(name);
	const now = id === null ? null : await readEntry(id);
	if (!now) throw unknownEntry();
	return { ...now, id: now.entry.id };
}

/** An entry in the shape of the API, for those who work on it. */
export async function deskEntryDto(
	db: Sequelize,
	id: number,
	tableRevision: number | null
): Promise<z.infer<typeof deskEntrySchema>> {
	const now = await readEntry(id);
	if (!now) throw unknownEntry();
	const { work, content, number, standing } = now;
	const { remarks } = await checkAgainstTable(db, entryText(content), id);
	return {
		...{ id, revision: number, standing, content, remarks, tableRevision },
		draft: work && {
			...{ state: work.state, author: work.author, reviewer: work.reviewer ?? null },
			reasons: work.reasons ? (JSON.parse(work.reasons) as string[]) : []
		},
		revisions: await revisionsOf(id)
	};
}
