/** The actions of the desk as screen and API ask for them, with the mails that go with them. */
import type { Sequelize } from 'sequelize';
import type { Action } from '$lib/entry/workflow';
import { desk as words } from '$lib/strings/desk';
import { Problem } from '../api/problem';
import { mailPublished, mailReturned, mailReviewAsked } from './deskMail';
import { unknownEntry } from './deskProblem';
import {
	askReview,
	discardDraft,
	restoreRevision,
	returnDraft,
	takeBack,
	type DeskPerson
} from './entryDrafts';
import { readEntry, type EntryNow } from './entryState';
import { confirmEntry, markPoolable, publishDraft, withdrawEntry } from './publishing';

/** Reasons of a return or a withdrawal that say something. */
const SHORTEST_REASON = 3;

/** What an action needs beside the entry. */
export interface ActionRequest {
	action: Exclude<Action, 'save'>;
	id: number;
	person: DeskPerson;
	/** Number of the revision the person acts on. */
	expected: number;
	note?: string;
	reasons?: readonly string[];
	reason?: string;
	revision?: number;
	locator?: string;
	poolable?: boolean | null;
}

/**
 * Does it, and tells by mail whom it concerns.
 * @returns the revision of the table it made, or null
 * @throws Problem 403, 404, 409, or 422 where a reason or the like is missing, at its field
 */
export async function act(db: Sequelize, request: ActionRequest): Promise<number | null> {
	const { action, id, person, note = '' } = request;
	const now = await readEntry(id);
	if (!now) throw unknownEntry();
	const address = `/desk/entries/${id}`;
	switch (action) {
		case 'ask-review': {
			const editors = [...editorsOf(now), person.id];
			await askReview(db, request, note.trim());
			await mailReviewAsked(now.content, { address, author: person.name, editors, note });
			return null;
		}
		case 'return': {
			const reasons = (request.reasons ?? []).map((one) => one.trim()).filter(Boolean);
			if (reasons.length === 0) throw missing('reasons', words.needs.reasons);
			await returnDraft(db, request, reasons);
			await mailReturned(now.content, {
				...{ address, reasons, authorId: now.work!.authorId, reviewer: person.name }
			});
			return null;
		}
		case 'publish': {
			const { revision } = await publishDraft(db, request, note.trim());
			await mailPublished(now.content, {
				...{ address: `/table/${id}`, authorId: now.work!.authorId, reviewer: person.name }
			});
			return revision;
		}
		case 'take-back':
			await takeBack(db, request);
			return null;
		case 'discard':
			await discardDraft(db, request, request.reason?.trim() ?? '');
			return null;
		case 'restore':
			if (request.revision === undefined) throw missing('revision', words.needs.revision);
			await restoreRevision(db, id, person, { ...request, revision: request.revision });
			return null;
		case 'withdraw':
			return (await withdrawEntry(db, request, reasonOf(request))).revision;
		case 'confirm': {
			const locator = request.locator?.trim() ?? '';
			if (locator === '') throw missing('locator', words.needs.locator);
			return (await confirmEntry(db, request, locator)).revision;
		}
		case 'mark-poolable': {
			if (request.poolable === undefined) throw missing('poolable', words.needs.poolable);
			const mark = { poolable: request.poolable, reason: reasonOf(request) };
			return (await markPoolable(db, request, mark)).revision;
		}
	}
}

const editorsOf = ({ work }: EntryNow): string[] => (work ? (JSON.parse(work.editors) as string[]) : []);

const missing = (path: string, message: string) =>
	new Problem(422, 'Some values are missing or out of range.', [{ path, message }]);

function reasonOf({ reason }: ActionRequest): string {
	const text = reason?.trim() ?? '';
	if (text.length < SHORTEST_REASON) throw missing('reason', words.needs.reason);
	return text;
}
