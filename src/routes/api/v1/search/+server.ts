import { searchQuerySchema } from '$lib/schemas/search';
import { endpoint, readQuery } from '$lib/server/api/endpoint';
import { search } from '$lib/server/search/search';

export const GET = endpoint(async ({ url }) => {
	const { q, limit, numbers } = readQuery(url.searchParams, searchQuerySchema);
	return { query: q, hits: (await search(q, numbers, limit)).hits };
});
