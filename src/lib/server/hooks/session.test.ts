import type { RequestEvent } from '@sveltejs/kit';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { cookieJar } from '../../../../tests/support/cookies';
import { temporaryDatabase } from '../../../../tests/support/database';
import { newPerson } from '../../../../tests/support/people';
import { requestEvent } from '../../../../tests/support/requestEvent';
import { ApiToken, Person, SessionRow } from '../db/models/people';
import { endSession, listDevices, startSession } from '../people/sessions';
import { makeToken } from '../people/tokens';
import { session } from './session';

vi.mock('$app/server', () => ({
	getRequestEvent: () => {
		throw new Error('no request');
	}
}));

const DAY_MS = 86_400_000;

beforeEach(async () => {
	vi.useFakeTimers({ toFake: ['Date'], now: new Date('2026-12-01T12:00:00Z') });
	await temporaryDatabase();
});
afterEach(() => void vi.useRealTimers());

/** The event of a request after the hook has run, and the answer. */
async function ask(jar: ReturnType<typeof cookieJar>, path = '/', headers: Record<string, string> = {}) {
	const request = new Request(`http://localhost:3000${path}`, { headers });
	const event: RequestEvent = requestEvent(request, { cookies: jar.cookies });
	const response = await session({ event, resolve: () => new Response('page') });
	return { event, response, user: event.locals.user };
}

async function signIn(jar: ReturnType<typeof cookieJar>, personId: string) {
	const headers = { 'user-agent': 'Browser 1' };
	await startSession(
		requestEvent(new Request('http://localhost:3000/sign-in', { headers }), { cookies: jar.cookies }),
		personId
	);
}

describe('a session of the browser', () => {
	it('makes its owner known, in a cookie no script and no other site can use', async () => {
		const jar = cookieJar();
		expect((await ask(jar)).user).toBe(null);
		const id = await newPerson({ name: 'Ada', roles: ['dentist'] });
		await signIn(jar, id);
		expect(jar.kept.get('session')?.options).toMatchObject({
			...{ httpOnly: true, sameSite: 'lax', path: '/', secure: false }
		});
		const { user, response } = await ask(jar);
		expect(user).toMatchObject({ id, name: 'Ada', roles: ['dentist'], scopes: null, secondFactor: false });
		expect(response.headers.get('cache-control')).toBe('private, no-cache');
		expect(await listDevices(id)).toMatchObject([
			{ agent: 'Browser 1', address: '192.0.2.1', handle: user?.handle }
		]);
	});

	it('is a new one with every sign-in, and the one before ends', async () => {
		const jar = cookieJar();
		const id = await newPerson();
		await signIn(jar, id);
		const planted = jar.kept.get('session')!.value;
		await signIn(jar, id);
		expect(jar.kept.get('session')!.value).not.toBe(planted);
		expect(await SessionRow.count()).toBe(1);
		const old = cookieJar();
		old.cookies.set('session', planted, { path: '/' });
		expect((await ask(old)).user).toBe(null);
	});

	it('ends after 14 days without use, and drops its cookie', async () => {
		const jar = cookieJar();
		await signIn(jar, await newPerson());
		vi.setSystemTime(Date.now() + 14 * DAY_MS + 1000);
		expect((await ask(jar)).user).toBe(null);
		expect(jar.kept.get('session')).toMatchObject({ value: '', options: { maxAge: 0 } });
		expect(await SessionRow.count()).toBe(0);
	});

	it('is renewed by use once half of its time is over', async () => {
		const jar = cookieJar();
		const id = await newPerson();
		await signIn(jar, id);
		for (let week = 0; week < 5; week++) {
			vi.setSystemTime(Date.now() + 8 * DAY_MS);
			expect((await ask(jar)).user?.id).toBe(id);
		}
		const [{ expiresAt, seenAt }] = await listDevices(id);
		expect(Date.parse(expiresAt) - Date.now()).toBe(14 * DAY_MS);
		expect(Date.parse(seenAt)).toBe(Date.now());
	});

	it('ends with the account, and by signing out', async () => {
		const jar = cookieJar();
		const id = await newPerson();
		await signIn(jar, id);
		await Person.update({ deactivatedAt: 'now' }, { where: { id } });
		expect((await ask(jar)).user).toBe(null);
		await Person.update({ deactivatedAt: null }, { where: { id } });
		await signIn(jar, id);
		const { event } = await ask(jar);
		await endSession(event);
		expect((await ask(jar)).user).toBe(null);
	});
});

describe('a token of the API', () => {
	const bearer = (token: string) => ({ authorization: `Bearer ${token}` });

	it('speaks for its owner, with its scopes, under /api/v1 alone', async () => {
		const id = await newPerson({ roles: ['educator'] });
		const token = await makeToken({ id, email: 'a@example.org' }, 'script', ['table:read', 'table:read'], 7);
		expect(token).toMatch(/^wm_[\w-]{43}$/);
		expect((await ask(cookieJar(), '/api/v1/me', bearer(token!))).user).toMatchObject({
			...{ id, roles: ['educator'], scopes: ['table:read'], handle: null }
		});
		expect((await ask(cookieJar(), '/account', bearer(token!))).user).toBe(null);
		expect(JSON.stringify(await ApiToken.findAll())).not.toContain(token);
	});

	it.each(['Bearer wm_unknown', 'Bearer', 'Basic YTpi', 'Bearer a b', 'Bearer x'])(
		'that does not hold is refused with 401: %s',
		async (authorization) => {
			const jar = cookieJar();
			await signIn(jar, await newPerson());
			const { response, user } = await ask(jar, '/api/v1/teeth', { authorization });
			expect(response.status).toBe(401);
			expect(response.headers.get('content-type')).toBe('application/problem+json');
			expect(user).toBe(null);
		}
	);

	it('ends with its days and with its owner', async () => {
		const id = await newPerson();
		const token = (await makeToken({ id, email: 'a' }, 'script', ['account:read'], 7))!;
		vi.setSystemTime(Date.now() + 7 * DAY_MS - 1000);
		expect((await ask(cookieJar(), '/api/v1/me', bearer(token))).user?.id).toBe(id);
		await Person.update({ deactivatedAt: 'now' }, { where: { id } });
		expect((await ask(cookieJar(), '/api/v1/me', bearer(token))).response.status).toBe(401);
		await Person.update({ deactivatedAt: null }, { where: { id } });
		vi.setSystemTime(Date.now() + 2000);
		expect((await ask(cookieJar(), '/api/v1/me', bearer(token))).response.status).toBe(401);
	});

	it('is one of twenty at most', async () => {
		const id = await newPerson();
		for (let made = 0; made < 20; made++)
			expect(await makeToken({ id, email: 'a' }, `${made}`, ['account:read'], 7)).not.toBe(null);
		expect(await makeToken({ id, email: 'a' }, 'more', ['account:read'], 7)).toBe(null);
	});
});
