import { tableRevisionsQuerySchema } from '$lib/schemas/entries';
import { endpoint, readQuery } from '$lib/server/api/endpoint';
import { serverDatabase } from '$lib/server/db/server';
import { listTableRevisions } from '$lib/server/table/tableRecord';

export const GET = endpoint(async ({ url }) =>
	listTableRevisions(await serverDatabase(), readQuery(url.searchParams, tableRevisionsQuerySchema))
);
