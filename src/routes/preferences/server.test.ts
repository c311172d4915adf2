import { readPreferences, type Preferences } from '$lib/schemas/preferences';
import { PREFERENCES_COOKIE } from '$lib/server/hooks/preferences';
import { isHttpError, isRedirect, type Cookies } from '@sveltejs/kit';
import { describe, expect, it } from 'vitest';
import { requestEvent } from '../../../tests/support/requestEvent';
import { POST } from './+server';

const ORIGIN = 'https://canals.example.org';

/** Where a sent form leads, and the cookies it sets. */
async function send(fields: Record<string, string>, before: Preferences = readPreferences({})) {
	const kept: Record<string, string> = {};
	const cookies = { set: (name: string, value: string) => (kept[name] = value) } as unknown as Cookies;
	const request = new Request(`${ORIGIN}/preferences`, { method: 'POST', body: new URLSearchParams(fields) });
	try {
		await POST(
			requestEvent(request, { cookies, locals: { requestId: '', preferences: before, user: null } })
		);
	} catch (thrown) {
		if (!isRedirect(thrown)) throw thrown;
		return { status: thrown.status, location: thrown.location, kept };
	}
	throw new Error('It leads nowhere.');
}

describe('the preferences form', () => {
	it('keeps the choice and leads back to the page it came from', async () => {
		const back = '/teeth/maxillary-first-molar/MB?method=cbct';
		const sent = await send({ theme: 'dark', numbers: 'universal', units: 'in-100', back });
		expect(sent).toMatchObject({ status: 303, location: back });
		expect(JSON.parse(sent.kept[PREFERENCES_COOKIE])).toEqual({
			theme: 'dark',
			numbers: 'universal',
			threshold: 0.9,
			units: 'in-100'
		});
	});

	it('keeps the decision line as a number, and what the form does not name as it was', async () => {
		const { kept } = await send(
			{ threshold: '0.95' },
			{ theme: 'dark', numbers: 'palmer', threshold: 0.8, units: 'in-100' }
		);
		expect(JSON.parse(kept[PREFERENCES_COOKIE])).toEqual({
			theme: 'dark',
			numbers: 'palmer',
			threshold: 0.95,
			units: 'in-100'
		});
		for (const threshold of ['0.4', '1', '', 'high']) expect((await send({ threshold })).kept).toEqual({});
	});

	it('keeps nothing of a choice that is none', async () => {
		expect(await send({ theme: 'neon', numbers: 'iso', back: '/about' })).toEqual({
			...{ status: 303, location: '/about', kept: {} }
		});
		expect((await send({ back: '/about' })).kept).toEqual({});
	});

	it.each([
		'https://evil.example/',
		'//evil.example/',
		'/\\evil.example/',
		'/.//evil.example/',
		'/about/..//evil.example/',
		`${ORIGIN}//evil.example/`,
		'http://[',
		'javascript:alert(1)',
		''
	])('never leads away from this site: %s', async (back) => {
		const { location } = await send({ theme: 'dark', numbers: 'iso', back });
		// As a browser reads the answer.
		expect(new URL(location, `${ORIGIN}/preferences`).origin).toBe(ORIGIN);
		expect(location).toMatch(/^\//);
	});

	it('leads to the start without an address', async () => {
		expect((await send({ theme: 'dark', numbers: 'iso' })).location).toBe('/');
	});

	it.each([
		['JSON', '{"theme":"dark"}', 'application/json'],
		['no form at all', 'theme=dark', 'text/plain'],
		['a form cut short', 'theme=dark', 'multipart/form-data; boundary=x']
	])('refuses %s with 400', async (_, body, type) => {
		const request = new Request(`${ORIGIN}/preferences`, {
			method: 'POST',
			body,
			headers: { 'content-type': type }
		});
		const thrown: unknown = await Promise.resolve(POST(requestEvent(request))).catch(
			(error: unknown) => error
		);
		expect(isHttpError(thrown, 400)).toBe(true);
	});

	it.each([
		['https://canals.example.org', true],
		['http://localhost:3000', false],
		['http://192.0.2.7:3000', false]
	])('keeps the cookie at %s for https alone: %s', async (origin, secure) => {
		let options: unknown;
		const cookies = {
			set: (_: string, __: string, given: unknown) => (options = given)
		} as unknown as Cookies;
		const form = new URLSearchParams({ theme: 'dark', numbers: 'iso' });
		const request = new Request(`${origin}/preferences`, { method: 'POST', body: form });
		await Promise.resolve(POST(requestEvent(request, { cookies }))).catch(() => undefined);
		expect(options).toMatchObject({ httpOnly: true, sameSite: 'lax', path: '/', secure });
	});
});
