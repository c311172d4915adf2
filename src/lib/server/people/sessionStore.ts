import { Op, type Transaction } from 'sequelize';
import type { Role } from '$lib/schemas/terms';
import { Person, PersonRole, SessionRow } from '../db/models/people';
import { hashSecret } from './secrets';

/** What is kept of a session beside its id, owner and end. */
export interface SessionFacts {
	handle: string;
	createdAt: string;
	seenAt: string;
	address: string;
	agent: string;
}

/** What a session knows of its owner, read anew with every request: a change of roles acts at once. */
export interface OwnerFacts {
	email: string;
	name: string;
	roles: Role[];
	secondFactor: boolean;
}

interface StoredSession {
	id: string;
	userId: string;
	expiresAt: Date;
	attributes: SessionFacts;
}

/**
 * Sessions in the database, in the shape sessions.ts needs. Only the SHA-256 of a session's id is stored, so a copy of the database opens
 * no session; a session read by its id answers with the id it was asked for.
 */
export const sessionStore = {
	/** A session and its owner; [null, null] for an unknown id, [session, null] if the owner is deactivated. */
	async getSessionAndUser(
		id: string
	): Promise<[StoredSession | null, { id: string; attributes: OwnerFacts } | null]> {
		const row = await SessionRow.findByPk(hashSecret(id));
		if (!row) return [null, null];
		const session = stored(row, id);
		const person = await Person.findOne({ where: { id: row.personId, deactivatedAt: null } });
		if (!person) return [session, null];
		const roles = await PersonRole.findAll({ where: { personId: person.id }, order: ['role'] });
		const attributes = {
			email: person.email,
			name: person.name,
			roles: roles.map(({ role }) => role),
			secondFactor: person.totpSecret !== null
		};
		return [session, { id: person.id, attributes }];
	},

	/** The sessions of a person. Their ids are hashes: nobody can know the real ones. */
	async getUserSessions(personId: string): Promise<StoredSession[]> {
		const rows = await SessionRow.findAll({ where: { personId }, order: [['seenAt', 'DESC']] });
		return rows.map((row) => stored(row, row.idHash));
	},

	async setSession({ id, userId, expiresAt, attributes }: StoredSession): Promise<void> {
		await SessionRow.create({
			...attributes,
			idHash: hashSecret(id),
			personId: userId,
			expiresAt: expiresAt.toISOString()
		});
	},

	async updateSessionExpiration(id: string, expiresAt: Date): Promise<void> {
		await SessionRow.update({ expiresAt: expiresAt.toISOString() }, { where: { idHash: hashSecret(id) } });
	},

	async deleteSession(id: string): Promise<void> {
		await SessionRow.destroy({ where: { idHash: hashSecret(id) } });
	},

	async deleteUserSessions(personId: string): Promise<void> {
		await SessionRow.destroy({ where: { personId } });
	},

	async deleteExpiredSessions(): Promise<void> {
		await SessionRow.destroy({ where: { expiresAt: { [Op.lte]: new Date().toISOString() } } });
	},

	/** Notes that a session is in use. */
	async touch(handle: string, seenAt: string, address: string): Promise<void> {
		await SessionRow.update({ seenAt, address }, { where: { handle } });
	},

	/** Ends one session of a person by its handle; false if the person has none of that name. */
	async deleteByHandle(personId: string, handle: string): Promise<boolean> {
		return (await SessionRow.destroy({ where: { personId, handle } })) > 0;
	},

	/** Ends the sessions of a person but one; all of them without a handle. */
	async deleteOthers(personId: string, handle: string | null, transaction?: Transaction): Promise<number> {
		const where = handle === null ? { personId } : { personId, handle: { [Op.ne]: handle } };
		return SessionRow.destroy({ where, transaction });
	}
};

function stored(row: SessionRow, id: string): StoredSession {
	const { handle, createdAt, seenAt, address, agent } = row;
	return {
		id,
		userId: row.personId,
		expiresAt: new Date(row.expiresAt),
		attributes: { handle, createdAt, seenAt, address, agent }
	};
}
