import { randomUUID } from 'node:crypto';
import type { HandleServerError, ServerInit } from '@sveltejs/kit';
import { sequence } from '@sveltejs/kit/hooks';
import { apiProblems } from '$lib/server/hooks/apiProblems';
import { bodyLimit } from '$lib/server/hooks/bodyLimit';
import { compress } from '$lib/server/hooks/compress';
import { originGuard } from '$lib/server/hooks/originGuard';
import { preferences } from '$lib/server/hooks/preferences';
import { rateLimit } from '$lib/server/hooks/rateLimit';
import { requestLog } from '$lib/server/hooks/requestLog';
import { securityHeaders } from '$lib/server/hooks/securityHeaders';
import { session } from '$lib/server/hooks/session';
import { signInAgain } from '$lib/server/hooks/signInAgain';
import { tableAccess } from '$lib/server/hooks/tableAccess';
import { log } from '$lib/server/log';
import { startUp } from '$lib/server/startUp';

export const init: ServerInit = startUp;

export const handle = sequence(
	requestLog,
	compress,
	securityHeaders,
	apiProblems,
	rateLimit,
	bodyLimit,
	originGuard,
	session,
	tableAccess,
	preferences,
	signInAgain
);

export const handleError: HandleServerError = ({ error, event, status, message }) => {
	const id = event.locals.requestId ?? randomUUID();
	// A 404 is the visitor's typing, not a defect: it needs no stack in the log.
	if (status >= 500) log.error({ request: id, route: event.route.id, err: error }, 'unexpected error');
	return { message: status >= 500 ? 'Something went wrong on the server.' : message, id };
};
