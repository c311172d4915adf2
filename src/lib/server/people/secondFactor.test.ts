import { createHmac } from 'node:crypto';
import { Secret } from 'otpauth';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { temporaryDatabase, temporaryFolder } from '../../../../tests/support/database';
import { newPerson } from '../../../../tests/support/people';
import { Audit, Person, RecoveryCode } from '../db/models/people';
import { seal } from './seal';
import {
	beginFactor,
	confirmFactor,
	passesFactor,
	recoveryCodesLeft,
	removeFactor,
	renewRecoveryCodes
} from './secondFactor';

vi.mock('../config', async (original) => {
	const { environment } = await original<{ environment: object }>();
	return { environment: { ...environment, DATA_DIR: temporaryFolder() } };
});
vi.mock('$app/server', () => ({
	getRequestEvent: () => {
		throw new Error('no request');
	}
}));

beforeEach(async () => {
	vi.useFakeTimers({ toFake: ['Date'] });
	await temporaryDatabase();
});
afterEach(() => void vi.useRealTimers());

const at = (seconds: number) => vi.setSystemTime(seconds * 1000);

/** RFC 4226, 5.3, with the time step of RFC 6238, written anew: the check must not be the library itself. */
function codeAt(secret: string, seconds: number): string {
	const counter = Buffer.alloc(8);
	counter.writeBigUInt64BE(BigInt(Math.floor(seconds / 30)));
	const digest = createHmac('sha1', Buffer.from(Secret.fromBase32(secret.replaceAll(' ', '')).buffer))
		.update(counter)
		.digest();
	const number = digest.readUInt32BE(digest[19] & 15) & 0x7fffffff;
	return String(number % 1_000_000).padStart(6, '0');
}

describe('codes of the authenticator', () => {
	// RFC 6238, appendix B, SHA-1; the table has eight digits, of which an authenticator of six shows the last six (RFC 4226, 5.3).
	it.each([
		[59, '94287082'],
		[1_111_111_109, '07081804'],
		[1_111_111_111, '14050471'],
		[1_234_567_890, '89005924'],
		[2_000_000_000, '69279037'],
		[20_000_000_000, '65353130']
	])('are those of RFC 6238 at %i s', async (seconds, code) => {
		const id = await newPerson();
		const secret = new Secret({ buffer: new TextEncoder().encode('12345678901234567890').buffer }).base32;
		await Person.update({ totpSecret: seal(secret) }, { where: { id } });
		at(seconds);
		expect(await passesFactor(id, code)).toBe(false);
		expect(await passesFactor(id, code.slice(2))).toBe(true);
	});

	it('count one step before and after, and each works once, as does none before it', async () => {
		const id = await newPerson();
		const now = 1_800_000_000;
		at(now);
		const { secret } = await beginFactor(id);
		const code = (step: number) => codeAt(secret, now + 30 * step);
		expect(await confirmFactor(id, code(-2))).toBe(null);
		expect(await confirmFactor(id, code(2))).toBe(null);
		expect(await confirmFactor(id, ` ${code(-1).slice(0, 3)} ${code(-1).slice(3)}`)).toHaveLength(10);
		expect(await passesFactor(id, code(-1))).toBe(false);
		expect(await passesFactor(id, code(1))).toBe(true);
		expect(await passesFactor(id, code(1))).toBe(false);
		expect(await passesFactor(id, code(0))).toBe(false);
		at(now + 60);
		expect(await passesFactor(id, code(2))).toBe(true);
	});
});

describe('setting it up', () => {
	it('keeps the secret sealed and the same until a code confirms it', async () => {
		const id = await newPerson();
		const [one, two] = [await beginFactor(id), await beginFactor(id)];
		expect(two).toEqual(one);
		// 20 bytes, RFC 4226's advice (section 4, R6), are 32 signs of base32.
		expect(one.secret.replaceAll(' ', '')).toMatch(/^[A-Z2-7]{32}$/);
		expect(one.path).toMatch(/^(M\d+ \d+h1v1h-1z)+$/);
		const person = await Person.findByPk(id, { rejectOnEmpty: true });
		expect(person.totpPending).not.toContain(one.secret.slice(0, 4));
		expect(person.totpSecret).toBe(null);
		expect(await passesFactor(id, codeAt(one.secret, Date.now() / 1000))).toBe(false);
	});

	it('is taken away with its codes', async () => {
		const id = await newPerson();
		const { secret } = await beginFactor(id);
		await confirmFactor(id, codeAt(secret, Date.now() / 1000));
		expect(await removeFactor(id)).toBe(true);
		expect(await RecoveryCode.count()).toBe(0);
		expect(await removeFactor('nobody')).toBe(false);
		expect((await Audit.findAll({ order: ['id'] })).map(({ action }) => action)).toEqual([
			'second factor on',
			'second factor off'
		]);
	});
});

describe('recovery codes', () => {
	it('work once each, however they are typed, and not after new ones were made', async () => {
		const id = await newPerson();
		const { secret } = await beginFactor(id);
		const codes = (await confirmFactor(id, codeAt(secret, Date.now() / 1000)))!;
		expect(new Set(codes).size).toBe(10);
		for (const code of codes) expect(code).toMatch(/^[2-9a-z]{5}-[2-9a-z]{5}$/);
		expect(JSON.stringify(await RecoveryCode.findAll())).not.toContain(codes[0].replace('-', ''));
		expect(await passesFactor(id, ` ${codes[0].toUpperCase()} `)).toBe(true);
		expect(await passesFactor(id, codes[0])).toBe(false);
		expect(await recoveryCodesLeft(id)).toBe(9);
		const renewed = await renewRecoveryCodes({ id, email: 'a@example.org' });
		expect(await passesFactor(id, codes[1])).toBe(false);
		expect(await passesFactor(id, renewed[1].replace('-', ''))).toBe(true);
		expect(await passesFactor(await newPerson(), renewed[2])).toBe(false);
	});

	it('let only one of two through who use the same one at once', async () => {
		const id = await newPerson();
		const { secret } = await beginFactor(id);
		const [code] = (await confirmFactor(id, codeAt(secret, Date.now() / 1000)))!;
		expect((await Promise.all([passesFactor(id, code), passesFactor(id, code)])).sort()).toEqual([
			false,
			true
		]);
	});
});
