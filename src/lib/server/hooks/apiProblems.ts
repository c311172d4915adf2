import type { Handle } from '@sveltejs/kit';
import { Problem, problemResponse } from '../api/problem';

const DETAILS: Record<number, string> = {
	400: 'The address or the request could not be read.',
	403: 'This request is not allowed from there.',
	404: 'There is nothing at this address.',
	405: 'This address does not answer that method.',
	413: 'The request is too large.'
};

/** Everything under /api/v1 that is not a success is a problem document, whatever made it. */
export const apiProblems: Handle = async ({ event, resolve }) => {
	if (!isApi(event.url.pathname)) return resolve(event);
	const response = await resolve(event);
	if (response.status < 400) return response;
	if (response.headers.get('content-type')?.startsWith('application/problem+json')) return response;
	const allow = response.headers.get('allow');
	const detail = DETAILS[response.status] ?? 'The server could not answer. The log has the details.';
	return problemResponse(new Problem(response.status, detail, [], allow ? { allow } : {}));
};

/** Whether a path belongs to the API. */
export function isApi(pathname: string): boolean {
	return pathname === '/api/v1' || pathname.startsWith('/api/v1/');
}
