import type { Handle } from '@sveltejs/kit';
import { Problem, problemResponse } from '../api/problem';
import { isApi } from './apiProblems';

/** What a form may hold that brings no file. Endpoints of the API have smaller limits of their own (`readBody`). */
const FORM_BYTES = 2 * 1024 * 1024;
const UNSAFE = new Set(['POST', 'PUT', 'PATCH', 'DELETE']);
/** Routes that take files; each says its own limit, and says it at the field. */
const TAKES_FILES = /^\/desk\/(import|sources\/\[id\])$/;

/** Refuses a body that is larger than its route takes, before anything of it is read. The adapter's limit is that of the largest file. */
export const bodyLimit: Handle = async ({ event, resolve }) => {
	const { request, route, url } = event;
	if (!UNSAFE.has(request.method) || TAKES_FILES.test(route.id ?? '')) return resolve(event);
	const length = request.headers.get('content-length');
	// Browsers always say how long a form is; a body of unknown length is the API's to count.
	const unknown = length === null && request.body !== null && !isApi(url.pathname);
	if (!unknown && Number(length ?? 0) <= FORM_BYTES) return resolve(event);
	const detail = unknown
		? 'Say how long the request is (Content-Length).'
		: 'The request is larger than 2 MB, which this address does not take.';
	if (isApi(url.pathname)) return problemResponse(new Problem(413, detail));
	return new Response(detail, {
		status: unknown ? 411 : 413,
		headers: { 'content-type': 'text/plain; charset=utf-8' }
	});
};
