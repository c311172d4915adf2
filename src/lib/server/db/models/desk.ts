import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';

export type WorkState = 'draft' | 'in-review';

/** Who works on a draft, and where it stands. The draft itself is the revision of this number. */
export class EntryWork extends Model<InferAttributes<EntryWork>, InferCreationAttributes<EntryWork>> {
	declare entryId: number;
	declare state: WorkState;
	declare number: number;
	declare authorId: string;
	declare author: string;
	/** Ids of everyone who has changed it, as a JSON list: none of them may publish it. */
	declare editors: string;
	declare reviewerId: CreationOptional<string | null>;
	declare reviewer: CreationOptional<string | null>;
	/** Why it was returned, as a JSON list; null if it was not, or has been sent again. */
	declare reasons: CreationOptional<string | null>;
	/** What the author tells the reviewer. */
	declare note: CreationOptional<string>;
	declare at: string;
}

/** The same for a finding's characteristic, by its name. */
export class CharacteristicWork extends Model<
	InferAttributes<CharacteristicWork>,
	InferCreationAttributes<CharacteristicWork>
> {
	declare name: string;
	declare state: WorkState;
	declare number: number;
	declare authorId: string;
	declare author: string;
	declare editors: string;
	declare reviewerId: CreationOptional<string | null>;
	declare reviewer: CreationOptional<string | null>;
	declare reasons: CreationOptional<string | null>;
	declare note: CreationOptional<string>;
	declare at: string;
}

/** Append-only, as `revision` is for entries. */
export class CharacteristicRevision extends Model<
	InferAttributes<CharacteristicRevision>,
	InferCreationAttributes<CharacteristicRevision>
> {
	declare id: CreationOptional<number>;
	declare name: string;
	declare number: number;
	declare at: string;
	declare who: string;
	declare whoId: string;
	declare author: string | null;
	declare before: string | null;
	declare after: string;
	declare why: string;
}

/** How far the estimates of a root moved with a revision of the table; `after` is null until it has been worked out. */
export class TableEffect extends Model<InferAttributes<TableEffect>, InferCreationAttributes<TableEffect>> {
	declare id: CreationOptional<number>;
	declare tableRevisionId: number;
	declare tooth: string;
	declare root: string;
	declare before: string;
	declare after: string | null;
}

const { TEXT, INTEGER } = DataTypes;
// Sequelize writes into the objects it is given, so every attribute gets one of its own.
const id = () => ({ type: INTEGER, primaryKey: true, autoIncrement: true });
const text = () => ({ type: TEXT, allowNull: false });
const integer = () => ({ type: INTEGER, allowNull: false });
const work = () => ({
	state: text(),
	number: integer(),
	authorId: text(),
	author: text(),
	editors: text(),
	reviewerId: TEXT,
	reviewer: TEXT,
	reasons: TEXT,
	note: { ...text(), defaultValue: '' },
	at: text()
});

/** Ties the models of the desk to a connection. */
export function defineDesk(sequelize: Sequelize) {
	EntryWork.init(
		{ entryId: { type: INTEGER, primaryKey: true }, ...work() },
		{ sequelize, tableName: 'entry_work' }
	);
	CharacteristicWork.init(
		{ name: { type: TEXT, primaryKey: true }, ...work() },
		{ sequelize, tableName: 'characteristic_work' }
	);
	CharacteristicRevision.init(
		{
			id: id(),
			name: text(),
			number: integer(),
			at: text(),
			who: text(),
			whoId: text(),
			author: TEXT,
			before: TEXT,
			after: text(),
			why: text()
		},
		{ sequelize, tableName: 'characteristic_revision' }
	);
	TableEffect.init(
		{ id: id(), tableRevisionId: integer(), tooth: text(), root: text(), before: text(), after: TEXT },
		{ sequelize, tableName: 'table_effect' }
	);
}
