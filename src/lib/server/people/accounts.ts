import type { Transaction } from 'sequelize';
import type { Role } from '$lib/schemas/terms';
import { Person, PersonRole } from '../db/models/people';
import { recordAudit } from './audit';
import { hashPassword, verifyPassword } from './passwords';
import { newId, now } from './secrets';
import { endSessions } from './sessions';

/** Runs something in one transaction; what it does in the database stands or falls together. */
export const inTransaction = <Result>(work: (transaction: Transaction) => Promise<Result>): Promise<Result> =>
	Person.sequelize!.transaction(work);

/**
 * The form of an address by which accounts are found: small letters, one way of writing accents. Servers may tell capitals apart, but none
 * that people use does, and two accounts that differ by them would be one person's mistake.
 */
export const emailKey = (email: string): string => email.trim().normalize('NFKC').toLowerCase();

/** The account of an address, deactivated ones too, or null. */
export const findByEmail = (email: string): Promise<Person | null> =>
	Person.findOne({ where: { emailKey: emailKey(email) } });

/** A new account, as its maker knows it. */
interface NewPerson {
	email: string;
	name: string;
	/** From `hashPassword`, made before the transaction because it takes a while. */
	passwordHash: string;
	roles: readonly Role[];
}

/**
 * Makes an account with its roles.
 * @returns its id
 * @throws Sequelize's UniqueConstraintError if the address has one already
 */
export async function createPerson(
	{ email, name, passwordHash, roles }: NewPerson,
	transaction: Transaction
): Promise<string> {
	const id = newId();
	await Person.create(
		{
			...{ id, email: email.trim(), emailKey: emailKey(email), name: name.trim(), passwordHash },
			createdAt: now()
		},
		{ transaction }
	);
	await PersonRole.bulkCreate(
		roles.map((role) => ({ personId: id, role })),
		{ transaction }
	);
	return id;
}

/** The roles of a person, in the alphabet's order. */
export async function rolesOf(personId: string, transaction?: Transaction): Promise<Role[]> {
	const rows = await PersonRole.findAll({ where: { personId }, order: ['role'], transaction });
	return rows.map(({ role }) => role);
}

/** Changes the name of a person. */
export async function changeName(personId: string, name: string): Promise<void> {
	await inTransaction(async (transaction) => {
		const person = await Person.findByPk(personId, { transaction, rejectOnEmpty: true });
		const before = person.name;
		await person.update({ name: name.trim() }, { transaction });
		await recordAudit(
			{ action: 'name changed', subject: person.email, detail: `${before} → ${name.trim()}` },
			transaction
		);
	});
}

/** Whether a password is the person's own: asked again before what an open screen must not be enough for. */
export async function isOwnPassword(personId: string, password: string): Promise<boolean> {
	const person = await Person.findByPk(personId);
	return verifyPassword(person?.passwordHash ?? null, password);
}

/**
 * Gives a person a new password and ends every session but the one that asked.
 * @param except handle of the session that goes on, or null
 */
export async function setPassword(
	personId: string,
	password: string,
	except: string | null,
	action: 'password changed' | 'password reset'
): Promise<void> {
	const passwordHash = await hashPassword(password);
	await inTransaction(async (transaction) => {
		const person = await Person.findByPk(personId, { transaction, rejectOnEmpty: true });
		await person.update({ passwordHash }, { transaction });
		await endSessions(personId, except, transaction);
		const actor = { id: person.id, name: person.name };
		await recordAudit({ action, subject: person.email, actor }, transaction);
	});
}

/** What became of a change an administrator asked for. */
export type ChangeOutcome = 'done' | 'unknown' | 'last administrator';

/** Gives a person exactly these roles. The last active administrator stays one. */
export async function setRoles(personId: string, roles: readonly Role[]): Promise<ChangeOutcome> {
	return inTransaction(async (transaction) => {
		const person = await Person.findByPk(personId, { transaction });
		if (!person) return 'unknown';
		const before = await rolesOf(personId, transaction);
		if (!roles.includes('administrator') && (await isLastAdministrator(person, transaction)))
			return 'last administrator';
		await PersonRole.destroy({ where: { personId }, transaction });
		await PersonRole.bulkCreate(
			[...new Set(roles)].map((role) => ({ personId, role })),
			{ transaction }
		);
		const after = [...new Set(roles)].sort();
		const detail = `${before.join(', ') || 'none'} → ${after.join(', ') || 'none'}`;
		await recordAudit({ action: 'roles changed', subject: person.email, detail }, transaction);
		return 'done';
	});
}

/** Closes an account and ends its sessions; its tokens stop too. The last active administrator stays. */
export async function deactivate(personId: string): Promise<ChangeOutcome> {
	return inTransaction(async (transaction) => {
		const person = await Person.findByPk(personId, { transaction });
		if (!person) return 'unknown';
		if (await isLastAdministrator(person, transaction)) return 'last administrator';
		if (person.deactivatedAt !== null) return 'done';
		await person.update({ deactivatedAt: now() }, { transaction });
		await endSessions(personId, null, transaction);
		await recordAudit({ action: 'deactivated', subject: person.email }, transaction);
		return 'done';
	});
}

/** Opens a closed account again, with the roles it had. */
export async function reactivate(personId: string): Promise<ChangeOutcome> {
	return inTransaction(async (transaction) => {
		const person = await Person.findByPk(personId, { transaction });
		if (!person) return 'unknown';
		if (person.deactivatedAt === null) return 'done';
		await person.update({ deactivatedAt: null }, { transaction });
		await recordAudit({ action: 'reactivated', subject: person.email }, transaction);
		return 'done';
	});
}

/** Whether nobody else could administrate if this person no longer did. */
async function isLastAdministrator(person: Person, transaction: Transaction): Promise<boolean> {
	const administrators = await administratorIds(transaction);
	return administrators.length === 1 && administrators[0] === person.id;
}

/** Ids of the active administrators. */
export async function administratorIds(transaction?: Transaction): Promise<string[]> {
	const rows = await PersonRole.findAll({ where: { role: 'administrator' }, transaction });
	const people = await Person.findAll({
		attributes: ['id'],
		where: { id: rows.map(({ personId }) => personId), deactivatedAt: null },
		transaction
	});
	return people.map(({ id }) => id);
}
