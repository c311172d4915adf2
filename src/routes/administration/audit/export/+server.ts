import { auditQuerySchema } from '$lib/schemas/people';
import { pageQuery } from '$lib/server/pageQuery';
import { recordAudit } from '$lib/server/people/audit';
import { exportAudit } from '$lib/server/people/auditLog';
import { requireRole } from '$lib/server/people/roles';
import type { RequestHandler } from './$types';

/** The filtered audit log as CSV. Taking it out is a deed too, and stands in it. */
export const GET: RequestHandler = async ({ url }) => {
	requireRole('administrator');
	const filter = pageQuery(url.searchParams, auditQuerySchema);
	await recordAudit({ action: 'audit exported', detail: url.search.slice(1) });
	return new Response(exportAudit(filter), {
		headers: {
			'content-type': 'text/csv; charset=utf-8',
			'content-disposition': `attachment; filename="audit-${new Date().toISOString().slice(0, 10)}.csv"`,
			'cache-control': 'no-store'
		}
	});
};
