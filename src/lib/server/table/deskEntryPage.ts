import type { Sequelize } from 'sequelize';
import { entryText, type EntryContent } from '$lib/entry/content';
import { differences } from '$lib/entry/difference';
import { allowedActions } from '$lib/entry/workflow';
import { Revision } from '../db/models/literature';
import { contextFor } from './deskContext';
import { sourceSuggestions } from './deskForm';
import { existingEntry } from './deskEntry';
import type { DeskPerson } from './entryDrafts';
import { contentOf, situationOf, type EntryNow, type Recorded } from './entryState';
import { previewOf } from './entryPreview';

/**
 * Everything the page of an entry shows to somebody who works on it.
 * @param wanted whether the look before publishing is asked for; a reviewer sees it anyway
 */
export async function readEntryPage(db: Sequelize, name: string, person: DeskPerson, wanted: boolean) {
	const now = await existingEntry(name);
	const { id, content, number, standing, work, published, sample, entry } = now;
	const situation = situationOf(now);
	const actions = allowedActions(situation, person);
	const text = entryText(content);
	const look = work !== null && (wanted || work.state === 'in-review');
	return {
		...{ id, number, standing, text, actions, content },
		context: await contextFor(db, text, id),
		sources: await sourceSuggestions(),
		work: work && workDto(work, person),
		beside: work !== null && published !== null,
		changed: work && published ? differences(published, content) : [],
		unverified: situation.unverified === true,
		confirmed: entry.confirmed,
		pooling: { poolable: sample.poolable, reason: sample.poolableReason ?? '' },
		previews: look ? await previewOf(now) : null,
		revisions: await history(id)
	};
}

function workDto(work: NonNullable<EntryNow['work']>, person: DeskPerson) {
	const { state, author, reviewer, note, reasons } = work;
	return {
		...{ state, author, note, reviewer: reviewer ?? null },
		reasons: reasons ? (JSON.parse(reasons) as string[]) : [],
		own: (JSON.parse(work.editors) as string[]).includes(person.id)
	};
}

/** Revisions, the newest first, each with what it changed. */
async function history(id: number) {
	const revisions = await Revision.findAll({ where: { entryId: id }, order: [['number', 'DESC']] });
	return revisions.map(({ number, at, who, why, before, after }) => {
		const is = contentOf(after);
		return {
			...{ number, at, who, why, restorable: is !== null },
			state: after === null ? '' : (JSON.parse(after) as Recorded).state,
			differences: is && compare(contentOf(before), is)
		};
	});
}

/** What changed; null for a first state. */
const compare = (before: EntryContent | null, after: EntryContent) => before && differences(before, after);
