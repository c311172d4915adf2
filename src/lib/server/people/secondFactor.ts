import { randomInt } from 'node:crypto';
import { Secret, TOTP } from 'otpauth';
import { create } from 'qrcode';
import type { Transaction } from 'sequelize';
import { site } from '$lib/strings/site';
import { Person, RecoveryCode } from '../db/models/people';
import { inTransaction } from './accounts';
import { recordAudit } from './audit';
import { seal, unseal } from './seal';
import { hashSecret, now } from './secrets';

/** RFC 6238's usual values, the only ones every authenticator understands. */
const PERIOD_SECONDS = 30;
const DIGITS = 6;
const SECRET_BYTES = 20;
/** Steps before and after the present one that count: clocks differ, and typing takes a while (RFC 6238, 5.2). */
const WINDOW = 1;
const RECOVERY_CODES = 10;
/** Without signs that look alike. Ten of 31 are 49 bits; guesses are limited and the hash is fast, which such a code bears. */
const CODE_ALPHABET = '23456789abcdefghjkmnpqrstuvwxyz';
const CODE_LENGTH = 10;

const totp = (secret: string, email = '') =>
	new TOTP({
		issuer: site.name,
		label: email || site.name,
		algorithm: 'SHA1',
		digits: DIGITS,
		period: PERIOD_SECONDS,
		secret: Secret.fromBase32(secret)
	});

/** What a person needs to put the second factor into an authenticator. */
export interface Enrolment {
	/** The secret in groups of four, to type. */
	secret: string;
	/** The QR code's dark modules as one path of unit squares. */
	path: string;
	/** Modules along a side. */
	size: number;
}

/** Begins setting up the second factor; it is in force once `confirmFactor` has seen a code. Asked again, it goes on with the same secret. */
export async function beginFactor(personId: string): Promise<Enrolment> {
	const person = await Person.findByPk(personId, { rejectOnEmpty: true });
	if (person.totpPending === null)
		await person.update({ totpPending: seal(new Secret({ size: SECRET_BYTES }).base32) });
	const secret = unseal(person.totpPending!);
	const { modules } = create(totp(secret, person.email).toString(), { errorCorrectionLevel: 'M' });
	const path = Array.from({ length: modules.size * modules.size }, (_, at) => at)
		.filter((at) => modules.data[at])
		.map((at) => `M${at % modules.size} ${Math.floor(at / modules.size)}h1v1h-1z`)
		.join('');
	return { secret: secret.match(/.{1,4}/g)!.join(' '), path, size: modules.size };
}

/**
 * Puts the second factor in force if a code of the pending secret is right.
 * @returns the recovery codes, which are not kept and cannot be shown again; null if the code is wrong
 */
export async function confirmFactor(personId: string, code: string): Promise<string[] | null> {
	return inTransaction(async (transaction) => {
		const person = await Person.findByPk(personId, { transaction, rejectOnEmpty: true });
		if (person.totpPending === null) return null;
		const step = stepOf(unseal(person.totpPending), code);
		if (step === null) return null;
		await person.update(
			{ totpSecret: person.totpPending, totpPending: null, totpStep: step },
			{ transaction }
		);
		await recordAudit({ action: 'second factor on', subject: person.email }, transaction);
		return newRecoveryCodes(personId, transaction);
	});
}

/** Makes new recovery codes; the ones before stop working. */
export async function renewRecoveryCodes(person: { id: string; email: string }): Promise<string[]> {
	return inTransaction(async (transaction) => {
		await recordAudit({ action: 'recovery codes renewed', subject: person.email }, transaction);
		return newRecoveryCodes(person.id, transaction);
	});
}

/** Takes the second factor away; false if the person is unknown. */
export async function removeFactor(personId: string): Promise<boolean> {
	return inTransaction(async (transaction) => {
		const person = await Person.findByPk(personId, { transaction });
		if (!person) return false;
		if (person.totpSecret !== null)
			await recordAudit({ action: 'second factor off', subject: person.email }, transaction);
		await person.update({ totpSecret: null, totpPending: null, totpStep: null }, { transaction });
		await RecoveryCode.destroy({ where: { personId }, transaction });
		return true;
	});
}

/**
 * Whether a code of the authenticator or a recovery code is right. Each works once: a code that was accepted, and any of an earlier step,
 * is refused from then on.
 */
export async function passesFactor(personId: string, code: string): Promise<boolean> {
	return inTransaction(async (transaction) => {
		const person = await Person.findByPk(personId, { transaction });
		if (!person || person.totpSecret === null) return false;
		const step = stepOf(unseal(person.totpSecret), code);
		if (step !== null) {
			if (step <= (person.totpStep ?? -1)) return false;
			await person.update({ totpStep: step }, { transaction });
			return true;
		}
		const [used] = await RecoveryCode.update(
			{ usedAt: now() },
			{ where: { personId, codeHash: hashSecret(plain(code)), usedAt: null }, transaction }
		);
		if (used === 0) return false;
		const actor = { id: person.id, name: person.name };
		await recordAudit({ action: 'recovery code used', subject: person.email, actor }, transaction);
		return true;
	});
}

/** Recovery codes a person has left. */
export const recoveryCodesLeft = (personId: string): Promise<number> =>
	RecoveryCode.count({ where: { personId, usedAt: null } });

/** The time step of a code that is right now, or null. */
function stepOf(secret: string, code: string): number | null {
	const token = plain(code);
	if (!/^\d+$/.test(token)) return null;
	const generator = totp(secret);
	const delta = generator.validate({ token, window: WINDOW });
	return delta === null ? null : generator.counter() + delta;
}

const plain = (code: string) => code.replace(/[\s-]/g, '').toLowerCase();

async function newRecoveryCodes(personId: string, transaction: Transaction): Promise<string[]> {
	const codes = Array.from({ length: RECOVERY_CODES }, () =>
		Array.from({ length: CODE_LENGTH }, () => CODE_ALPHABET[randomInt(CODE_ALPHABET.length)]).join('')
	);
	await RecoveryCode.destroy({ where: { personId }, transaction });
	await RecoveryCode.bulkCreate(
		codes.map((code) => ({ personId, codeHash: hashSecret(code) })),
		{ transaction }
	);
	return codes.map((code) => `${code.slice(0, CODE_LENGTH / 2)}-${code.slice(CODE_LENGTH / 2)}`);
}
