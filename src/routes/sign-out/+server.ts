import { redirect, type RequestHandler } from '@sveltejs/kit';
import { recordAudit } from '$lib/server/people/audit';
import { endSession } from '$lib/server/people/sessions';

/** Signs this browser out and goes to the start page; also without a sign-in, so that a second press does no harm. */
export const POST: RequestHandler = async (event) => {
	const { user } = event.locals;
	if (user) await recordAudit({ action: 'signed out', subject: user.email });
	await endSession(event);
	redirect(303, '/');
};
