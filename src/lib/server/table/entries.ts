import { QueryTypes, type Sequelize } from 'sequelize';
import type { EntriesQuery, EntryDto } from '$lib/schemas/table';
import { Figure, Revision, type EntryState, type Provenance } from '../db/models/literature';
import { entryConditions } from './entryConditions';
import { readPage, type Page } from './paging';

/** Sort keys by their columns of `entry_row`, each with an index. An unknown year or total sorts first. */
const SORT_SQL: Record<string, string> = {
	id: 'entry_row.entry_id',
	source: 'entry_row.source_id',
	author: 'entry_row.author',
	year: 'entry_row.year',
	tooth: 'entry_row.tooth',
	root: 'entry_row.root',
	measure: 'entry_row.measure',
	method: 'entry_row.method',
	country: 'entry_row.country',
	total: 'entry_row.total'
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
}

/** A page of published entries. */
export type EntriesPage = Omit<Page<never>, 'rows'> & { entries: EntryDto[] };

/**
 * Lists published entries, filtered, sorted and cut into pages by key (an entry added meanwhile shifts nothing).
 * @throws Problem 422 for a cursor that is not of this list
 */
export async function listEntries(db: Sequelize, query: EntriesQuery): Promise<EntriesPage> {
	const conditions = entryConditions(query);
	// Counting, sorting and cutting read the narrow table alone; the rest is fetched for the rows of the page.
	const { rows: ids, ...page } = await readPage<{ id: number }>(
		db,
		{ columns: 'entry_row.entry_id AS id', from: 'entry_row', ...conditions },
		{ sort: query.sort, key: SORT_SQL[query.sort.replace('-', '')], id: 'entry_row.entry_id' },
		query
	);
	const rows = await db.query<EntryRow>(
		`SELECT ${COLUMNS} ${FROM} WHERE entry.id IN (SELECT value FROM json_each($ids))`,
		{ type: QueryTypes.SELECT, bind: { ids: JSON.stringify(ids.map(({ id }) => id)) } }
	);
	const byId = new Map(rows.map((row) => [row.id, row]));
	return { ...page, entries: await withFigures(ids.flatMap(({ id }) => byId.get(id) ?? [])) };
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
	return rows.map(({ confirmed, ...row }) => ({
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
