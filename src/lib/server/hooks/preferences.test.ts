import type { Cookies, ResolveOptions } from '@sveltejs/kit';
import { describe, expect, it } from 'vitest';
import { requestEvent } from '../../../../tests/support/requestEvent';
import { PREFERENCES_COOKIE, preferences } from './preferences';

/** Preferences of a visitor with this cookie, and the first tag of the page as they get it. */
async function visit(cookie: string | undefined) {
	const cookies = { get: (name: string) => (name === PREFERENCES_COOKIE ? cookie : undefined) } as Cookies;
	const event = requestEvent(new Request('http://localhost:3000/'), { cookies });
	let options: ResolveOptions | undefined;
	await preferences({
		event,
		resolve: (_, given) => {
			options = given;
			return new Response();
		}
	});
	const html = '<html lang="en" data-theme="%watersmeet.theme%">';
	const tag = await options!.transformPageChunk!({ html, done: true });
	return { preferences: event.locals.preferences, tag };
}

describe('preferences', () => {
	it('are those of the cookie, and the theme stands in the page itself', async () => {
		expect(await visit('{"theme":"dark","numbers":"palmer","threshold":0.95}')).toEqual({
			preferences: { theme: 'dark', numbers: 'palmer', threshold: 0.95, units: 'percent' },
			tag: '<html lang="en" data-theme="dark">'
		});
	});

	it.each([
		['no cookie', undefined],
		['an empty one', ''],
		['text that is no JSON', '{"theme":'],
		['null', 'null'],
		['a list', '["dark"]'],
		['a number', '7'],
		['a theme that would break out of the tag', '{"theme":"\\"><script>alert(1)</script>"}'],
		['an object for a theme', '{"theme":{"a":1},"numbers":[]}']
	])('are the usual ones with %s', async (_, cookie) => {
		expect(await visit(cookie)).toEqual({
			preferences: { theme: 'system', numbers: 'iso', threshold: 0.9, units: 'percent' },
			tag: '<html lang="en" data-theme="system">'
		});
	});

	it('keep what is set where the rest is not', async () => {
		expect((await visit('{"theme":"light","other":1}')).preferences).toEqual({
			theme: 'light',
			numbers: 'iso',
			threshold: 0.9,
			units: 'percent'
		});
	});

	it.each([
		['{"theme":"neon","numbers":"palmer","threshold":0.8}', { theme: 'system' }],
		['{"theme":"dark","numbers":7,"threshold":0.8}', { theme: 'dark', numbers: 'iso' }],
		['{"theme":"dark","numbers":"palmer","threshold":2}', { theme: 'dark', threshold: 0.9 }],
		['{"theme":"dark","numbers":"palmer","threshold":"a half"}', { theme: 'dark', threshold: 0.9 }],
		['{"theme":"dark","numbers":"palmer","threshold":null}', { theme: 'dark', threshold: 0.9 }]
	])('lose a spoilt field alone: %s', async (cookie, changes) => {
		expect((await visit(cookie)).preferences).toEqual({
			...{ numbers: 'palmer', threshold: 0.8, units: 'percent' },
			...changes
		});
	});
});
