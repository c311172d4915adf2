import { randomUUID } from 'node:crypto';
import type { Handle } from '@sveltejs/kit';
import { log } from '../log';

/** Gives each request an id (sent back as x-request-id) and logs method, route, status and time: no address, no query, no body. */
export const requestLog: Handle = async ({ event, resolve }) => {
	event.locals.requestId = randomUUID();
	const started = performance.now();
	const response = await resolve(event);
	response.headers.set('x-request-id', event.locals.requestId);
	log.info(
		{
			request: event.locals.requestId,
			method: event.request.method,
			route: event.route.id ?? 'none',
			status: response.status,
			ms: Math.round((performance.now() - started) * 10) / 10
		},
		'request'
	);
	return response;
};
