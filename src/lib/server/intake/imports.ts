/** Imports of tables, from the upload to the last row. */
import { Op, QueryTypes, type Sequelize, type Transaction } from 'sequelize';
import type { Problem } from '$lib/schemas/intake';
import { intake as words } from '$lib/strings/intake';
import { TableImport, type ImportState } from '../db/models/intake';
import { log } from '../log';
import { recordAudit } from '../people/audit';
import { newId, now } from '../people/secrets';
import { storage } from '../storage';
import { harmlessName } from '../storage/uploads';
import { estimateRoots, placesOf, type Estimate, type Place } from '../table/estimates';
import { changeTable } from '../table/publishing';
import type { CheckedRows, PlannedEntry } from './checkRows';
import { compareWithTable } from './inTable';
import { MOST_PROBLEMS } from './limits';
import { kindOf, readInThread } from './reader';
import { Cancelled, finishImport, undoImport, writeEntries, type ImportJob } from './writeImport';

/** Days an upload is kept that nobody imported. */
const KEPT_DAYS = 7;
const DAY_MS = 86_400_000;
const MOST_LISTED = 30;

interface Person {
	id: string;
	name: string;
}

/** What stands before an import is written. */
interface Preview extends Omit<CheckedRows, 'entries'> {
	/** Entries that would be new. */
	fresh: number;
	/** Entries the table has just so: left out. */
	already: { total: number; first: { row: number; entry: string }[] };
}

export type PreviewAnswer = { unreadable: string } | { preview: Preview; entries: PlannedEntry[] };

// One import is written at a time in this process; its progress is read by the page.
const held = globalThis as typeof globalThis & {
	watersmeetImport?: {
		id: string;
		written: number;
		total: number;
		stop: AbortController;
		ended: Promise<void>;
	};
};

/** Takes an upload in: kept as it came, read only when its preview is asked for. */
export async function takeUpload(
	person: Person,
	file: { name: string; bytes: Buffer }
): Promise<{ id: string } | { failure: string }> {
	const kind = await kindOf(file.bytes);
	if ('failure' in kind) return kind;
	const id = newId();
	const stored = `${newId()}.${kind.kind}`;
	await storage().put(stored, file.bytes);
	await TableImport.create({
		...{
			id,
			file: harmlessName(file.name),
			stored,
			kind: kind.kind,
			mapping: '{}',
			state: 'preview' as const
		},
		...{ personId: person.id, personName: person.name, at: now() }
	});
	return { id };
}

/** An import of a person, or null: those of others are not there. */
export const findImport = (personId: string, id: string): Promise<TableImport | null> =>
	TableImport.findOne({ where: { id, personId } });

/** The imports of a person, the newest first. */
export async function listImports(personId: string) {
	const rows = await TableImport.findAll({
		where: { personId },
		order: [['at', 'DESC']],
		limit: MOST_LISTED
	});
	return rows.map(importDto);
}

/** An import as a page shows it. */
export function importDto({ id, file, state, publish, at, endedAt, rows, entries, message }: TableImport) {
	return { id, file, state, publish, at, endedAt, rows, entries, message, ...progressOf(id) };
}

/**
 * How far the writing of an import is; both 0 if it is not being written.
 * @internal for its test
 */
export function progressOf(id: string): { written: number; total: number } {
	const running = held.watersmeetImport;
	return running?.id === id ? { written: running.written, total: running.total } : { written: 0, total: 0 };
}

/** Reads, checks and compares the file of an import. */
export async function readImport(db: Sequelize, row: TableImport): Promise<PreviewAnswer> {
	const bytes = await storage().read(row.stored);
	if (!bytes) return { unreadable: words.unreadable.gone };
	const [sources, shown] = await Promise.all([
		db.query<{ id: string }>('SELECT id FROM source', { type: QueryTypes.SELECT }),
		db.query<{ place: string; sequences: string }>(
			`SELECT sample.tooth || '|' || sample.root AS place, json_group_array(DISTINCT figure.category) AS sequences
				FROM figure JOIN entry ON entry.id = figure.entry_id JOIN sample ON sample.id = entry.sample_id
				WHERE entry.state = 'published' AND entry.measure = 'configuration' GROUP BY 1`,
			{ type: QueryTypes.SELECT }
		)
	]);
	const answer = await readInThread({
		bytes,
		kind: row.kind,
		mapping: JSON.parse(row.mapping) as Record<string, string>,
		sources: sources.map(({ id }) => id),
		shown: shown.map(({ place, sequences }) => [place, JSON.parse(sequences) as string[]])
	});
	if ('unreadable' in answer) return answer;
	const { entries, ...checked } = answer.checked;
	const { fresh, already, clashes } = await compareWithTable(db, entries);
	const preview: Preview = {
		...checked,
		fresh: fresh.length,
		already: {
			total: already.length,
			first: already
				.slice(0, MOST_LISTED)
				.map(({ rows, content }) => ({ row: rows[0], entry: `${content.source}, ${content.locator}` }))
		}
	};
	const heading = checked.headings.find(({ column }) => column === 'source_id')?.heading ?? '';
	for (const { planned, entry, draft } of clashes)
		addProblem(preview, planned, heading, draft ? words.draftOf(entry) : words.inTableOtherwise(entry));
	return { preview, entries: clashes.length > 0 ? [] : fresh };
}

function addProblem(preview: Preview, { rows, content }: PlannedEntry, column: string, message: string) {
	const { problems } = preview;
	const problem: Problem = { row: rows[0], column, value: content.source, message };
	if (problems.first.length < MOST_PROBLEMS) problems.first.push(problem);
	problems.total += 1;
	problems.rows += 1;
	const counted = problems.byColumn.find(([name]) => name === column);
	if (counted) counted[1] += 1;
	else problems.byColumn.push([column, 1]);
}

/** Keeps what a person says of headings. */
export const mapHeadings = (row: TableImport, mapping: Record<string, string>): Promise<TableImport> =>
	row.update({ mapping: JSON.stringify(mapping) });

/** Why an import was not begun. */
export type StartFailure = 'busy' | 'not ready' | 'problems' | 'nothing new';

/**
 * Begins to write an import; it goes on after this returns, and `ended` of the running one tells when it is over.
 * @param publish as published entries instead of drafts; whoever calls has seen to it that the person may
 */
export async function startImport(
	db: Sequelize,
	row: TableImport,
	person: Person,
	publish: boolean,
	estimate: Estimate = estimateRoots
): Promise<StartFailure | null> {
	if (held.watersmeetImport) return 'busy';
	if (row.state !== 'preview') return 'not ready';
	const stop = new AbortController();
	let over = () => {};
	const ended = new Promise<void>((resolve) => (over = resolve));
	const running = { id: row.id, written: 0, total: 0, stop, ended };
	held.watersmeetImport = running;
	const end = () => {
		held.watersmeetImport = undefined;
		over();
	};
	try {
		const answer = await readImport(db, row);
		const failure =
			'unreadable' in answer || answer.preview.problems.total > 0
				? 'problems'
				: answer.entries.length === 0
					? 'nothing new'
					: null;
		if (failure !== null || 'unreadable' in answer) {
			end();
			return failure;
		}
		running.total = answer.entries.length;
		const rows = answer.entries.reduce((sum, entry) => sum + entry.rows.length, 0);
		await row.update({ state: 'writing', publish, rows, entries: answer.entries.length });
		const job: ImportJob = { id: row.id, publish, person, why: words.why(row.file) };
		const report = (written: number) => (running.written = written);
		void carryOut(db, row, job, { entries: answer.entries, signal: stop.signal, report, estimate }).finally(
			end
		);
		return null;
	} catch (error) {
		end();
		throw error;
	}
}

interface Work {
	entries: readonly PlannedEntry[];
	signal: AbortSignal;
	report: (written: number) => void;
	estimate: Estimate;
}

async function carryOut(
	db: Sequelize,
	row: TableImport,
	job: ImportJob,
	{ entries, signal, report, estimate }: Work
): Promise<void> {
	try {
		const places = job.publish ? placesOf(entries.map(({ content }) => content)) : [];
		// Beside the writing, so that the estimator has the table as it was before; the record takes the figures from there.
		const before = estimate(places).catch((error: unknown) =>
			log.warn({ err: error }, 'no estimates before an import')
		);
		await writeEntries(db, job, entries, signal, report);
		await before;
		await row.update({ state: 'finishing' });
		await complete(db, row, job, places, estimate);
	} catch (error) {
		await row.reload().catch(() => row);
		// From finishing on, the next start carries it on.
		if (row.state !== 'writing') return log.error({ err: error }, 'an import could not be finished');
		const cancelled = error instanceof Cancelled;
		if (!cancelled) log.error({ err: error }, 'an import failed and is undone');
		await giveUp(db, row, cancelled ? 'cancelled' : 'failed', cancelled ? '' : words.failed).catch(
			(failure: unknown) =>
				log.error({ err: failure }, 'an import could not be undone; the next start tries again')
		);
	}
}

async function giveUp(db: Sequelize, row: TableImport, state: ImportState, message: string) {
	await undoImport(db, row.id);
	await row.update({ state, message, endedAt: now() });
	await recordAudit({
		...{ action: 'import undone' as const, subject: row.file, detail: state },
		actor: { id: row.personId, name: row.personName }
	});
}

/** The last steps: revisions and states, and one revision of the table. */
async function complete(
	db: Sequelize,
	row: TableImport,
	job: ImportJob,
	places: readonly Place[],
	estimate: Estimate
) {
	await finishImport(db, job);
	const close = async (transaction: Transaction) => {
		await row.update({ state: 'done', endedAt: now() }, { transaction });
		const detail = words.audit(row.entries, job.publish);
		const actor = { id: row.personId, name: row.personName };
		await recordAudit({ action: 'table imported', subject: row.file, detail, actor }, transaction);
		return { why: job.why, who: row.personName };
	};
	if (job.publish) await changeTable(db, places, close, estimate);
	else await db.transaction(close);
	await storage().remove(row.stored);
}

/** Asks the import that is being written to stop; false if it is another, or past the point where it can. */
export async function cancelImport(row: TableImport): Promise<boolean> {
	const running = held.watersmeetImport;
	if (running?.id !== row.id) return false;
	running.stop.abort();
	await running.ended;
	await row.reload();
	return row.state === 'cancelled';
}

/** Throws an upload away that was not imported. */
export async function discardImport(row: TableImport): Promise<void> {
	await storage().remove(row.stored);
	await row.update({ state: 'cancelled', endedAt: now() });
}

/** At the start of the server: undoes what was being written, carries on what was being finished, removes uploads nobody imported. */
export async function recoverImports(db: Sequelize, estimate: Estimate = estimateRoots): Promise<void> {
	for (const row of await TableImport.findAll({ where: { state: ['writing', 'finishing'] } })) {
		const person = { id: row.personId, name: row.personName };
		if (row.state === 'finishing')
			await complete(
				db,
				row,
				{ id: row.id, publish: row.publish, person, why: words.why(row.file) },
				[],
				estimate
			);
		else await giveUp(db, row, 'failed', words.interrupted);
	}
	const before = new Date(Date.now() - KEPT_DAYS * DAY_MS).toISOString();
	for (const row of await TableImport.findAll({ where: { state: 'preview', at: { [Op.lt]: before } } }))
		await discardImport(row);
}

/** Stops an import that is being written and waits until it is undone; for the end of the server. */
export async function stopImports(): Promise<void> {
	const running = held.watersmeetImport;
	running?.stop.abort();
	await running?.ended;
}
