import type { Handle } from '@sveltejs/kit';
import { environment } from '../config';

const HEADERS = {
	'x-content-type-options': 'nosniff',
	'x-frame-options': 'DENY',
	'referrer-policy': 'same-origin',
	'cross-origin-opener-policy': 'same-origin',
	'cross-origin-resource-policy': 'same-origin',
	'permissions-policy': 'camera=(), microphone=(), geolocation=(), payment=()'
};
const HSTS_SECONDS = 31_536_000;

/** Headers every response carries; the content security policy is kit's own (svelte.config.js). */
export const securityHeaders: Handle = async ({ event, resolve }) => {
	const response = await resolve(event);
	for (const [name, value] of Object.entries(HEADERS)) response.headers.set(name, value);
	if (environment.ORIGIN.startsWith('https:'))
		response.headers.set('strict-transport-security', `max-age=${HSTS_SECONDS}`);
	return response;
};
