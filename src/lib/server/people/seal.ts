import { createCipheriv, createDecipheriv, createHmac, randomBytes, timingSafeEqual } from 'node:crypto';
import { chmodSync, linkSync, mkdirSync, readFileSync, unlinkSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { environment } from '../config';

/** Beside the database, readable by the server's user alone. A backup without it loses second factors and unsent mail, nothing else. */
const KEY_FILE = 'secret.key';
const KEY_BYTES = 32;
const IV_BYTES = 12;
const TAG_BYTES = 16;

let kept: Buffer | undefined;

/**
 * The installation's own key, made at its first use.
 * @throws when the file cannot be read or made, or is no key
 */
function key(): Buffer {
	if (kept) return kept;
	const file = path.join(environment.DATA_DIR, KEY_FILE);
	kept = readKey(file) ?? makeKey(file);
	return kept;
}

function readKey(file: string): Buffer | undefined {
	try {
		const bytes = Buffer.from(readFileSync(file, 'utf8').trim(), 'base64');
		if (bytes.length !== KEY_BYTES) throw new Error(`${KEY_FILE} in DATA_DIR holds no key.`);
		return bytes;
	} catch (error) {
		if ((error as NodeJS.ErrnoException).code === 'ENOENT') return undefined;
		throw error;
	}
}

function makeKey(file: string): Buffer {
	mkdirSync(path.dirname(file), { recursive: true });
	const draft = `${file}.${randomBytes(6).toString('hex')}`;
	writeFileSync(draft, `${randomBytes(KEY_BYTES).toString('base64')}\n`, { mode: 0o600, flag: 'wx' });
	try {
		// A link fails where the file is there already, so two processes cannot end with two keys.
		linkSync(draft, file);
	} catch (error) {
		if ((error as NodeJS.ErrnoException).code !== 'EEXIST') throw error;
	} finally {
		unlinkSync(draft);
	}
	chmodSync(file, 0o600);
	return readKey(file)!;
}

/** Encrypts a text for the database with AES-256-GCM under the installation's key. */
export function seal(text: string): string {
	const iv = randomBytes(IV_BYTES);
	const cipher = createCipheriv('aes-256-gcm', key(), iv);
	const sealed = Buffer.concat([cipher.update(text, 'utf8'), cipher.final()]);
	return Buffer.concat([iv, cipher.getAuthTag(), sealed]).toString('base64');
}

/**
 * Decrypts what `seal` made.
 * @throws when it was changed, or sealed under another key
 */
export function unseal(sealed: string): string {
	const bytes = Buffer.from(sealed, 'base64');
	const decipher = createDecipheriv('aes-256-gcm', key(), bytes.subarray(0, IV_BYTES));
	decipher.setAuthTag(bytes.subarray(IV_BYTES, IV_BYTES + TAG_BYTES));
	return Buffer.concat([decipher.update(bytes.subarray(IV_BYTES + TAG_BYTES)), decipher.final()]).toString(
		'utf8'
	);
}

/** A text with a proof that this installation wrote it: `text.proof`. For cookies whose content need not be hidden. */
export const sign = (text: string): string => `${text}.${proof(text)}`;

/** The text of a signed one, or null if the proof is not right. */
export function unsign(signed: string): string | null {
	const cut = signed.lastIndexOf('.');
	const text = signed.slice(0, cut);
	const given = Buffer.from(signed.slice(cut + 1));
	const right = Buffer.from(proof(text));
	return cut > 0 && given.length === right.length && timingSafeEqual(given, right) ? text : null;
}

const proof = (text: string) => createHmac('sha256', key()).update(text).digest('base64url');
