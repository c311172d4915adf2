import { hash, parseOptions, verify } from '@node-rs/argon2';
import { dictionary } from '@zxcvbn-ts/language-common';
import { PASSWORD_LEAST, PASSWORD_MOST } from '$lib/schemas/terms';

/**
 * argon2id with 19 MiB of memory, two passes, one lane: the first choice of OWASP's Password Storage Cheat Sheet
 * (cheatsheetseries.owasp.org, "Use Argon2id with a minimum configuration of 19 MiB of memory, an iteration count of 2, and 1 degree of
 * parallelism"). One lane, so that many sign-ins at once do not fight for the machine's cores.
 *
 * @internal for its test
 */
export const HASHING = {
	// Algorithm.Argon2id: the package's enum has no value at run time.
	algorithm: 2,
	memoryCost: 19_456,
	timeCost: 2,
	parallelism: 1,
	outputLen: 32
} as const;

/** Common passwords of the package @zxcvbn-ts/language-common (MIT), about 49,000 from published collections. */
const COMMON = new Set(dictionary['passwords-common']);

/** NIST SP 800-63B-4, 3.1.1.2: normalise before hashing, so that one password typed on two keyboards is one. */
const normalised = (password: string) => password.normalize('NFKC');

/** Hashes a password for the database; the result carries its own parameters and salt. */
export const hashPassword = (password: string): Promise<string> => hash(normalised(password), HASHING);

// Nobody's password; made once, so that an account that does not exist costs the same work as one that does.
let nobody: Promise<string> | undefined;

/**
 * Whether a password is the one hashed. Without a hash (no such account) it does the same work and says no.
 * @param hashed from `hashPassword`, or null
 */
export async function verifyPassword(hashed: string | null, password: string): Promise<boolean> {
	nobody ??= hashPassword('nobody has this password');
	const right = await verify(hashed ?? (await nobody), normalised(password));
	return right && hashed !== null;
}

/** Whether a hash was made with other parameters than today's, so that it is made anew at the next sign-in. */
export function isOutdated(hashed: string): boolean {
	const { memoryCost, timeCost, parallelism } = parseOptions(hashed);
	return (
		memoryCost !== HASHING.memoryCost ||
		timeCost !== HASHING.timeCost ||
		parallelism !== HASHING.parallelism ||
		!hashed.startsWith('$argon2id$')
	);
}

/** Why a new password is refused. */
export type PasswordMistake = 'too short' | 'too long' | 'common' | 'own words';

/**
 * What is wrong with a new password, or null. Length and a list of common ones, no rules about kinds of characters
 * (NIST SP 800-63B-4, 3.1.1.2). A common password stays one with digits or signs around it, doubled, or written along the keyboard or alphabet.
 * @param own words that a stranger would try for this person: name, address, name of the installation
 */
export function passwordMistake(password: string, own: readonly string[] = []): PasswordMistake | null {
	const text = normalised(password);
	const length = [...text].length;
	if (length < PASSWORD_LEAST) return 'too short';
	if (length > PASSWORD_MOST) return 'too long';
	const lower = text.toLowerCase();
	const unit = repeatedUnit(lower);
	const cores = [lower, unit, core(lower), core(unit)].filter(Boolean);
	if (cores.some((one) => COMMON.has(one)) || unit.length <= 3 || isRun(lower)) return 'common';
	const words = own
		.flatMap((one) => [one, ...one.split(/[^\p{L}\p{N}]+/u)])
		.map((one) => core(one.toLowerCase()));
	return words.some((word) => word.length > 2 && cores.includes(word)) ? 'own words' : null;
}

/** A text without the digits and signs around its letters. */
const core = (text: string) => text.replace(/^[^\p{L}]+|[^\p{L}]+$/gu, '');

/** The shortest text of which this one is a repetition; itself if it is none. */
function repeatedUnit(text: string): string {
	// A text that repeats is found inside its own double before its end.
	return text.slice(0, (text + text).indexOf(text, 1));
}

/** Whether every character follows the one before in the same step, as in abcdef… or 987654…, digits running over from 9 to 0. */
function isRun(text: string): boolean {
	const codes = [...text].map((character) => character.codePointAt(0)!);
	const digits = /^\d+$/.test(text);
	const step = (at: number) => (digits ? (codes[at] - codes[at - 1] + 10) % 10 : codes[at] - codes[at - 1]);
	const first = step(1);
	return codes.slice(2).every((_, at) => step(at + 2) === first);
}
