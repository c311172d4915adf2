import { auditQuerySchema } from '$lib/schemas/people';
import { endpoint, readQuery } from '$lib/server/api/endpoint';
import { listAudit } from '$lib/server/people/auditLog';
import { requireRole } from '$lib/server/people/roles';

export const GET = endpoint(({ url }) => {
	requireRole('administrator', { scope: 'audit:read' });
	return listAudit(readQuery(url.searchParams, auditQuerySchema));
});
