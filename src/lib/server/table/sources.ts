import { QueryTypes, type Sequelize } from 'sequelize';
import type { SourceDto, SourcesQuery, SourceSummary } from '$lib/schemas/table';
import { serverDatabase } from '../db/server';
import type { CslSource } from './literatureFiles';
import { readPage, type Page } from './paging';
import { matchExpression } from './searchWords';

const ENTRIES = `(SELECT COUNT(*) FROM entry_row WHERE entry_row.state = 'published' AND entry_row.source_id = source.id)`;
/** Sort keys as SQL; an unknown year sorts first. */
const SORT_SQL: Record<string, string> = {
	id: 'source.id',
	author: 'source_row.author',
	title: 'source_row.title',
	year: 'COALESCE(source_row.year, 0)',
	entries: ENTRIES
};

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

const COLUMNS = `source.id, source.csl, source.title, source.year, source.journal, source.doi, source.citable, source.retracted,
	${ENTRIES} AS entries`;
const FROM = 'source JOIN source_row ON source_row.source_id = source.id';

/** A page of sources. */
export type SourcesPage = Omit<Page<never>, 'rows'> & { sources: SourceSummary[] };

/**
 * Lists sources in pages.
 * @throws Problem 422 for a cursor that is not of this list
 */
export async function listSources(db: Sequelize, query: SourcesQuery): Promise<SourcesPage> {
	const { rows, ...page } = await readPage<SourceRow>(
		db,
		{ columns: COLUMNS, from: FROM, ...sourceConditions(query.q) },
		{ sort: query.sort, key: SORT_SQL[query.sort.replace('-', '')], id: 'source.id' },
		query
	);
	return { ...page, sources: rows.map(toSourceSummary) };
}

/** Which sources words leave, as SQL over `source_row`. */
function sourceConditions(q: string | undefined): { where: string[]; bind: Record<string, string> } {
	if (!q) return { where: ['1 = 1'], bind: {} };
	const words = matchExpression(q);
	if (words === null) return { where: ['1 = 0'], bind: {} };
	return {
		where: ['source_row.id IN (SELECT rowid FROM source_search WHERE source_search MATCH $words)'],
		bind: { words }
	};
}

/** CSL-JSON of the sources that words leave, or of all, by author; as many as a bibliography takes in. */
export async function citationsOf(db: Sequelize, q: string | undefined): Promise<CslSource[]> {
	const { where, bind } = sourceConditions(q);
	const rows = await db.query<{ csl: string }>(
		`SELECT source.csl FROM ${FROM} WHERE ${where.join(' AND ')} ORDER BY source_row.author, source.id`,
		{ type: QueryTypes.SELECT, bind }
	);
	return rows.map(({ csl }) => JSON.parse(csl) as CslSource);
}

/** A source with its CSL-JSON, or null for an unknown id. */
export async function findSource(db: Sequelize, id: string): Promise<SourceDto | null> {
	const [row] = await db.query<SourceRow>(`SELECT ${COLUMNS} FROM source WHERE source.id = $id`, {
		type: QueryTypes.SELECT,
		bind: { id }
	});
	return row ? { ...toSourceSummary(row), csl: JSON.parse(row.csl) as CslSource } : null;
}

/** The sources of the ids given, for naming them on a page; unknown ids are left out. */
export async function sourcesById(ids: string[]): Promise<Record<string, SourceSummary>> {
	if (ids.length === 0) return {};
	const db = await serverDatabase();
	const rows = await db.query<SourceRow>(`SELECT ${COLUMNS} FROM source WHERE source.id IN (:ids)`, {
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
