import { endpoint, readQuery } from '$lib/server/api/endpoint';
import { noQuerySchema } from '$lib/schemas/people';
import { requireUser } from '$lib/server/people/roles';

export const GET = endpoint(({ url }) => {
	const { id, name, email, roles, secondFactor, scopes } = requireUser({ scope: 'account:read' });
	readQuery(url.searchParams, noQuerySchema);
	return { id, name, email, roles, secondFactor, scopes };
});
