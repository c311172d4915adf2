import type { EntryContent } from '$lib/entry/content';
import type { Preview } from '$lib/entry/effect';
import { Source } from '../db/models/literature';
import { estimator } from '../inference/estimator';
import type { ObservationRow } from '../inference/types';
import { staysConfirmed, type EntryNow } from './entryState';
import { estimateRoots, placesOf } from './estimates';

/** An entry as the estimator would read it. */
function toRows(id: number, content: EntryContent, marks: Pick<ObservationRow, 'verified' | 'poolable'>) {
	const { figures, ...sample } = content;
	return figures.map(({ category, count, percent, note }): ObservationRow => ({
		...{ ...sample, ...marks, entry: id, category, count, percent, note }
	}));
}

/**
 * What publishing the draft of an entry would do, root by root: the present figures, those with the draft in the place of what is
 * published, and whether its sample lies where the others would have it.
 */
export async function previewOf(now: EntryNow): Promise<Preview[]> {
	const { entry, content, published, sample } = now;
	const places = placesOf([content, ...(published ? [published] : [])]);
	const source = await Source.findByPk(content.source, { rejectOnEmpty: true });
	const confirmed = entry.confirmed && published !== null && staysConfirmed(published, content);
	const added = toRows(entry.id, content, {
		verified: content.provenance !== 'memory' || confirmed,
		poolable: sample.poolable
	});
	const change = {
		added,
		sources: [{ id: source.id, citable: source.citable, year: source.year, retracted: source.retracted }],
		removed: [entry.id]
	};
	const present = await estimateRoots(places);
	const current = await estimator();
	const previews: Preview[] = [];
	for (const { tooth, root, figures: before } of present.roots) {
		const changed = await current.changed(change, { tooth, root, entry: entry.id });
		const { figures: after, checks, notPooled } = changed;
		previews.push({ tooth, root, before, after, checks, notPooled });
	}
	return previews;
}
