import type { Handle } from '@sveltejs/kit';
import { Problem, problemResponse } from '../api/problem';
import { isApi } from './apiProblems';

const UNSAFE = new Set(['POST', 'PUT', 'PATCH', 'DELETE']);
const FORM_TYPES = /^(application\/x-www-form-urlencoded|multipart\/form-data|text\/plain)\s*(;|$)/i;

/**
 * Refuses writes that another site's page sends. Stands in for kit's own check, which runs before any hook (so that the API could not
 * answer with a problem document) and looks at form content types only: here every unsafe request that names a foreign origin is refused,
 * and a form must name one.
 */
export const originGuard: Handle = async ({ event, resolve }) => {
	const { request, url } = event;
	if (!UNSAFE.has(request.method)) return resolve(event);
	const origin = request.headers.get('origin');
	const isForm = FORM_TYPES.test(request.headers.get('content-type') ?? '');
	if (origin === url.origin || (origin === null && !isForm)) return resolve(event);
	const detail = 'This request comes from another site, which is not allowed.';
	if (isApi(url.pathname)) {
		return isForm && origin === null
			? problemResponse(new Problem(415, 'Send the request as application/json.'))
			: problemResponse(new Problem(403, detail));
	}
	return new Response(detail, { status: 403, headers: { 'content-type': 'text/plain; charset=utf-8' } });
};
