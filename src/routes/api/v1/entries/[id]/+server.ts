import { endpoint } from '$lib/server/api/endpoint';
import { Problem } from '$lib/server/api/problem';
import { serverDatabase } from '$lib/server/db/server';
import { findEntry } from '$lib/server/table/entries';
import type { RequestEvent } from './$types';

export const GET = endpoint<RequestEvent>(async ({ params }) => {
	const entry = /^\d{1,15}$/.test(params.id)
		? await findEntry(await serverDatabase(), Number(params.id))
		: null;
	if (!entry)
		throw new Problem(404, 'There is no published entry with this id.', [
			{ path: 'id', message: 'Unknown id.' }
		]);
	return entry;
});
