import type { Handle } from '@sveltejs/kit';
import { problemResponse } from '../api/problem';
import { unauthorized } from '../people/roles';
import { readSession } from '../people/sessions';
import { readToken } from '../people/tokens';
import { isApi } from './apiProblems';

const BEARER = /^Bearer +([\w-]+)$/i;

/**
 * Finds who makes the request: for the API by the token it carries, otherwise by the cookie of the browser. A token that is sent and does
 * not hold is refused at once, because a script that believes itself signed in must not go on as a visitor.
 */
export const session: Handle = async ({ event, resolve }) => {
	event.locals.user = null;
	const authorization = event.request.headers.get('authorization');
	if (authorization !== null && isApi(event.url.pathname)) {
		const token = BEARER.exec(authorization)?.[1];
		event.locals.user = token ? await readToken(token) : null;
		if (!event.locals.user)
			return problemResponse(unauthorized('This token is not known, or no longer valid.'));
	} else {
		const owner = await readSession(event);
		if (owner) event.locals.user = { ...owner, scopes: null };
	}
	const response = await resolve(event);
	// What a signed-in person sees belongs into no cache but the browser's own.
	if (event.locals.user && !response.headers.has('cache-control'))
		response.headers.set('cache-control', 'private, no-cache');
	return response;
};
