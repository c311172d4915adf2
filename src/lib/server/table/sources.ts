import { QueryTypes, type Sequelize } from 'sequelize';
import type { z } from 'zod';
import type { SourceDto, SourceSummary, sourcesQuerySchema } from '$lib/schemas/table';
import { serverDatabase } from '../db/server';
import type { CslSource } from './literatureFiles';
import { decodeCursor, encodeCursor, likePattern } from './paging';

const ORDER = 'id';

interface SourceRow {
	id: string;
	csl: string;
	title: string | null;
	year: number | null;
	journal: string | null;
	doi: string | null;
	citable: number;
	retracted: number;
	entries: number;
}

const SELECT = `SELECT source.id, source.csl, source.title, source.year, source.journal, source.doi, source.citable, source.retracted,
	(SELECT COUNT(*) FROM entry WHERE entry.source_id = source.id AND entry.state = 'published') AS entries FROM source`;

/**
 * Lists sources by id, in pages.
 * @throws Problem 422 for a cursor that is not of this list
 */
export async function listSources(db: Sequelize, query: z.infer<typeof sourcesQuerySchema>) {
	const where = ['1 = 1'];
	const bind: Record<string, string | number> = {};
	if (query.q) {
		// The CSL text holds authors, journal and identifiers as well.
		where.push("(source.id LIKE $q ESCAPE '\\' OR source.csl LIKE $q ESCAPE '\\')");
		bind.q = likePattern(query.q);
	}
	const [{ total }] = await db.query<{ total: number }>(
		`SELECT COUNT(*) AS total FROM source WHERE ${where.join(' AND ')}`,
		{ type: QueryTypes.SELECT, bind }
	);
	if (query.cursor) {
		where.push('source.id > $after');
		bind.after = String(decodeCursor(query.cursor, ORDER).id);
	}
	const rows = await db.query<SourceRow>(
		`${SELECT} WHERE ${where.join(' AND ')} ORDER BY source.id LIMIT $limit`,
		{ type: QueryTypes.SELECT, bind: { ...bind, limit: query.limit + 1 } }
	);
	const page = rows.slice(0, query.limit);
	const last = page.at(-1);
	return {
		sources: page.map(toSourceSummary),
		total,
		nextCursor: rows.length > query.limit && last ? encodeCursor(ORDER, last.id, last.id) : null
	};
}

/** A source with its CSL-JSON, or null for an unknown id. */
export async function findSource(db: Sequelize, id: string): Promise<SourceDto | null> {
	const [row] = await db.query<SourceRow>(`${SELECT} WHERE source.id = $id`, {
		type: QueryTypes.SELECT,
		bind: { id }
	});
	return row ? { ...toSourceSummary(row), csl: JSON.parse(row.csl) as CslSource } : null;
}

/** The sources of the ids given, for naming them on a page; unknown ids are left out. */
export async function sourcesById(ids: string[]): Promise<Record<string, SourceSummary>> {
	if (ids.length === 0) return {};
	const db = await serverDatabase();
	const rows = await db.query<SourceRow>(`${SELECT} WHERE source.id IN (:ids)`, {
		type: QueryTypes.SELECT,
		replacements: { ids }
	});
	return Object.fromEntries(rows.map((row) => [row.id, toSourceSummary(row)]));
}

function toSourceSummary(row: SourceRow): SourceSummary {
	const csl = JSON.parse(row.csl) as CslSource;
	return {
		id: row.id,
		title: row.title,
		authors: authorsInShort(csl),
		year: row.year,
		journal: row.journal,
		doi: row.doi,
		citable: row.citable === 1,
		retracted: row.retracted === 1,
		entries: row.entries
	};
}

/** Family names as a citation in running text gives them: one, two, or the first "and others". */
function authorsInShort(csl: CslSource): string {
	const names = (csl.author ?? [])
		.map(({ family, literal, given }) => family ?? literal ?? given ?? '')
		.filter(Boolean);
	if (names.length <= 2) return names.join(' and ');
	return `${names[0]} and others`;
}
