import { json } from '@sveltejs/kit';
import { entryDeleteSchema, entryPatchSchema, type EntryBody } from '$lib/schemas/entries';
import { endpoint, readBody, readQuery } from '$lib/server/api/endpoint';
import { editedRevision, numberOfPath } from '$lib/server/api/ifMatch';
import { Problem } from '$lib/server/api/problem';
import { serverDatabase } from '$lib/server/db/server';
import { requireRole } from '$lib/server/people/roles';
import { act } from '$lib/server/table/deskActions';
import { contentOfBody, deskEntryDto, existingEntry } from '$lib/server/table/deskEntry';
import { findEntry } from '$lib/server/table/entries';
import { saveDraft } from '$lib/server/table/entryDrafts';
import type { RequestEvent } from './$types';

export const GET = endpoint<RequestEvent>(async ({ params }) => {
	const id = numberOfPath(params.id);
	const entry = id === null ? null : await findEntry(await serverDatabase(), id);
	if (!entry)
		throw new Problem(404, 'There is no published entry with this id.', [
			{ path: 'id', message: 'Unknown id.' }
		]);
	return entry;
});

export const PATCH = endpoint<RequestEvent>(async (event) => {
	const person = requireRole('educator', { scope: 'table:write' });
	const { id, content: present } = await existingEntry(event.params.id);
	const expected = editedRevision(event.request);
	const { action = 'save', changes = {}, ...rest } = await readBody(event, entryPatchSchema);
	const db = await serverDatabase();
	let tableRevision: number | null = null;
	if (action === 'save') {
		const content = await contentOfBody(db, { ...present, ...changes } as EntryBody, id);
		await saveDraft(db, id, person, { content, expected });
	} else {
		tableRevision = await act(db, { ...rest, action, id, person, expected });
	}
	return answer(id, tableRevision);
});

export const DELETE = endpoint<RequestEvent>(async ({ params, url, request }) => {
	const person = requireRole('educator', { scope: 'table:write' });
	const { id, work, standing } = await existingEntry(params.id);
	const expected = editedRevision(request);
	const { reason } = readQuery(url.searchParams, entryDeleteSchema);
	const action = standing === 'published' && !work ? 'withdraw' : 'discard';
	const tableRevision = await act(await serverDatabase(), { action, id, person, expected, reason });
	return answer(id, tableRevision);
});

async function answer(id: number, tableRevision: number | null): Promise<Response> {
	const entry = await deskEntryDto(await serverDatabase(), id, tableRevision);
	return json(entry, { headers: { etag: `"${entry.revision}"` } });
}
