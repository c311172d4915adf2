import { Op } from 'sequelize';
import type { Scope } from '$lib/schemas/terms';
import { ApiToken, Person } from '../db/models/people';
import { inTransaction, rolesOf } from './accounts';
import { recordAudit } from './audit';
import type { SignedIn } from './roles';
import { hashSecret, inMs, newSecret, now } from './secrets';

/** Starts every token, so that one that leaks into a repository or a log is recognised. */
const PREFIX = 'wm_';
const HINT_LENGTH = 4;
const DAY_MS = 86_400_000;
/** A person has at most this many live tokens. */
const MOST_TOKENS = 20;
/** Use of a token is noted at most this often. */
const USED_EVERY_MS = 5 * 60_000;

/** A token as its owner sees it later: never the token itself. */
export interface TokenDto {
	id: number;
	name: string;
	hint: string;
	scopes: Scope[];
	createdAt: string;
	expiresAt: string;
	usedAt: string | null;
	expired: boolean;
}

/**
 * Makes a token for a person's own scripts.
 * @returns the token, which is not kept and cannot be shown again; null if the person has too many
 */
export async function makeToken(
	person: { id: string; email: string },
	name: string,
	scopes: readonly Scope[],
	days: number
): Promise<string | null> {
	const token = PREFIX + newSecret();
	return inTransaction(async (transaction) => {
		const live = { personId: person.id, expiresAt: { [Op.gt]: now() } };
		if ((await ApiToken.count({ where: live, transaction })) >= MOST_TOKENS) return null;
		await ApiToken.create(
			{
				personId: person.id,
				name: name.trim(),
				tokenHash: hashSecret(token),
				hint: token.slice(-HINT_LENGTH),
				scopes: JSON.stringify([...new Set(scopes)]),
				createdAt: now(),
				expiresAt: inMs(days * DAY_MS)
			},
			{ transaction }
		);
		const detail = `${name.trim()}: ${scopes.join(', ')}; ${days} days`;
		await recordAudit({ action: 'token made', subject: person.email, detail }, transaction);
		return token;
	});
}

/** The tokens of a person, the newest first. */
export async function listTokens(personId: string): Promise<TokenDto[]> {
	const rows = await ApiToken.findAll({ where: { personId }, order: [['id', 'DESC']] });
	return rows.map(({ id, name, hint, scopes, createdAt, expiresAt, usedAt }) => ({
		...{ id, name, hint, createdAt, expiresAt, usedAt },
		scopes: JSON.parse(scopes) as Scope[],
		expired: expiresAt <= now()
	}));
}

/** Ends a token of a person; false if the person has none with this id. */
export async function revokeToken(person: { id: string; email: string }, id: number): Promise<boolean> {
	return inTransaction(async (transaction) => {
		const token = await ApiToken.findOne({ where: { id, personId: person.id }, transaction });
		if (!token) return false;
		await token.destroy({ transaction });
		await recordAudit({ action: 'token revoked', subject: person.email, detail: token.name }, transaction);
		return true;
	});
}

/** Whom a token speaks for, with what it may be used for; null if it is unknown, expired, or its owner's account is closed. */
export async function readToken(token: string): Promise<SignedIn | null> {
	if (!token.startsWith(PREFIX)) return null;
	const row = await ApiToken.findOne({
		where: { tokenHash: hashSecret(token), expiresAt: { [Op.gt]: now() } }
	});
	const person = row && (await Person.findOne({ where: { id: row.personId, deactivatedAt: null } }));
	if (!person) return null;
	if (row.usedAt === null || Date.now() - Date.parse(row.usedAt) > USED_EVERY_MS)
		await row.update({ usedAt: now() });
	const { id, email, name } = person;
	return {
		...{ id, email, name, handle: null },
		roles: await rolesOf(id),
		secondFactor: person.totpSecret !== null,
		scopes: JSON.parse(row.scopes) as Scope[]
	};
}
