import { sourceQuerySchema } from '$lib/schemas/table';
import { fileName } from '$lib/server/api/download';
import { endpoint, readQuery } from '$lib/server/api/endpoint';
import { Problem } from '$lib/server/api/problem';
import { serverDatabase } from '$lib/server/db/server';
import { CITATION_FILES, cite } from '$lib/server/table/citations';
import type { CslSource } from '$lib/server/table/literatureFiles';
import { findSource } from '$lib/server/table/sources';
import type { RequestEvent } from './$types';

export const GET = endpoint<RequestEvent>(async ({ params, url }) => {
	const { format } = readQuery(url.searchParams, sourceQuerySchema);
	const source = await findSource(await serverDatabase(), params.id);
	if (!source)
		throw new Problem(404, 'There is no source with this id.', [{ path: 'id', message: 'Unknown id.' }]);
	if (!format) return source;
	const { type, ending } = CITATION_FILES[format];
	return new Response(cite([source.csl as CslSource], format), {
		headers: {
			'content-type': type,
			'content-disposition': `inline; filename="${fileName(source.id, ending)}"`
		}
	});
});
