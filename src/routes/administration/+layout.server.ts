import { countFailed } from '$lib/server/mail/outbox';
import { mailRoute } from '$lib/server/mail/transport';
import { requireRole } from '$lib/server/people/roles';
import type { LayoutServerLoad } from './$types';

export const load: LayoutServerLoad = async () => {
	requireRole('administrator');
	return { mailRoute: mailRoute(), failedMails: await countFailed() };
};
