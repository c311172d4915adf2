import { json } from '@sveltejs/kit';
import { sourceChangeSchema, sourceRemovalSchema } from '$lib/schemas/sources';
import { sourceQuerySchema } from '$lib/schemas/table';
import { fileName } from '$lib/server/api/download';
import { endpoint, readBody, readQuery } from '$lib/server/api/endpoint';
import { Problem } from '$lib/server/api/problem';
import { serverDatabase } from '$lib/server/db/server';
import { requireRole } from '$lib/server/people/roles';
import { CITATION_FILES, cite } from '$lib/server/table/citations';
import type { CslSource } from '$lib/server/table/literatureFiles';
import {
	changeSource,
	expectedRevision,
	findKeptSource,
	removeSource,
	type Stale
} from '$lib/server/table/sourceRecords';
import { sourceDesk as words } from '$lib/strings/sourceDesk';
import type { RequestEvent } from './$types';

const unknown = () =>
	new Problem(404, 'There is no source with this id.', [{ path: 'id', message: 'Unknown id.' }]);
const stale = ({ revision }: Stale) =>
	new Problem(409, words.staleApi(revision), [], { etag: `"${revision}"` });

export const GET = endpoint<RequestEvent>(async ({ params, url }) => {
	const { format } = readQuery(url.searchParams, sourceQuerySchema);
	const source = await findKeptSource(await serverDatabase(), params.id);
	if (!source) throw unknown();
	if (!format) return json(source, { headers: { etag: `"${source.revision}"` } });
	const { type, ending } = CITATION_FILES[format];
	return new Response(cite([source.csl as CslSource], format), {
		headers: {
			'content-type': type,
			'content-disposition': `inline; filename="${fileName(source.id, ending)}"`
		}
	});
});

export const PATCH = endpoint<RequestEvent>(async (event) => {
	const editor = requireRole('educator', { scope: 'table:write' });
	const { csl, retraction, ...rest } = await readBody(event, sourceChangeSchema);
	const db = await serverDatabase();
	const change = {
		...rest,
		...(csl && { csl: { ...csl, id: event.params.id } }),
		...(retraction !== undefined && {
			retraction: retraction && { reason: retraction.reason, notice: retraction.notice ?? null }
		})
	};
	const expected = expectedRevision(event.request.headers.get('if-match'));
	const outcome = await changeSource(db, editor, event.params.id, expected, change);
	if (outcome === null) throw unknown();
	if (typeof outcome !== 'number') throw stale(outcome);
	return json(await findKeptSource(db, event.params.id), { headers: { etag: `"${outcome}"` } });
});

export const DELETE = endpoint<RequestEvent>(async (event) => {
	const editor = requireRole('educator', { scope: 'table:write' });
	const { why } = await readBody(event, sourceRemovalSchema);
	const expected = expectedRevision(event.request.headers.get('if-match'));
	const outcome = await removeSource(await serverDatabase(), editor, event.params.id, expected, why);
	if (outcome === null) throw unknown();
	if (outcome === false) throw new Problem(409, words.inUse);
	if (outcome !== true) throw stale(outcome);
	return { removed: event.params.id };
});
