import { entriesQuerySchema } from '$lib/schemas/table';
import { endpoint, readQuery } from '$lib/server/api/endpoint';
import { serverDatabase } from '$lib/server/db/server';
import { listEntries } from '$lib/server/table/entries';
import { checkEntryFilters } from '$lib/server/table/entryFilters';

export const GET = endpoint(async ({ url }) => {
	const query = readQuery(url.searchParams, entriesQuerySchema);
	const db = await serverDatabase();
	await checkEntryFilters(db, query);
	return listEntries(db, query);
});
