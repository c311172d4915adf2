import { getRequestEvent } from '$app/server';
import { error, redirect } from '@sveltejs/kit';
import type { Role, Scope } from '$lib/schemas/terms';
import { Problem } from '../api/problem';
import { isApi } from '../hooks/apiProblems';

/** Who makes a request: by a session of the browser or by a token of the API. */
export interface SignedIn {
	id: string;
	email: string;
	name: string;
	roles: Role[];
	secondFactor: boolean;
	/** The session's handle; null for a token. */
	handle: string | null;
	/** What the token may be used for; null for a session, which may do all its owner may. */
	scopes: Scope[] | null;
}

interface Needs {
	/** Scope that a token must have. Without one, tokens are refused: what is only for the screen says nothing. */
	scope?: Scope;
}

/**
 * The person who makes this request; first in every load, action and endpoint that needs one. For the API it throws a Problem (401 nobody,
 * 403 a token without the scope); a page leads to the sign-in and back, and a form that was sent is carried through it
 * (hooks/signInAgain.ts).
 */
export function requireUser({ scope }: Needs = {}): SignedIn {
	const { locals, url, request } = getRequestEvent();
	const { user } = locals;
	if (user) {
		if (user.scopes && !(scope && user.scopes.includes(scope)))
			throw new Problem(
				403,
				scope ? `The token needs the scope ${scope}.` : 'This is not open to tokens; sign in with a browser.'
			);
		return user;
	}
	if (isApi(url.pathname)) throw unauthorized();
	if (request.method !== 'GET' && request.method !== 'HEAD') {
		locals.signInNeeded = true;
		error(401, 'Sign in first.');
	}
	redirect(303, signInAddress(url));
}

/**
 * The person who makes this request, who must have one of the roles; see `requireUser`. A person without it gets 403.
 * @param role one role, or several of which one is enough
 */
export function requireRole(role: Role | readonly Role[], needs: Needs = {}): SignedIn {
	const user = requireUser(needs);
	if (hasRole(user, role)) return user;
	if (isApi(getRequestEvent().url.pathname)) throw new Problem(403, 'Your roles do not allow this.');
	error(403, 'Your roles do not allow this.');
}

/** Whether somebody has a role, or one of several. */
export const hasRole = (user: Pick<SignedIn, 'roles'> | null, role: Role | readonly Role[]): boolean =>
	!!user && [role].flat().some((one) => user.roles.includes(one));

/** The API's answer to a request without an account. */
export const unauthorized = (detail = 'Sign in, or send a token as Authorization: Bearer.') =>
	new Problem(401, detail, [], { 'www-authenticate': 'Bearer realm="Watersmeet"' });

/** The sign-in's address, from where it leads back to a page. */
export const signInAddress = (url: URL): string =>
	`/sign-in?${new URLSearchParams({ to: url.pathname + url.search })}`;
