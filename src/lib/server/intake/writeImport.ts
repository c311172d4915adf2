/**
 * Writes the entries of an import so that nobody else waits: in many short transactions with room between them.
 *
 * 1. Writing. Samples, entries and figures, as drafts that no screen lists: they have no revision yet. `import_entry` and `import_sample` say
 *    what was written, and all of it is removed again on a failure, a cancellation, or at the next start after a crash.
 * 2. Finishing. Each entry gets its revision and its state. From here it is carried to the end, after a crash too: revisions are never removed.
 */
import { setTimeout as wait } from 'node:timers/promises';
import { QueryTypes, type Sequelize, type Transaction } from 'sequelize';
import type { EntryContent } from '$lib/entry/content';
import { EntryWork } from '../db/models/desk';
import { Figure, Revision } from '../db/models/literature';
import { now } from '../people/secrets';
import type { PlannedEntry } from './checkRows';

/** Figures in one transaction: a few hundredths of a second. */
const CHUNK_FIGURES = 120;
const CHUNK_ENTRIES = 80;
/** Between two transactions others get the lock: as long as the last one took, and at least this. */
const LEAST_PAUSE_MS = 15;

export interface ImportJob {
	id: string;
	publish: boolean;
	person: { id: string; name: string };
	why: string;
}

export class Cancelled extends Error {}

/** Runs transactions one after another, leaving others time between them. */
async function paced(steps: Iterable<() => Promise<void>>, signal?: AbortSignal) {
	for (const step of steps) {
		if (signal?.aborted) throw new Cancelled();
		const started = performance.now();
		await step();
		await wait(Math.max(LEAST_PAUSE_MS, performance.now() - started));
	}
}

/**
 * Writes everything as drafts nobody sees yet.
 * @param report told how many entries are written so far
 * @throws Cancelled when the signal says so; what is written then is for `undoImport`
 */
export async function writeEntries(
	db: Sequelize,
	job: ImportJob,
	entries: readonly PlannedEntry[],
	signal: AbortSignal,
	report: (written: number) => void
): Promise<void> {
	const samples = await knownSamples(db, entries);
	let written = 0;
	const steps = chunksOf(entries).map((chunk) => async () => {
		await db.transaction((transaction) => writeChunk(db, job, chunk, samples, transaction));
		written += chunk.length;
		report(written);
	});
	await paced(steps, signal);
}

/** Entries in parts of about as many figures. */
function chunksOf(entries: readonly PlannedEntry[]): PlannedEntry[][] {
	const chunks: PlannedEntry[][] = [];
	let size = Infinity;
	for (const entry of entries) {
		if (size >= CHUNK_FIGURES) {
			chunks.push([]);
			size = 0;
		}
		chunks[chunks.length - 1].push(entry);
		size += entry.content.figures.length;
	}
	return chunks;
}

const sampleKey = ({ source, tooth, root, scope, country, method, subgroup, total }: SampleFields): string =>
	JSON.stringify([source, tooth, root, scope, country, method, subgroup, total]);
type SampleFields = Pick<
	EntryContent,
	'source' | 'tooth' | 'root' | 'scope' | 'country' | 'method' | 'subgroup' | 'total'
>;

/** Samples of these sources that published entries have, by what they are. */
async function knownSamples(db: Sequelize, entries: readonly PlannedEntry[]): Promise<Map<string, number>> {
	const sources = [...new Set(entries.map(({ content }) => content.source))];
	const rows = await db.query<SampleFields & { id: number }>(
		`SELECT id, source_id AS source, tooth, root, scope, country, method, subgroup, total FROM sample
			WHERE source_id IN (SELECT value FROM json_each($sources)) AND EXISTS
				(SELECT 1 FROM entry WHERE entry.sample_id = sample.id AND entry.state IN ('published', 'withdrawn'))
			ORDER BY id DESC`,
		{ type: QueryTypes.SELECT, bind: { sources: JSON.stringify(sources) } }
	);
	return new Map(rows.map(({ id, ...sample }) => [sampleKey(sample), id]));
}

/** The next free number of a table, never one that was used before. Only under the write lock. */
async function nextId(db: Sequelize, table: string, transaction: Transaction): Promise<number> {
	const [row] = await db.query<{ seq: number }>('SELECT seq FROM sqlite_sequence WHERE name = $table', {
		...{ type: QueryTypes.SELECT as const, bind: { table }, transaction }
	});
	return ((row as { seq: number } | undefined)?.seq ?? 0) + 1;
}

async function writeChunk(
	db: Sequelize,
	job: ImportJob,
	chunk: readonly PlannedEntry[],
	samples: Map<string, number>,
	transaction: Transaction
) {
	let sampleId = await nextId(db, 'sample', transaction);
	let entryId = await nextId(db, 'entry', transaction);
	const newSamples: unknown[] = [];
	const added = new Map<string, number>();
	const newEntries: unknown[] = [];
	const figures: unknown[] = [];
	for (const { content } of chunk) {
		const key = sampleKey(content);
		// A draft has a sample of its own, which follows it as it is edited; publishing it finds the one it shares.
		let sample = job.publish ? (samples.get(key) ?? added.get(key)) : undefined;
		if (sample === undefined) {
			sample = sampleId++;
			added.set(key, sample);
			newSamples.push({ ...content, figures: undefined, id: sample });
		}
		const entry = entryId++;
		newEntries.push({ ...content, figures: undefined, id: entry, sample });
		for (const [position, figure] of content.figures.entries()) figures.push({ ...figure, entry, position });
	}
	const run = (sql: string, rows: unknown[], more: { job?: string } = {}) =>
		db.query(sql, { bind: { rows: JSON.stringify(rows), ...more }, transaction });
	const at = (...names: string[]) => names.map((name) => `json_extract(value, '$.${name}')`).join(', ');
	if (newSamples.length > 0) {
		await run(
			`INSERT INTO sample (id, source_id, tooth, root, scope, country, method, subgroup, total)
				SELECT ${at('id', 'source', 'tooth', 'root', 'scope', 'country', 'method', 'subgroup', 'total')} FROM json_each($rows)`,
			newSamples
		);
		await run(
			`INSERT INTO import_sample (sample_id, import_id) SELECT ${at('id')}, $job FROM json_each($rows)`,
			newSamples,
			{ job: job.id }
		);
	}
	await run(
		`INSERT INTO entry (id, sample_id, source_id, locator, measure, state, provenance)
			SELECT ${at('id', 'sample', 'source', 'locator', 'measure')}, 'draft', ${at('provenance')} FROM json_each($rows)`,
		newEntries
	);
	await run(
		`INSERT INTO import_entry (entry_id, import_id) SELECT ${at('id')}, $job FROM json_each($rows)`,
		newEntries,
		{ job: job.id }
	);
	await run(
		`INSERT INTO figure (entry_id, position, category, count, percent, count_derived, note)
			SELECT ${at('entry', 'position', 'category', 'count', 'percent', 'countDerived', 'note')} FROM json_each($rows)`,
		figures
	);
	// Only now, since a chunk that fails takes its samples back.
	for (const [key, id] of added) samples.set(key, id);
}

/** Removes everything an import has written, in short steps as well. What meanwhile has a revision of its own stays: somebody works on it. */
export async function undoImport(db: Sequelize, id: string): Promise<void> {
	const own = `SELECT entry_id FROM import_entry WHERE import_id = $id AND NOT EXISTS
		(SELECT 1 FROM revision WHERE revision.entry_id = import_entry.entry_id) LIMIT ${CHUNK_ENTRIES}`;
	for (;;) {
		const rows = await db.query<{ entry_id: number }>(own, { type: QueryTypes.SELECT, bind: { id } });
		if (rows.length === 0) break;
		const ids = JSON.stringify(rows.map((row) => row.entry_id));
		await paced([
			() =>
				db.transaction(async (transaction) => {
					await db.query('DELETE FROM entry WHERE id IN (SELECT value FROM json_each($ids))', {
						bind: { ids },
						transaction
					});
				})
		]);
	}
	await db.query(
		`DELETE FROM sample WHERE id IN (SELECT sample_id FROM import_sample WHERE import_id = $id)
			AND NOT EXISTS (SELECT 1 FROM entry WHERE entry.sample_id = sample.id)`,
		{ bind: { id } }
	);
	await forget(db, id);
}

const forget = async (db: Sequelize, id: string): Promise<void> => {
	await db.query('DELETE FROM import_entry WHERE import_id = $id', { bind: { id } });
	await db.query('DELETE FROM import_sample WHERE import_id = $id', { bind: { id } });
};

interface WrittenEntry extends Omit<EntryContent, 'figures'> {
	id: number;
	figures: string;
}

/** Gives every entry that was written its revision and its state. May be run again from wherever it was cut short. */
export async function finishImport(db: Sequelize, job: ImportJob): Promise<void> {
	for (;;) {
		const rows = await db.query<WrittenEntry>(
			`SELECT entry.id, entry.source_id AS source, entry.locator, entry.provenance, sample.tooth, sample.root, sample.scope, sample.country,
				sample.method, sample.subgroup, sample.total, entry.measure,
				(SELECT json_group_array(json_object('category', category, 'count', count, 'percent', percent, 'countDerived', json(iif(count_derived, 'true', 'false')), 'note', note))
					FROM (SELECT * FROM figure WHERE figure.entry_id = entry.id ORDER BY position)) AS figures
			FROM import_entry JOIN entry ON entry.id = import_entry.entry_id JOIN sample ON sample.id = entry.sample_id
			WHERE import_entry.import_id = $id ORDER BY entry.id LIMIT ${CHUNK_ENTRIES}`,
			{ type: QueryTypes.SELECT, bind: { id: job.id } }
		);
		if (rows.length === 0) break;
		await paced([() => db.transaction((transaction) => finishChunk(db, job, rows, transaction))]);
	}
	await forget(db, job.id);
}

async function finishChunk(
	db: Sequelize,
	{ publish, person, why }: ImportJob,
	rows: readonly WrittenEntry[],
	transaction: Transaction
) {
	const state = publish ? 'published' : 'draft';
	const at = now();
	const ids = JSON.stringify(rows.map(({ id }) => id));
	await Revision.bulkCreate(
		rows.map(({ id, figures, ...content }) => ({
			...{ entryId: id, number: 1, at, who: person.name, whoId: person.id, author: null, before: null, why },
			after: JSON.stringify({ state, ...content, figures: JSON.parse(figures) as unknown })
		})),
		{ transaction }
	);
	if (publish)
		await db.query(
			`UPDATE entry SET state = 'published' WHERE id IN (SELECT value FROM json_each($ids)) AND state = 'draft'`,
			{ bind: { ids }, transaction }
		);
	else await makeDrafts(rows, person, transaction);
	await db.query('DELETE FROM import_entry WHERE entry_id IN (SELECT value FROM json_each($ids))', {
		bind: { ids },
		transaction
	});
}

/** As the desk keeps drafts: what they say stands in their revision alone, and somebody works on them. */
async function makeDrafts(
	rows: readonly WrittenEntry[],
	person: ImportJob['person'],
	transaction: Transaction
): Promise<void> {
	await Figure.destroy({ where: { entryId: rows.map(({ id }) => id) }, transaction });
	await EntryWork.bulkCreate(
		rows.map(({ id }) => ({
			...{ entryId: id, state: 'draft' as const, number: 1, authorId: person.id, author: person.name },
			...{ editors: JSON.stringify([person.id]), at: now() }
		})),
		{ transaction }
	);
}
