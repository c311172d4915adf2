import { QueryTypes, type Sequelize } from 'sequelize';
import type { EntriesQuery, EntryDto } from '$lib/schemas/table';
import { Figure, Revision, type EntryState, type Provenance } from '../db/models/literature';
import { decodeCursor, encodeCursor, likePattern } from './paging';

/** Sort keys as SQL; an unknown year or total sorts first. */
const SORT_SQL: Record<string, string> = {
	id: 'entry.id',
	source: 'entry.source_id',
	tooth: 'sample.tooth',
	year: 'COALESCE(source.year, 0)',
	total: 'COALESCE(sample.total, 0)'
};

const COLUMNS = `entry.id, entry.source_id AS source, source.title, source.year, entry.locator, sample.tooth, sample.root, sample.scope,
	sample.country, sample.method, sample.subgroup, sample.total, entry.measure, entry.state, entry.provenance, entry.confirmed`;
const FROM =
	'FROM entry JOIN sample ON sample.id = entry.sample_id JOIN source ON source.id = entry.source_id';

interface EntryRow {
	id: number;
	source: string;
	title: string | null;
	year: number | null;
	locator: string;
	tooth: string;
	root: string;
	scope: string;
	country: string;
	method: string;
	subgroup: string;
	total: number | null;
	measure: string;
	state: EntryState;
	provenance: Provenance;
	confirmed: number;
	sortKey?: string | number;
}

/** A page of published entries. */
export interface EntriesPage {
	entries: EntryDto[];
	/** Entries that match, over all pages. */
	total: number;
	nextCursor: string | null;
}

/**
 * Lists published entries, filtered, sorted and cut into pages by key (an entry added meanwhile shifts nothing).
 * @throws Problem 422 for a cursor that is not of this list
 */
export async function listEntries(db: Sequelize, query: EntriesQuery): Promise<EntriesPage> {
	const where = ["entry.state = 'published'"];
	const bind: Record<string, string | number> = {};
	for (const name of ['tooth', 'root', 'method', 'country'] as const) {
		if (query[name] === undefined) continue;
		where.push(`sample.${name} = $${name}`);
		bind[name] = query[name];
	}
	if (query.measure) {
		where.push('entry.measure = $measure');
		bind.measure = query.measure;
	}
	if (query.source) {
		where.push('entry.source_id = $source');
		bind.source = query.source;
	}
	if (query.q) {
		where.push(`(entry.source_id LIKE $q ESCAPE '\\' OR source.title LIKE $q ESCAPE '\\' OR sample.scope LIKE $q ESCAPE '\\'
			OR entry.locator LIKE $q ESCAPE '\\'
			OR EXISTS (SELECT 1 FROM figure WHERE figure.entry_id = entry.id
				AND (figure.note LIKE $q ESCAPE '\\' OR figure.category LIKE $q ESCAPE '\\')))`);
		bind.q = likePattern(query.q);
	}
	const [{ total }] = await db.query<{ total: number }>(
		`SELECT COUNT(*) AS total ${FROM} WHERE ${where.join(' AND ')}`,
		{ type: QueryTypes.SELECT, bind }
	);

	const descending = query.sort.startsWith('-');
	const key = SORT_SQL[query.sort.replace('-', '')];
	const order = descending ? 'DESC' : 'ASC';
	if (query.cursor) {
		const cursor = decodeCursor(query.cursor, query.sort);
		const beyond = descending ? '<' : '>';
		where.push(`(${key} ${beyond} $afterKey OR (${key} = $afterKey AND entry.id ${beyond} $afterId))`);
		bind.afterKey = cursor.key;
		bind.afterId = cursor.id;
	}
	const rows = await db.query<EntryRow>(
		`SELECT ${COLUMNS}, ${key} AS sortKey ${FROM} WHERE ${where.join(' AND ')}
			ORDER BY ${key} ${order}, entry.id ${order} LIMIT $limit`,
		{ type: QueryTypes.SELECT, bind: { ...bind, limit: query.limit + 1 } }
	);
	const page = rows.slice(0, query.limit);
	const last = page.at(-1);
	return {
		entries: await withFigures(page),
		total,
		nextCursor:
			rows.length > query.limit && last ? encodeCursor(query.sort, last.sortKey ?? last.id, last.id) : null
	};
}

/** An entry with its revisions, or null for an unknown or unpublished id. */
export async function findEntry(db: Sequelize, id: number) {
	const rows = await db.query<EntryRow>(
		`SELECT ${COLUMNS} ${FROM} WHERE entry.id = $id AND entry.state IN ('published', 'withdrawn')`,
		{ type: QueryTypes.SELECT, bind: { id } }
	);
	const [entry] = await withFigures(rows);
	if (!entry) return null;
	const revisions = await Revision.findAll({ where: { entryId: id }, order: [['number', 'ASC']] });
	const read = (text: string | null): unknown => (text === null ? null : JSON.parse(text));
	return {
		...entry,
		revisions: revisions.map(({ number, at, who, why, before, after }) => ({
			number,
			at,
			who,
			why,
			before: read(before),
			after: read(after)
		}))
	};
}

/** Published entries of one source, by tooth and root. */
export async function entriesOfSource(db: Sequelize, source: string): Promise<EntryDto[]> {
	const rows = await db.query<EntryRow>(
		`SELECT ${COLUMNS} ${FROM} WHERE entry.source_id = $source AND entry.state = 'published'
			ORDER BY sample.tooth, sample.root, entry.measure, entry.id`,
		{ type: QueryTypes.SELECT, bind: { source } }
	);
	return withFigures(rows);
}

async function withFigures(rows: EntryRow[]): Promise<EntryDto[]> {
	const figures = await Figure.findAll({
		where: { entryId: rows.map(({ id }) => id) },
		order: ['entryId', 'position']
	});
	const byEntry = new Map<number, Figure[]>();
	for (const figure of figures) {
		const list = byEntry.get(figure.entryId);
		if (list) list.push(figure);
		else byEntry.set(figure.entryId, [figure]);
	}
	return rows.map(({ confirmed, sortKey: _, ...row }) => ({
		...row,
		verified: row.provenance !== 'memory' || confirmed === 1,
		figures: (byEntry.get(row.id) ?? []).map(({ category, count, percent, countDerived, note }) => ({
			category,
			count,
			percent,
			countDerived,
			note
		}))
	}));
}
