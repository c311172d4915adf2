import type { Handle } from '@sveltejs/kit';
import { Problem, problemResponse } from '../api/problem';
import { signInAddress, unauthorized } from '../people/roles';
import { readSettings } from '../people/settings';
import { isApi } from './apiProblems';

/**
 * Routes that stay open to visitors where the table is closed: what explains the product, and the ways in. Everything else is taken to
 * show the table, so a new route is closed until somebody lists it here. Routes with a wall of their own are listed too.
 */
const OPEN_ROUTES = [
	/^\/(about|health|preferences|api)$/,
	/^\/api\/v1\/(health|me|people|audit|openapi\.json)$/,
	/^\/(sign-in|sign-out|set-up|reset|invitation|confirm-email|account|administration|desk)(\/|$)/
];

/** Keeps visitors from the table where an administrator has closed it, pages and API alike; a token needs a scope for it. */
export const tableAccess: Handle = async ({ event, resolve }) => {
	const { route, url, locals } = event;
	if (route.id === null || OPEN_ROUTES.some((open) => open.test(route.id!))) return resolve(event);
	const scopes = locals.user?.scopes;
	if (locals.user && (!scopes || scopes.includes('table:read') || scopes.includes('table:write')))
		return resolve(event);
	if ((await readSettings()).tableOpen) return resolve(event);
	if (locals.user) return problemResponse(new Problem(403, 'The token needs the scope table:read.'));
	if (isApi(url.pathname)) return problemResponse(unauthorized());
	return new Response(null, { status: 303, headers: { location: signInAddress(url) } });
};
