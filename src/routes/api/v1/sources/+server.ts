import { sourcesQuerySchema } from '$lib/schemas/table';
import { endpoint, readQuery } from '$lib/server/api/endpoint';
import { serverDatabase } from '$lib/server/db/server';
import { listSources } from '$lib/server/table/sources';

export const GET = endpoint(async ({ url }) =>
	listSources(await serverDatabase(), readQuery(url.searchParams, sourcesQuerySchema))
);
