import { auditQuerySchema } from '$lib/schemas/people';
import { fromCursor, pageQuery } from '$lib/server/pageQuery';
import { listAudit } from '$lib/server/people/auditLog';
import { requireRole } from '$lib/server/people/roles';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ url }) => {
	requireRole('administrator');
	const query = pageQuery(url.searchParams, auditQuerySchema);
	return { query, ...(await fromCursor(query, listAudit)) };
};
