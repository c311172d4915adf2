import { peopleQuerySchema } from '$lib/schemas/people';
import { endpoint, readQuery } from '$lib/server/api/endpoint';
import { listPeople } from '$lib/server/people/directory';
import { requireRole } from '$lib/server/people/roles';

export const GET = endpoint(({ url }) => {
	requireRole('administrator', { scope: 'people:read' });
	return listPeople(readQuery(url.searchParams, peopleQuerySchema));
});
