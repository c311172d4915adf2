import { json } from '@sveltejs/kit';
import { newSourceSchema } from '$lib/schemas/sources';
import { sourcesQuerySchema } from '$lib/schemas/table';
import { endpoint, readBody, readQuery } from '$lib/server/api/endpoint';
import { Problem } from '$lib/server/api/problem';
import { serverDatabase } from '$lib/server/db/server';
import { requireRole } from '$lib/server/people/roles';
import { findDuplicates } from '$lib/server/table/duplicates';
import { createSource, findKeptSource } from '$lib/server/table/sourceRecords';
import { listSources } from '$lib/server/table/sources';
import { sourceDesk as words } from '$lib/strings/sourceDesk';

export const GET = endpoint(async ({ url }) =>
	listSources(await serverDatabase(), readQuery(url.searchParams, sourcesQuerySchema))
);

export const POST = endpoint(async (event) => {
	const editor = requireRole('educator', { scope: 'table:write' });
	const { csl, why = words.whyAdded, evenIfDuplicate } = await readBody(event, newSourceSchema);
	const db = await serverDatabase();
	const duplicates = evenIfDuplicate ? [] : await findDuplicates(db, { ...csl, id: '' });
	if (duplicates.length > 0)
		throw new Problem(
			409,
			words.duplicates,
			duplicates.map(({ id, by }) => ({ path: 'csl', message: `${id}: ${words.duplicateBy[by]}` }))
		);
	const id = await createSource(db, editor, { ...csl, id: '' }, why);
	return json(await findKeptSource(db, id), { headers: { etag: '"1"' } });
});
