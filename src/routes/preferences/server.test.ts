import { PREFERENCES_COOKIE } from '$lib/server/hooks/preferences';
import { isRedirect, type Cookies } from '@sveltejs/kit';
import { describe, expect, it } from 'vitest';
import { requestEvent } from '../../../tests/support/requestEvent';
import { POST } from './+server';

const ORIGIN = 'https://canals.example.org';

/** Where a sent form leads, and the cookies it sets. */
async function send(fields: Record<string, string>) {
	const kept: Record<string, string> = {};
	const cookies = { set: (name: string, value: string) => (kept[name] = value) } as unknown as Cookies;
	const request = new Request(`${ORIGIN}/preferences`, { method: 'POST', body: new URLSearchParams(fields) });
	try {
		await POST(requestEvent(request, { cookies }));
	} catch (thrown) {
		if (!isRedirect(thrown)) throw thrown;
		return { status: thrown.status, location: thrown.location, kept };
	}
	throw new Error('It leads nowhere.');
}

describe('the preferences form', () => {
	it('keeps the choice and leads back to the page it came from', async () => {
		const back = '/teeth/maxillary-first-molar/MB?method=cbct';
		const sent = await send({ theme: 'dark', numbers: 'universal', back });
		expect(sent).toMatchObject({ status: 303, location: back });
		expect(JSON.parse(sent.kept[PREFERENCES_COOKIE])).toEqual({ theme: 'dark', numbers: 'universal' });
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
});
