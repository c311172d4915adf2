/** What of a file the table has already. */
import { QueryTypes, type Sequelize } from 'sequelize';
import type { EntryContent } from '$lib/entry/content';
import { entryKey, type PlannedEntry } from './checkRows';

/** Sources compared between two looks at what else waits. */
const CHUNK_SOURCES = 40;

/** A planned entry that stands in the table with other figures. */
interface Clash {
	planned: PlannedEntry;
	entry: number;
	/** It is on the desk and not in the table yet. */
	draft: boolean;
}

export interface Comparison {
	fresh: PlannedEntry[];
	/** Entries that stand in the table just so: nothing needs doing. */
	already: PlannedEntry[];
	clashes: Clash[];
}

type EntryRow = Omit<EntryContent, 'figures'> & { id: number; state: string; figures: string };

const figuresText = (figures: EntryContent['figures']): string =>
	JSON.stringify(
		figures.map(({ category, count, percent, countDerived, note }) => [
			...[category, count, percent, countDerived ? 1 : 0, note]
		])
	);

/** Sorts planned entries into new ones, ones the table has, and ones it has otherwise. Withdrawn entries do not count. */
export async function compareWithTable(db: Sequelize, planned: readonly PlannedEntry[]): Promise<Comparison> {
	const sources = [...new Set(planned.map(({ content }) => content.source))];
	const known = new Map<string, { id: number; draft: boolean; figures: string }>();
	for (let start = 0; start < sources.length; start += CHUNK_SOURCES) {
		const rows = await db.query<EntryRow>(
			`SELECT entry.id, entry.state, entry.source_id AS source, entry.locator, entry.measure, entry.provenance, sample.tooth, sample.root, sample.scope,
				sample.country, sample.method, sample.subgroup, sample.total,
				(SELECT json_group_array(json_array(category, count, percent, count_derived, note)) FROM
					(SELECT * FROM figure WHERE figure.entry_id = entry.id ORDER BY position)) AS figures
			FROM entry JOIN sample ON sample.id = entry.sample_id
			WHERE entry.state <> 'withdrawn' AND entry.source_id IN (SELECT value FROM json_each($sources))`,
			{
				type: QueryTypes.SELECT,
				bind: { sources: JSON.stringify(sources.slice(start, start + CHUNK_SOURCES)) }
			}
		);
		for (const { id, state, figures, ...content } of rows)
			known.set(entryKey(content), { id, draft: state !== 'published', figures });
	}
	const result: Comparison = { fresh: [], already: [], clashes: [] };
	for (const entry of planned) {
		const before = known.get(entry.key);
		if (!before) result.fresh.push(entry);
		else if (!before.draft && sameFigures(before.figures, entry.content.figures)) result.already.push(entry);
		else result.clashes.push({ planned: entry, entry: before.id, draft: before.draft });
	}
	return result;
}

/** SQLite writes 94.0 where JSON writes 94. */
const sameFigures = (kept: string, figures: EntryContent['figures']): boolean =>
	JSON.stringify(JSON.parse(kept)) === figuresText(figures);
