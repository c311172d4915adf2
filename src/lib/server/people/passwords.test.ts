import { hashRaw } from '@node-rs/argon2';
import { describe, expect, it, vi } from 'vitest';
import { HASHING, hashPassword, isOutdated, passwordMistake, verifyPassword } from './passwords';

const verify = vi.hoisted(() => vi.fn());
vi.mock('@node-rs/argon2', async (original) => {
	const real = await original<{ verify: (hashed: string, password: string) => Promise<boolean> }>();
	verify.mockImplementation(real.verify);
	return { ...real, verify };
});

describe('hashing', () => {
	// Vectors of the reference implementation (P-H-C/phc-winner-argon2, src/test.c, Argon2id version 0x13, recalled, not read here). The vector of
	// RFC 9106, 5.3 has associated data, which this package does not take.
	it.each([
		[65_536, 'password', 'somesalt', '09316115d5cf24ed5a15a31a3ba326e5cf32edc24702987c02b6566f61913cf7'],
		[256, 'password', 'somesalt', '9dfeb910e80bad0311fee20f9c0e2b12c17987b4cac90c2ef54d5b3021c68bfe']
	])('is argon2id: %i KiB', async (memoryCost, password, salt, hex) => {
		const raw = await hashRaw(password, { ...HASHING, memoryCost, salt: Buffer.from(salt) });
		expect(raw.toString('hex')).toBe(hex);
	});

	it('uses the parameters of the OWASP cheat sheet and a new salt each time', async () => {
		const [one, two] = await Promise.all([
			hashPassword('river valley stream'),
			hashPassword('river valley stream')
		]);
		// OWASP Password Storage Cheat Sheet: 19 MiB (19 × 1024 KiB), 2 iterations, 1 degree of parallelism.
		expect(one).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
		expect(one).not.toBe(two);
		expect(isOutdated(one)).toBe(false);
		expect(isOutdated(one.replace('m=19456', 'm=8192'))).toBe(true);
	});

	it('finds the right password, however its accents were typed, and no other', async () => {
		const hashed = await hashPassword('caf\u00e9 au bord du canal');
		expect(await verifyPassword(hashed, 'cafe\u0301 au bord du canal')).toBe(true);
		expect(await verifyPassword(hashed, 'Caf\u00e9 au bord du canal')).toBe(false);
	});

	it('does the same work where there is no account, and says no', async () => {
		verify.mockClear();
		expect(await verifyPassword(null, 'river valley stream')).toBe(false);
		expect(await verifyPassword(null, 'nobody has this password')).toBe(false);
		expect(verify).toHaveBeenCalledTimes(2);
		expect(verify.mock.calls[0][0]).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
	});
});

describe('passwordMistake', () => {
	it.each([
		['14 characters', 'too short'],
		['🦷'.repeat(14), 'too short'],
		['x'.repeat(257), 'too long'],
		['passwordpassword', 'common'],
		['PasswordPassword', 'common'],
		['Password1234567', 'common'],
		['!!!sunshine!!!!!!', 'common'],
		['aaaaaaaaaaaaaaaa', 'common'],
		['abcabcabcabcabcabc', 'common'],
		['abcdefghijklmnop', 'common'],
		['123456789012345', 'common'],
		['987654321098765', 'common'],
		['1qaz2wsx3edc4rfv', 'common'],
		['watersmeet2026!', 'own words'],
		['Canal-School-1234', 'own words'],
		['two rivers become one', null],
		['fourteen is not enough', null],
		['x1 y2 z3 q4 w5 e6', null]
	])('of "%s" is %s', (password, expected) => {
		expect(passwordMistake(password, ['Watersmeet', 'canal-school@example.org', 'canal-school'])).toBe(
			expected
		);
	});

	it('takes the longest that is allowed', () => {
		const words = Array.from({ length: 256 }, (_, at) => 'the river'.at(at % 9)).join('');
		expect(words).toHaveLength(256);
		expect(passwordMistake(`${words.slice(0, 255)}x`)).toBe(null);
	});
});
