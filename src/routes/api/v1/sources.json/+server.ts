import { bibliographyQuerySchema } from '$lib/schemas/table';
import { downloadSources } from '$lib/server/api/download';
import { endpoint, readQuery } from '$lib/server/api/endpoint';

export const GET = endpoint(({ url }) =>
	downloadSources(readQuery(url.searchParams, bibliographyQuerySchema).q, 'csl')
);
