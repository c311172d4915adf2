import { entriesQuerySchema } from '$lib/schemas/table';
import { endpoint, readQuery } from '$lib/server/api/endpoint';
import { serverDatabase } from '$lib/server/db/server';
import { listEntries } from '$lib/server/table/entries';

export const GET = endpoint(async ({ url }) =>
	listEntries(await serverDatabase(), readQuery(url, entriesQuerySchema))
);
