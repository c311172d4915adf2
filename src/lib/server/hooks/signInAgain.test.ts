import { describe, expect, it } from 'vitest';
import { requestEvent } from '../../../../tests/support/requestEvent';
import { signInAgain } from './signInAgain';

const locals = (signInNeeded?: boolean) => ({ signInNeeded }) as App.Locals;

function sent(headers: Record<string, string> = {}) {
	const body = new URLSearchParams([
		['name', 'Ada & "Ben" née\u2028'],
		['category', 'a'],
		['category', 'b'],
		['own-password', 'secret']
	]);
	return new Request('http://localhost:3000/account?/name', { method: 'POST', body, headers });
}

describe('a form without a sign-in', () => {
	it('sent by a script is a failed action with what was typed, as kit reads it', async () => {
		const event = requestEvent(sent({ 'x-sveltekit-action': 'true' }), { locals: locals(true) });
		const response = await signInAgain({ event, resolve: () => new Response('error', { status: 401 }) });
		expect(response.status).toBe(200);
		const text = await response.text();
		// devalue's flat list, written out by hand; that kit reads it is shown end to end (people.spec.ts).
		const { data, ...result } = JSON.parse(text) as { data: string };
		expect(result).toEqual({ type: 'failure', status: 401 });
		expect(JSON.parse(data)).toEqual([
			...[{ signInAgain: 1, values: 2 }, true, { name: 3, category: 6 }],
			...['Ada & "Ben" née\u2028', 'a', 'b', [4, 5]]
		]);
		expect(text).not.toContain('secret');
	});

	it('sent by the browser is sent on with its body, and says where it was meant to go', async () => {
		const event = requestEvent(sent(), { locals: locals(true) });
		const response = await signInAgain({ event, resolve: () => new Response('error', { status: 401 }) });
		expect(response.status).toBe(307);
		expect(response.headers.get('location')).toBe('/sign-in/again?/carry&to=%2Faccount%3F%2Fname');
	});

	it('is the only thing it touches', async () => {
		const answer = new Response('page');
		expect(
			await signInAgain({ event: requestEvent(sent(), { locals: locals() }), resolve: () => answer })
		).toBe(answer);
	});
});
