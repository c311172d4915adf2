import { json } from '@sveltejs/kit';
import { entryBodySchema } from '$lib/schemas/entries';
import { entriesQuerySchema } from '$lib/schemas/table';
import { endpoint, readBody, readQuery } from '$lib/server/api/endpoint';
import { serverDatabase } from '$lib/server/db/server';
import { requireRole } from '$lib/server/people/roles';
import { contentOfBody, deskEntryDto } from '$lib/server/table/deskEntry';
import { listEntries } from '$lib/server/table/entries';
import { createDraft } from '$lib/server/table/entryDrafts';
import { checkEntryFilters } from '$lib/server/table/entryFilters';

export const GET = endpoint(async ({ url }) => {
	const query = readQuery(url.searchParams, entriesQuerySchema);
	const db = await serverDatabase();
	await checkEntryFilters(db, query);
	return listEntries(db, query);
});

export const POST = endpoint(async (event) => {
	const person = requireRole('educator', { scope: 'table:write' });
	const body = await readBody(event, entryBodySchema);
	const db = await serverDatabase();
	const id = await createDraft(db, await contentOfBody(db, body, null), person);
	const entry = await deskEntryDto(db, id, null);
	return json(entry, { headers: { location: `/api/v1/entries/${id}/draft`, etag: `"${entry.revision}"` } });
});
