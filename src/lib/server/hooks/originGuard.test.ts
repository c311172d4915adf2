import { describe, expect, it } from 'vitest';
import { requestEvent } from '../../../../tests/support/requestEvent';
import { originGuard } from './originGuard';

const OWN = 'https://canals.example.org';
const FORM = 'application/x-www-form-urlencoded';
const JSON_TYPE = 'application/json';

/** Status and content type of the answer; 200 if the request was let through. */
async function answer(path: string, method: string, headers: Record<string, string>) {
	const event = requestEvent(new Request(`${OWN}${path}`, { method, headers }));
	const response = await originGuard({ event, resolve: () => new Response('through') });
	return { status: response.status, type: response.headers.get('content-type') };
}

describe('originGuard lets through', () => {
	it.each([
		['a form of this site', 'POST', { origin: OWN, 'content-type': FORM }],
		['JSON of this site', 'POST', { origin: OWN, 'content-type': JSON_TYPE }],
		['JSON of a program, which names no origin', 'POST', { 'content-type': JSON_TYPE }],
		['a delete of this site', 'DELETE', { origin: OWN }],
		['reading from anywhere', 'GET', { origin: 'https://evil.example' }],
		['a question what is allowed', 'OPTIONS', { origin: 'https://evil.example' }]
	])('%s', async (_, method, headers) => {
		expect((await answer('/preferences', method, headers as Record<string, string>)).status).toBe(200);
		expect((await answer('/api/v1/pool', method, headers as Record<string, string>)).status).toBe(200);
	});
});

describe('originGuard refuses', () => {
	const foreign = [
		'https://evil.example',
		'http://canals.example.org',
		'https://canals.example.org:8443',
		'https://canals.example.org.evil.example',
		'null',
		''
	];

	it.each(foreign)('every write from the origin "%s"', async (origin) => {
		for (const method of ['POST', 'PUT', 'PATCH', 'DELETE']) {
			for (const type of [FORM, JSON_TYPE, 'text/plain']) {
				const page = await answer('/preferences', method, { origin, 'content-type': type });
				expect(page).toEqual({ status: 403, type: 'text/plain; charset=utf-8' });
				const api = await answer('/api/v1/pool', method, { origin, 'content-type': type });
				expect(api).toEqual({ status: 403, type: 'application/problem+json' });
			}
		}
	});

	it.each([FORM, `${FORM}; charset=utf-8`, 'multipart/form-data; boundary=x', 'text/plain', 'TEXT/PLAIN'])(
		'a form without an origin, sent as %s',
		async (type) => {
			expect((await answer('/preferences', 'POST', { 'content-type': type })).status).toBe(403);
			expect(await answer('/api/v1/pool', 'POST', { 'content-type': type })).toEqual({
				status: 415,
				type: 'application/problem+json'
			});
		}
	);
});
