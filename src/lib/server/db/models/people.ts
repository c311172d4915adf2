import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { Role } from '$lib/schemas/terms';

export class Person extends Model<InferAttributes<Person>, InferCreationAttributes<Person>> {
	declare id: string;
	declare email: string;
	/** The address as accounts are found by: see `emailKey`. */
	declare emailKey: string;
	declare name: string;
	declare passwordHash: string;
	/** Sealed secret of the second factor; null while it is off. */
	declare totpSecret: CreationOptional<string | null>;
	/** Sealed secret that waits for its first code. */
	declare totpPending: CreationOptional<string | null>;
	/** Time step of the last code that was accepted: no code works twice. */
	declare totpStep: CreationOptional<number | null>;
	declare deactivatedAt: CreationOptional<string | null>;
	declare createdAt: string;
	declare seenAt: CreationOptional<string | null>;
}

export class PersonRole extends Model<InferAttributes<PersonRole>, InferCreationAttributes<PersonRole>> {
	declare personId: string;
	declare role: Role;
}

export class SessionRow extends Model<InferAttributes<SessionRow>, InferCreationAttributes<SessionRow>> {
	declare idHash: string;
	/** Names the session on its owner's list of devices; opens nothing. */
	declare handle: string;
	declare personId: string;
	declare expiresAt: string;
	declare createdAt: string;
	declare seenAt: string;
	declare address: string;
	declare agent: string;
}

export class RecoveryCode extends Model<
	InferAttributes<RecoveryCode>,
	InferCreationAttributes<RecoveryCode>
> {
	declare id: CreationOptional<number>;
	declare personId: string;
	declare codeHash: string;
	declare usedAt: CreationOptional<string | null>;
}

export class Invitation extends Model<InferAttributes<Invitation>, InferCreationAttributes<Invitation>> {
	declare id: CreationOptional<number>;
	declare email: string;
	declare emailKey: string;
	/** JSON list of roles. */
	declare roles: string;
	declare tokenHash: string;
	declare invitedBy: string;
	declare createdAt: string;
	declare sentAt: string;
	declare expiresAt: string;
	declare acceptedAt: CreationOptional<string | null>;
	declare revokedAt: CreationOptional<string | null>;
}

export type LinkKind = 'set-up' | 'reset' | 'email-change';

export class OneTimeLink extends Model<InferAttributes<OneTimeLink>, InferCreationAttributes<OneTimeLink>> {
	declare id: CreationOptional<number>;
	declare kind: LinkKind;
	declare tokenHash: string;
	declare personId: string | null;
	/** The new address of an e-mail change. */
	declare email: string | null;
	declare createdAt: string;
	declare expiresAt: string;
	declare usedAt: CreationOptional<string | null>;
}

export class ApiToken extends Model<InferAttributes<ApiToken>, InferCreationAttributes<ApiToken>> {
	declare id: CreationOptional<number>;
	declare personId: string;
	declare name: string;
	declare tokenHash: string;
	/** Its last characters, to tell tokens apart. */
	declare hint: string;
	/** JSON list of scopes. */
	declare scopes: string;
	declare createdAt: string;
	declare expiresAt: string;
	declare usedAt: CreationOptional<string | null>;
}

export class Audit extends Model<InferAttributes<Audit>, InferCreationAttributes<Audit>> {
	declare id: CreationOptional<number>;
	declare at: string;
	declare action: string;
	declare actorId: string | null;
	declare actorName: string;
	declare subject: string;
	declare detail: string;
	declare address: string;
}

export class Setting extends Model<InferAttributes<Setting>, InferCreationAttributes<Setting>> {
	declare name: string;
	declare value: string;
}

const { TEXT, INTEGER } = DataTypes;
// Sequelize writes into the objects it is given, so every attribute gets one of its own.
const id = () => ({ type: INTEGER, primaryKey: true, autoIncrement: true });
const key = () => ({ type: TEXT, primaryKey: true });
const text = () => ({ type: TEXT, allowNull: false });

/** Ties the models of people to a connection. Tables themselves are made by migrations only. */
export function definePeople(sequelize: Sequelize) {
	Person.init(
		{
			id: key(),
			email: text(),
			emailKey: text(),
			name: text(),
			passwordHash: text(),
			totpSecret: TEXT,
			totpPending: TEXT,
			totpStep: INTEGER,
			deactivatedAt: TEXT,
			createdAt: text(),
			seenAt: TEXT
		},
		{ sequelize, tableName: 'person' }
	);
	PersonRole.init({ personId: key(), role: key() }, { sequelize, tableName: 'person_role' });
	SessionRow.init(
		{
			idHash: key(),
			handle: text(),
			personId: text(),
			expiresAt: text(),
			createdAt: text(),
			seenAt: text(),
			address: text(),
			agent: text()
		},
		{ sequelize, tableName: 'session' }
	);
	RecoveryCode.init(
		{ id: id(), personId: text(), codeHash: text(), usedAt: TEXT },
		{ sequelize, tableName: 'recovery_code' }
	);
	Invitation.init(
		{
			id: id(),
			email: text(),
			emailKey: text(),
			roles: text(),
			tokenHash: text(),
			invitedBy: text(),
			createdAt: text(),
			sentAt: text(),
			expiresAt: text(),
			acceptedAt: TEXT,
			revokedAt: TEXT
		},
		{ sequelize, tableName: 'invitation' }
	);
	OneTimeLink.init(
		{
			id: id(),
			kind: text(),
			tokenHash: text(),
			personId: TEXT,
			email: TEXT,
			createdAt: text(),
			expiresAt: text(),
			usedAt: TEXT
		},
		{ sequelize, tableName: 'one_time_link' }
	);
	ApiToken.init(
		{
			id: id(),
			personId: text(),
			name: text(),
			tokenHash: text(),
			hint: text(),
			scopes: text(),
			createdAt: text(),
			expiresAt: text(),
			usedAt: TEXT
		},
		{ sequelize, tableName: 'api_token' }
	);
	Audit.init(
		{
			id: id(),
			at: text(),
			action: text(),
			actorId: TEXT,
			actorName: text(),
			subject: text(),
			detail: text(),
			address: text()
		},
		{ sequelize, tableName: 'audit' }
	);
	Setting.init({ name: key(), value: text() }, { sequelize, tableName: 'setting' });
}
