import type { Cookies, RequestEvent } from '@sveltejs/kit';
import { environment } from '../config';
import { Person } from '../db/models/people';
import { emailKey, findByEmail, rolesOf } from './accounts';
import { recordAudit } from './audit';
import { codeLimit, signInLimits } from './limits';
import { hashPassword, isOutdated, verifyPassword } from './passwords';
import { sign, unsign } from './seal';
import { passesFactor } from './secondFactor';
import { hashSecret, newId, now } from './secrets';
import { startSession } from './sessions';

/** How long a right password waits for its code. */
const CODE_MINUTES = 10;
const DEVICE_DAYS = 365;

const secure = environment.ORIGIN.startsWith('https:');
const prefix = secure ? '__Host-' : '';
const WAITING_COOKIE = `${prefix}second-factor`;
const DEVICE_COOKIE = `${prefix}device`;
const COOKIE = { path: '/', httpOnly: true, sameSite: 'lax', secure } as const;

/** What became of an attempt to sign in. */
export type SignInOutcome =
	| { outcome: 'signed in' | 'refused' | 'code needed' }
	/** Too many attempts; the next is heard after so many seconds. */
	| { outcome: 'wait'; seconds: number };

/**
 * Signs somebody in with address and password. Answers the same, after the same work, whether the account does not exist, is closed, or has
 * another password. With a second factor the browser gets a short-lived cookie instead of a session, and `signInWithCode` goes on.
 */
export async function signIn(event: RequestEvent, email: string, password: string): Promise<SignInOutcome> {
	const key = emailKey(email);
	const { seconds, rightful } = await takeAttempt(event, key);
	if (seconds > 0) return { outcome: 'wait', seconds };
	const person = await findByEmail(key);
	const active = person?.deactivatedAt === null ? person : null;
	const right = await verifyPassword(active?.passwordHash ?? null, password);
	if (!active || !right) {
		await recordAudit({ action: 'sign-in refused', subject: key });
		return { outcome: 'refused' };
	}
	await rightful();
	if (isOutdated(active.passwordHash)) await active.update({ passwordHash: await hashPassword(password) });
	return { outcome: await goOn(event, active) };
}

/** Goes on after a reset as after a right password: a mailbox does not replace the second factor. */
export const afterReset = (event: RequestEvent, person: Person): Promise<'signed in' | 'code needed'> =>
	goOn(event, person);

async function goOn(event: RequestEvent, person: Person) {
	if (person.totpSecret !== null) {
		waitForCode(event.cookies, person);
		return 'code needed';
	}
	await enter(event, person);
	return 'signed in';
}

/**
 * Goes on after a right password with a code of the authenticator or a recovery code. "refused" also says that the browser is not
 * waiting for a code: see `waitsForCode`.
 */
export async function signInWithCode(event: RequestEvent, code: string): Promise<SignInOutcome> {
	const person = await waitingPerson(event.cookies);
	if (!person) return { outcome: 'refused' };
	const seconds = await codeLimit.take(person.id);
	if (seconds > 0) return { outcome: 'wait', seconds };
	if (!(await passesFactor(person.id, code))) {
		await recordAudit({ action: 'sign-in refused', subject: person.email, detail: 'second factor' });
		return { outcome: 'refused' };
	}
	await codeLimit.forget(person.id);
	await enter(event, person);
	return { outcome: 'signed in' };
}

/** Whether this browser has given a right password and owes the code. */
export const waitsForCode = async ({ cookies }: RequestEvent): Promise<boolean> =>
	(await waitingPerson(cookies)) !== null;

/** Forgets that the browser gave a password, to begin with another account. */
export const stopWaiting = ({ cookies }: RequestEvent): void => cookies.delete(WAITING_COOKIE, COOKIE);

/** Signs a person in whose right has been shown in whatever way, and remembers the browser. */
export async function enter(event: RequestEvent, person: Person): Promise<void> {
	const handle = await startSession(event, person.id);
	const { id, email, name } = person;
	const roles = await rolesOf(id);
	// The page that answers this request shows them as signed in already.
	event.locals.user = {
		id,
		email,
		name,
		roles,
		secondFactor: person.totpSecret !== null,
		handle,
		scopes: null
	};
	stopWaiting(event);
	if (deviceOf(event.cookies, person.id) === null)
		event.cookies.set(DEVICE_COOKIE, sign(JSON.stringify([person.id, newId()])), {
			...COOKIE,
			maxAge: DEVICE_DAYS * 86_400
		});
	await person.update({ seenAt: now() });
	await recordAudit({
		action: 'signed in',
		subject: person.email,
		actor: { id: person.id, name: person.name }
	});
}

/** Counts an attempt; `rightful` takes it back. A browser the account knows has a count of its own. */
async function takeAttempt({ cookies, getClientAddress }: RequestEvent, key: string) {
	const address = getClientAddress();
	const known = await findByEmail(key);
	const device = known && deviceOf(cookies, known.id);
	const counts = device
		? [{ limit: signInLimits.device, of: device }]
		: [
				{ limit: signInLimits.pair, of: `${address} ${hashSecret(key)}` },
				{ limit: signInLimits.address, of: address },
				{ limit: signInLimits.account, of: hashSecret(key) }
			];
	let seconds = 0;
	for (const { limit, of } of counts) seconds ||= await limit.take(of);
	const rightful = async () => {
		for (const { limit, of } of counts) await limit.giveBack(of);
	};
	return { seconds, rightful };
}

/** The name of this browser if it has signed in to the account before, or null. */
function deviceOf(cookies: Cookies, personId: string): string | null {
	const [owner, device] = readSigned(cookies.get(DEVICE_COOKIE));
	return owner === personId && device ? device : null;
}

function waitForCode(cookies: Cookies, { id, passwordHash }: Person) {
	const until = String(Date.now() + CODE_MINUTES * 60_000);
	// Bound to the password that was given: a change of it takes the waiting back.
	cookies.set(WAITING_COOKIE, sign(JSON.stringify([id, until, hashSecret(passwordHash)])), {
		...COOKIE,
		maxAge: CODE_MINUTES * 60
	});
}

async function waitingPerson(cookies: Cookies): Promise<Person | null> {
	const [id, until, password] = readSigned(cookies.get(WAITING_COOKIE));
	if (!id || !(Number(until) > Date.now())) return null;
	const person = await Person.findOne({ where: { id, deactivatedAt: null } });
	return person && person.totpSecret !== null && hashSecret(person.passwordHash) === password ? person : null;
}

function readSigned(cookie: string | undefined): (string | undefined)[] {
	const text = cookie === undefined ? null : unsign(cookie);
	return text === null ? [] : (JSON.parse(text) as string[]);
}
