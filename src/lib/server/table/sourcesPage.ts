import type { FilterFields } from '$lib/filterQuery';
import { sourcesQuerySchema } from '$lib/schemas/table';
import { serverDatabase } from '../db/server';
import { readLeavingOut } from './leftOut';
import { listSources } from './sources';

/** A page of the list of sources as its address asks for it. */
export async function readSourcesPage(fields: FilterFields, usualSort: string) {
	const db = await serverDatabase();
	const asked: FilterFields = fields.some(([name]) => name === 'sort')
		? fields
		: [...fields, ['sort', usualSort]];
	const { result, query, errors } = await readLeavingOut(asked, sourcesQuerySchema, (query) =>
		listSources(db, query)
	);
	return { page: result, sort: query.sort === 'id' ? usualSort : query.sort, errors };
}
