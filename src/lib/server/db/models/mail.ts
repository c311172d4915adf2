import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { MailKind, MailState } from '$lib/schemas/terms';

export class Mail extends Model<InferAttributes<Mail>, InferCreationAttributes<Mail>> {
	declare id: CreationOptional<number>;
	declare kind: MailKind;
	declare recipient: string;
	declare subject: string;
	/** The message, sealed; null once it has gone out or was dropped. */
	declare sealed: string | null;
	declare messageId: string;
	declare state: MailState;
	declare attempts: CreationOptional<number>;
	declare nextAt: string;
	/** After this the link in it is dead: it is not sent any more. */
	declare expiresAt: string | null;
	declare lastError: CreationOptional<string | null>;
	declare createdAt: string;
	declare sentAt: CreationOptional<string | null>;
}

/** Ties the mail queue to a connection. */
export function defineMail(sequelize: Sequelize) {
	const { TEXT, INTEGER } = DataTypes;
	const text = () => ({ type: TEXT, allowNull: false });
	Mail.init(
		{
			id: { type: INTEGER, primaryKey: true, autoIncrement: true },
			kind: text(),
			recipient: text(),
			subject: text(),
			sealed: TEXT,
			messageId: text(),
			state: text(),
			attempts: { type: INTEGER, allowNull: false, defaultValue: 0 },
			nextAt: text(),
			expiresAt: TEXT,
			lastError: TEXT,
			createdAt: text(),
			sentAt: TEXT
		},
		{ sequelize, tableName: 'mail' }
	);
}
