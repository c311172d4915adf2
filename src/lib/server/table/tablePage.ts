import { QueryTypes, type Sequelize } from 'sequelize';
import { USUAL_SORT, all } from '$lib/tableQuery';
import type { FilterFields } from '$lib/filterQuery';
import { entriesQuerySchema } from '$lib/schemas/table';
import { serverDatabase } from '../db/server';
import { listEntries } from './entries';
import { checkEntryFilters } from './entryFilters';
import { readLeavingOut } from './leftOut';
import { sourcesById } from './sources';

/** A page of the table as its address asks for it, with what its filters offer. */
export async function readTablePage(fields: FilterFields) {
	const db = await serverDatabase();
	const asked = fields.filter(([name]) => name !== 'column');
	if (all(asked, 'sort').length === 0) asked.push(['sort', USUAL_SORT]);
	const { result, query, errors } = await readLeavingOut(asked, entriesQuerySchema, async (query) => {
		await checkEntryFilters(db, query);
		return listEntries(db, query);
	});
	const named = [...result.entries.map(({ source }) => source), ...(query.source ? [query.source] : [])];
	return {
		page: result,
		sort: query.sort,
		errors,
		countries: await countriesOfTable(db),
		sources: await sourcesById([...new Set(named)])
	};
}

/** Countries of published entries, each by itself where a sample joins several. */
async function countriesOfTable(db: Sequelize): Promise<string[]> {
	const rows = await db.query<{ country: string }>(
		"SELECT DISTINCT country FROM entry_row WHERE state = 'published'",
		{ type: QueryTypes.SELECT }
	);
	return [...new Set(rows.flatMap(({ country }) => country.split('+')))].filter(Boolean);
}
