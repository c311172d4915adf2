import { tableQuerySchema } from '$lib/schemas/table';
import { downloadTable } from '$lib/server/api/download';
import { endpoint, readQuery } from '$lib/server/api/endpoint';

export const GET = endpoint(({ url }) =>
	downloadTable(readQuery(url.searchParams, tableQuerySchema), 'xlsx')
);
