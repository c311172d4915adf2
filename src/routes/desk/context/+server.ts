import { json, type RequestHandler } from '@sveltejs/kit';
import { serverDatabase } from '$lib/server/db/server';
import { numberOfPath } from '$lib/server/api/ifMatch';
import { requireRole } from '$lib/server/people/roles';
import { contextFor } from '$lib/server/table/deskContext';

/** What an entry is compared with while it is typed: the page asks when source, tooth or root change. */
export const GET: RequestHandler = async ({ url }) => {
	requireRole('educator');
	const read = (name: string) => (url.searchParams.get(name) ?? '').slice(0, 200);
	const about = { source: read('source'), tooth: read('tooth'), root: read('root') };
	return json(await contextFor(await serverDatabase(), about, numberOfPath(read('self'))));
};
