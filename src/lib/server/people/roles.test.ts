import type { RequestEvent } from '@sveltejs/kit';
import { isHttpError, isRedirect } from '@sveltejs/kit';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import { requestEvent } from '../../../../tests/support/requestEvent';
import { Problem } from '../api/problem';
import { requireRole, requireUser, type SignedIn } from './roles';

let event: RequestEvent;
vi.mock('$app/server', () => ({ getRequestEvent: () => event }));

const educator: SignedIn = {
	...{ id: 'a', email: 'a@example.org', name: 'Ada', roles: ['educator'], secondFactor: false },
	...{ handle: 'h', scopes: null }
};

function ask(path: string, user: SignedIn | null, method = 'GET') {
	event = requestEvent(new Request(`http://localhost:3000${path}`, { method }), {
		locals: {
			requestId: '',
			preferences: { theme: 'system', numbers: 'iso', threshold: 0.9, units: 'percent' },
			user
		}
	});
}

function thrownBy(work: () => unknown): unknown {
	try {
		work();
	} catch (thrown) {
		return thrown;
	}
	throw new Error('It let everybody in.');
}

beforeEach(() => ask('/', null));

describe('requireUser', () => {
	it('gives the person', () => {
		ask('/account', educator);
		expect(requireUser()).toBe(educator);
	});

	it('leads a visitor from a page to the sign-in and back', () => {
		ask('/account/devices?x=1&y=2', null);
		const thrown = thrownBy(requireUser);
		expect(isRedirect(thrown) && [thrown.status, thrown.location]).toEqual([
			303,
			'/sign-in?to=%2Faccount%2Fdevices%3Fx%3D1%26y%3D2'
		]);
	});

	it('marks a form that came without a sign-in, so that it is carried through it', () => {
		ask('/account?/name', null, 'POST');
		expect(isHttpError(thrownBy(requireUser), 401)).toBe(true);
		expect(event.locals.signInNeeded).toBe(true);
	});

	it('answers the API with 401 and how to be known', () => {
		ask('/api/v1/me', null);
		const thrown = thrownBy(requireUser);
		expect(thrown).toBeInstanceOf(Problem);
		expect(thrown).toMatchObject({
			status: 401,
			headers: { 'www-authenticate': 'Bearer realm="Watersmeet"' }
		});
	});

	it('lets a token do what its scopes say and nothing else', () => {
		ask('/api/v1/me', { ...educator, handle: null, scopes: ['account:read'] });
		expect(requireUser({ scope: 'account:read' }).id).toBe('a');
		expect(thrownBy(() => requireUser({ scope: 'table:read' }))).toMatchObject({ status: 403 });
		expect(thrownBy(() => requireUser())).toMatchObject({ status: 403 });
	});
});

describe('requireRole', () => {
	it('takes one role, or one of several', () => {
		ask('/desk', educator);
		expect(requireRole('educator')).toBe(educator);
		expect(requireRole(['administrator', 'educator'])).toBe(educator);
	});

	it('refuses a person without it, on pages and in the API', () => {
		ask('/administration/people', educator);
		expect(
			isHttpError(
				thrownBy(() => requireRole('administrator')),
				403
			)
		).toBe(true);
		expect(event.locals.signInNeeded).toBeUndefined();
		ask('/api/v1/people', educator);
		expect(thrownBy(() => requireRole(['administrator', 'dentist']))).toMatchObject({ status: 403 });
	});

	it('asks a visitor to sign in first', () => {
		ask('/api/v1/people', null);
		expect(thrownBy(() => requireRole('administrator'))).toMatchObject({ status: 401 });
	});
});
