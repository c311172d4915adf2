import { beforeEach, describe, expect, it, vi } from 'vitest';
import { cookieJar } from '../../../../tests/support/cookies';
import { temporaryDatabase, temporaryFolder } from '../../../../tests/support/database';
import { newPerson } from '../../../../tests/support/people';
import { requestEvent } from '../../../../tests/support/requestEvent';
import { Audit, Person, SessionRow } from '../db/models/people';
import { hashPassword } from './passwords';
import { seal } from './seal';
import { signIn, signInWithCode, waitsForCode } from './signIn';

const verify = vi.hoisted(() => vi.fn());
vi.mock('@node-rs/argon2', async (original) => {
	const real = await original<{ verify: (hashed: string, password: string) => Promise<boolean> }>();
	verify.mockImplementation(real.verify);
	return { ...real, verify };
});
vi.mock('../config', async (original) => {
	const { environment } = await original<{ environment: object }>();
	return { environment: { ...environment, DATA_DIR: temporaryFolder() } };
});
vi.mock('$app/server', () => ({
	getRequestEvent: () => {
		throw new Error('no request');
	}
}));

const RIGHT = 'two rivers become one';
const WRONG = 'two rivers stay apart';
let passwordHash = '';
let ada = '';
let address = 0;

beforeEach(async () => {
	await temporaryDatabase();
	passwordHash ||= await hashPassword(RIGHT);
	ada = await newPerson({ passwordHash });
	// The counts outlive a test: every test asks from an address, and for an account, of its own.
	address++;
});

const at = (jar: ReturnType<typeof cookieJar>, from = `198.51.100.${address}`) =>
	requestEvent(new Request('http://localhost:3000/sign-in', { method: 'POST' }), {
		cookies: jar.cookies,
		getClientAddress: () => from
	});
const email = () => `${ada}@example.org`;

describe('signing in', () => {
	it('opens a session, remembers the browser, and notes it', async () => {
		const jar = cookieJar();
		const event = at(jar);
		expect(await signIn(event, ` ${email().toUpperCase()}`, RIGHT)).toEqual({ outcome: 'signed in' });
		expect(event.locals.user).toMatchObject({ id: ada, scopes: null });
		expect([...jar.kept.keys()].sort()).toEqual(['device', 'session']);
		for (const { options } of jar.kept.values())
			expect(options).toMatchObject({ httpOnly: true, sameSite: 'lax', path: '/' });
		expect((await Person.findByPk(ada))?.seenAt).not.toBe(null);
		expect(await Audit.findOne({ raw: true })).toMatchObject({ action: 'signed in', actorId: ada });
	});

	it('answers the same after the same work to a wrong password, an unknown address and a closed account', async () => {
		const closed = await newPerson({ passwordHash });
		await Person.update({ deactivatedAt: 'now' }, { where: { id: closed } });
		for (const [who, password] of [
			[email(), WRONG],
			['nobody@example.org', WRONG],
			[`${closed}@example.org`, RIGHT]
		]) {
			verify.mockClear();
			expect(await signIn(at(cookieJar()), who, password)).toEqual({ outcome: 'refused' });
			expect(verify).toHaveBeenCalledTimes(1);
			expect(verify.mock.calls[0][0]).toContain('m=19456,t=2,p=1');
		}
		expect(await SessionRow.count()).toBe(0);
		const log = JSON.stringify(await Audit.findAll());
		expect(log).not.toContain(WRONG);
		expect(await Audit.count({ where: { action: 'sign-in refused' } })).toBe(3);
	});

	it('makes a hash anew that was made with other parameters', async () => {
		const { hash } = await import('@node-rs/argon2');
		const weak = await hash(RIGHT, { memoryCost: 1024, timeCost: 1, parallelism: 1 });
		await Person.update({ passwordHash: weak }, { where: { id: ada } });
		expect(await signIn(at(cookieJar()), email(), RIGHT)).toEqual({ outcome: 'signed in' });
		expect((await Person.findByPk(ada))?.passwordHash).toContain('m=19456,t=2,p=1');
	});
});

describe('guessing', () => {
	it('waits after ten tries at one account, whether it exists or not; the right password waits too', async () => {
		for (const who of [email(), `nobody-${address}@example.org`]) {
			for (let tries = 0; tries < 10; tries++)
				expect(await signIn(at(cookieJar()), who, WRONG)).toEqual({ outcome: 'refused' });
			verify.mockClear();
			const wait = await signIn(at(cookieJar()), who, RIGHT);
			expect(wait).toMatchObject({ outcome: 'wait' });
			expect(verify).not.toHaveBeenCalled();
		}
	});

	it('by others keeps nobody out of a browser the account knows, nor from another address', async () => {
		const jar = cookieJar();
		await signIn(at(jar), email(), RIGHT);
		for (let tries = 0; tries < 11; tries++) await signIn(at(cookieJar()), email(), WRONG);
		expect(await signIn(at(cookieJar()), email(), RIGHT)).toMatchObject({ outcome: 'wait' });
		expect(await signIn(at(jar), email(), RIGHT)).toEqual({ outcome: 'signed in' });
		expect(await signIn(at(cookieJar(), '203.0.113.9'), email(), RIGHT)).toEqual({ outcome: 'signed in' });
	});

	it('from everywhere at once waits after a hundred tries, but not in a browser the account knows', async () => {
		const jar = cookieJar();
		await signIn(at(jar), email(), RIGHT);
		await Person.update({ passwordHash: 'none' }, { where: { id: ada } });
		verify.mockResolvedValue(false);
		for (let tries = 0; tries < 100; tries++)
			expect(await signIn(at(cookieJar(), `2001:db8::${tries}`), email(), WRONG)).toEqual({
				outcome: 'refused'
			});
		expect(await signIn(at(cookieJar(), '2001:db8:1::1'), email(), WRONG)).toMatchObject({ outcome: 'wait' });
		expect(await signIn(at(jar), email(), WRONG)).toEqual({ outcome: 'refused' });
	});
});

describe('the second factor', () => {
	it('leaves a browser waiting for its code; without the password, or after a change of it, no code helps', async () => {
		verify.mockResolvedValue(true);
		await Person.update({ totpSecret: seal('JBSWY3DPEHPK3PXP') }, { where: { id: ada } });
		const jar = cookieJar();
		expect(await signInWithCode(at(jar), '123456')).toEqual({ outcome: 'refused' });
		expect(await signIn(at(jar), email(), RIGHT)).toEqual({ outcome: 'code needed' });
		expect(await SessionRow.count()).toBe(0);
		expect(await waitsForCode(at(jar))).toBe(true);
		expect(await signInWithCode(at(jar), 'wrong')).toEqual({ outcome: 'refused' });
		await Person.update({ passwordHash: `${passwordHash} ` }, { where: { id: ada } });
		expect(await waitsForCode(at(jar))).toBe(false);
	});

	it('hears ten codes in a quarter of an hour', async () => {
		verify.mockResolvedValue(true);
		await Person.update({ totpSecret: seal('JBSWY3DPEHPK3PXP') }, { where: { id: ada } });
		const jar = cookieJar();
		await signIn(at(jar), email(), RIGHT);
		for (let tries = 0; tries < 10; tries++)
			expect(await signInWithCode(at(jar), `wrong ${tries}`)).toEqual({ outcome: 'refused' });
		expect(await signInWithCode(at(jar), 'wrong')).toMatchObject({ outcome: 'wait' });
	});
});
