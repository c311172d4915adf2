import { peopleQuerySchema } from '$lib/schemas/people';
import { fromCursor, pageQuery } from '$lib/server/pageQuery';
import { listPeople } from '$lib/server/people/directory';
import { requireRole } from '$lib/server/people/roles';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ url }) => {
	requireRole('administrator');
	const query = pageQuery(url.searchParams, peopleQuerySchema);
	return { query, ...(await fromCursor(query, listPeople)) };
};
