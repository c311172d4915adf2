import { sourceQuerySchema } from '$lib/schemas/table';
import { endpoint, readQuery } from '$lib/server/api/endpoint';
import { Problem } from '$lib/server/api/problem';
import { serverDatabase } from '$lib/server/db/server';
import { findSource } from '$lib/server/table/sources';
import type { RequestEvent } from './$types';

export const GET = endpoint<RequestEvent>(async ({ params, url }) => {
	// Other formats are not served yet: an unknown parameter is refused rather than passed over.
	readQuery(url.searchParams, sourceQuerySchema);
	const source = await findSource(await serverDatabase(), params.id);
	if (!source)
		throw new Problem(404, 'There is no source with this id.', [{ path: 'id', message: 'Unknown id.' }]);
	return source;
});
