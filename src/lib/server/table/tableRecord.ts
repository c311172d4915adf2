/** The record of the table: what each revision changed, who checked it, and how far estimates moved. */
import { QueryTypes, type Sequelize } from 'sequelize';
import type { RootFigures } from '$lib/entry/effect';
import { TableEffect } from '../db/models/desk';
import type { Place } from './estimates';

/** Entries named one by one; a revision that changed more says how many. */
const MOST_NAMED = 20;

/** What became of an entry. */
interface ChangedEntry {
	entry: number;
	change: 'published' | 'withdrawn';
	tooth: string;
	root: string;
	measure: string;
	source: string;
}

/** How far one root's main figures moved. */
interface Effect extends Place {
	before: RootFigures;
	/** Null while it is being worked out. */
	after: RootFigures | null;
}

/** One revision of the table. */
export interface RevisionOfTable {
	revision: number;
	at: string;
	why: string;
	/** Who published it; null for the shipped literature. */
	who: string | null;
	/** Who wrote it, where another checked it. */
	author: string | null;
	changed: number;
	entries: ChangedEntry[];
	effects: Effect[];
}

interface Row {
	revision: number;
	at: string;
	why: string;
	who: string | null;
	author: string | null;
	first: number;
	last: number;
}

const COLUMNS = `SELECT table_revision.id AS revision, table_revision.at, table_revision.why, table_revision.who, table_revision.author,
	coalesce((SELECT MAX(earlier.last_revision) FROM table_revision AS earlier WHERE earlier.id < table_revision.id), 0) AS first,
	coalesce(last_revision, 0) AS last FROM table_revision`;

/**
 * Revisions of the table, the newest first.
 * @param before only those before this number
 */
export async function listTableRevisions(
	db: Sequelize,
	{ before, limit }: { before?: number; limit: number }
): Promise<{ revisions: RevisionOfTable[]; next: number | null }> {
	const rows = await db.query<Row>(
		`${COLUMNS} WHERE ($before IS NULL OR table_revision.id < $before) ORDER BY table_revision.id DESC LIMIT $limit`,
		{ type: QueryTypes.SELECT, bind: { before: before ?? null, limit: limit + 1 } }
	);
	const page = rows.slice(0, limit);
	const revisions = await withChanges(db, page);
	return { revisions, next: rows.length > limit ? page[page.length - 1].revision : null };
}

/**
 * One revision of the table; null for a number it never had.
 * @internal for its test
 */
export async function tableRevisionOf(db: Sequelize, number: number): Promise<RevisionOfTable | null> {
	const rows = await db.query<Row>(`${COLUMNS} WHERE table_revision.id = $number`, {
		type: QueryTypes.SELECT,
		bind: { number }
	});
	const [revision] = await withChanges(db, rows);
	return revision ?? null;
}

async function withChanges(db: Sequelize, rows: Row[]): Promise<RevisionOfTable[]> {
	const effects = await TableEffect.findAll({
		where: { tableRevisionId: rows.map(({ revision }) => revision) },
		order: ['tooth', 'root']
	});
	const revisions: RevisionOfTable[] = [];
	for (const { first, last, ...row } of rows) {
		const changed = `FROM revision WHERE id > $first AND id <= $last
			AND json_extract(after, '$.state') IN ('published', 'withdrawn')`;
		const bind = { first, last };
		const [{ number }] = await db.query<{ number: number }>(
			`SELECT COUNT(DISTINCT entry_id) AS number ${changed}`,
			{ type: QueryTypes.SELECT, bind }
		);
		const entries = await db.query<ChangedEntry>(
			`SELECT entry_id AS entry, json_extract(after, '$.state') AS change, json_extract(after, '$.tooth') AS tooth,
				json_extract(after, '$.root') AS root, json_extract(after, '$.measure') AS measure,
				json_extract(after, '$.source') AS source ${changed} ORDER BY id LIMIT ${MOST_NAMED}`,
			{ type: QueryTypes.SELECT, bind }
		);
		revisions.push({
			...row,
			...{ changed: number, entries: number > MOST_NAMED ? [] : entries },
			effects: effects
				.filter(({ tableRevisionId }) => tableRevisionId === row.revision)
				.map(({ tooth, root, before, after }) => ({
					...{ tooth, root, before: JSON.parse(before) as RootFigures },
					after: after === null ? null : (JSON.parse(after) as RootFigures)
				}))
		});
	}
	return revisions;
}
