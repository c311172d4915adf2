import type { Cookies, RequestEvent } from '@sveltejs/kit';
import { Lucia, TimeSpan } from 'lucia';
import type { Transaction } from 'sequelize';
import { environment } from '../config';
import { newId, newSecret, now } from './secrets';
import { sessionStore, type OwnerFacts, type SessionFacts } from './sessionStore';

/** How long a sign-in lasts unused; one in use is renewed when half of it has passed. */
const SESSION_DAYS = 14;
/** Use of a session is noted at most this often, so that reading pages does not mean writing. */
const SEEN_EVERY_MS = 5 * 60_000;
const AGENT_LENGTH = 300;

const secure = environment.ORIGIN.startsWith('https:');

/** Name of the session's cookie. The prefix binds it to this very host over https; browsers refuse it over plain http. */
export const SESSION_COOKIE = secure ? '__Host-session' : 'session';

// lucia is no longer developed: nothing outside this file knows of it.
const lucia = new Lucia(sessionStore, {
	sessionExpiresIn: new TimeSpan(SESSION_DAYS, 'd'),
	sessionCookie: {
		name: SESSION_COOKIE,
		attributes: { secure, sameSite: 'lax', path: '/' }
	},
	getUserAttributes: (owner) => owner,
	getSessionAttributes: (session) => session
});

declare module 'lucia' {
	interface Register {
		Lucia: typeof lucia;
		DatabaseUserAttributes: OwnerFacts;
		DatabaseSessionAttributes: SessionFacts;
	}
}

/** A person who is signed in, and the handle of the session. */
export interface SessionOwner extends OwnerFacts {
	id: string;
	handle: string;
}

/** A device that is signed in. */
export interface Device extends Omit<SessionFacts, 'handle'> {
	handle: string;
	expiresAt: string;
}

/**
 * The owner of the session that a request's cookie names, or null. Renews the session and its cookie when half its time has passed,
 * and drops a cookie that opens nothing.
 */
export async function readSession({ cookies, getClientAddress }: RequestEvent): Promise<SessionOwner | null> {
	const id = cookies.get(SESSION_COOKIE);
	if (!id) return null;
	const { session, user } = await lucia.validateSession(id);
	if (!session) {
		dropCookie(cookies);
		return null;
	}
	if (session.fresh) keepCookie(cookies, id);
	if (Date.now() - Date.parse(session.seenAt) > SEEN_EVERY_MS)
		await sessionStore.touch(session.handle, now(), getClientAddress());
	const { email, name, roles, secondFactor } = user;
	return { id: user.id, email, name, roles, secondFactor, handle: session.handle };
}

/**
 * Signs a person in with a new session: the one the browser had before ends, so nobody can have planted it.
 * @returns the session's handle
 */
export async function startSession(event: RequestEvent, personId: string): Promise<string> {
	const before = event.cookies.get(SESSION_COOKIE);
	if (before) await lucia.invalidateSession(before);
	const at = now();
	const facts: SessionFacts = {
		handle: newId(),
		createdAt: at,
		seenAt: at,
		address: event.getClientAddress(),
		agent: (event.request.headers.get('user-agent') ?? '').slice(0, AGENT_LENGTH)
	};
	const { id } = await lucia.createSession(personId, facts, { sessionId: newSecret() });
	keepCookie(event.cookies, id);
	return facts.handle;
}

/** Signs this browser out. */
export async function endSession({ cookies }: RequestEvent): Promise<void> {
	const id = cookies.get(SESSION_COOKIE);
	if (id) await lucia.invalidateSession(id);
	dropCookie(cookies);
}

/** The devices on which a person is signed in, the last used first. */
export async function listDevices(personId: string): Promise<Device[]> {
	const sessions = await lucia.getUserSessions(personId);
	return sessions.map(({ handle, createdAt, seenAt, address, agent, expiresAt }) => ({
		handle,
		createdAt,
		seenAt,
		address,
		agent,
		expiresAt: expiresAt.toISOString()
	}));
}

/** Signs one device of a person out; false if the person has no such device. */
export const endDevice = (personId: string, handle: string): Promise<boolean> =>
	sessionStore.deleteByHandle(personId, handle);

/**
 * Signs a person out everywhere, or everywhere but on one device.
 * @param except handle of the session that goes on, or null
 * @returns how many sessions ended
 */
export const endSessions = (
	personId: string,
	except: string | null,
	transaction?: Transaction
): Promise<number> => sessionStore.deleteOthers(personId, except, transaction);

/** Removes sessions whose time is over. */
export const purgeSessions = (): Promise<void> => lucia.deleteExpiredSessions();

function keepCookie(cookies: Cookies, id: string) {
	const { name, value, attributes } = lucia.createSessionCookie(id);
	cookies.set(name, value, { ...attributes, path: '/' });
}

function dropCookie(cookies: Cookies) {
	const { name, value, attributes } = lucia.createBlankSessionCookie();
	cookies.set(name, value, { ...attributes, path: '/' });
}
