import { json } from '@sveltejs/kit';
import { endpoint } from '$lib/server/api/endpoint';
import { serverDatabase } from '$lib/server/db/server';
import { requireRole } from '$lib/server/people/roles';
import { deskEntryDto, existingEntry } from '$lib/server/table/deskEntry';
import type { RequestEvent } from './$types';

export const GET = endpoint<RequestEvent>(async ({ params }) => {
	requireRole('educator', { scope: 'table:write' });
	const { id } = await existingEntry(params.id);
	const entry = await deskEntryDto(await serverDatabase(), id, null);
	return json(entry, { headers: { etag: `"${entry.revision}"` } });
});
