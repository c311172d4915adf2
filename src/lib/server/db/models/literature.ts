import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';

export type Provenance = 'read' | 'secondary' | 'memory';
export type EntryState = 'draft' | 'in-review' | 'published' | 'withdrawn';

export class Source extends Model<InferAttributes<Source>, InferCreationAttributes<Source>> {
	declare id: string;
	/** The source as CSL-JSON, kept whole. */
	declare csl: string;
	declare title: string | null;
	declare type: string;
	declare journal: string | null;
	declare year: number | null;
	declare doi: string | null;
	declare pmid: string | null;
	declare pmcid: string | null;
	declare citable: boolean;
	declare authorsKnown: boolean;
	declare retracted: boolean;
	declare seedHash: string | null;
}

export class Sample extends Model<InferAttributes<Sample>, InferCreationAttributes<Sample>> {
	declare id: CreationOptional<number>;
	declare sourceId: string;
	declare tooth: string;
	declare root: string;
	declare scope: string;
	declare country: string;
	declare method: string;
	declare subgroup: string;
	declare total: number | null;
	declare poolable: boolean | null;
	/** Why an editor said so; null where none has. */
	declare poolableReason: CreationOptional<string | null>;
	declare seedKey: string | null;
}

export class Entry extends Model<InferAttributes<Entry>, InferCreationAttributes<Entry>> {
	declare id: CreationOptional<number>;
	declare sampleId: number;
	declare sourceId: string;
	declare locator: string;
	declare measure: string;
	declare state: EntryState;
	declare provenance: Provenance;
	declare confirmed: boolean;
	declare seedKey: string | null;
	declare seedHash: string | null;
}

export class Figure extends Model<InferAttributes<Figure>, InferCreationAttributes<Figure>> {
	declare id: CreationOptional<number>;
	declare entryId: number;
	declare position: number;
	declare category: string;
	declare count: number | null;
	declare percent: number | null;
	declare countDerived: boolean;
	declare note: string;
}

export class Revision extends Model<InferAttributes<Revision>, InferCreationAttributes<Revision>> {
	declare id: CreationOptional<number>;
	declare entryId: number;
	declare number: number;
	declare at: string;
	declare who: string;
	/** Null for the seed. */
	declare whoId: CreationOptional<string | null>;
	/** Who drafted what this revision publishes. */
	declare author: CreationOptional<string | null>;
	declare before: string | null;
	declare after: string | null;
	declare why: string;
}

export class TableRevision extends Model<
	InferAttributes<TableRevision>,
	InferCreationAttributes<TableRevision>
> {
	declare id: CreationOptional<number>;
	declare at: string;
	declare why: string;
	declare seedDigest: CreationOptional<string | null>;
	/** Who published it; null for the seed. */
	declare who: CreationOptional<string | null>;
	/** Who wrote what was published, where it was checked by another. */
	declare author: CreationOptional<string | null>;
	/** Number of the last revision of an entry that belongs to it; filled in by the database. */
	declare lastRevision: CreationOptional<number | null>;
}

export class UnplacedRow extends Model<InferAttributes<UnplacedRow>, InferCreationAttributes<UnplacedRow>> {
	declare id: CreationOptional<number>;
	declare file: string;
	declare line: number;
	declare sourceId: string;
	declare summary: string;
	declare reason: string;
}

const { TEXT, INTEGER, REAL, BOOLEAN } = DataTypes;
// Sequelize writes into the objects it is given, so every attribute gets one of its own.
const id = () => ({ type: INTEGER, primaryKey: true, autoIncrement: true });
const text = () => ({ type: TEXT, allowNull: false });
const integer = () => ({ type: INTEGER, allowNull: false });
const flag = () => ({ type: BOOLEAN, allowNull: false });

/** Ties the literature models to a connection. Tables themselves are made by migrations only. */
export function defineLiterature(sequelize: Sequelize) {
	Source.init(
		{
			id: { type: TEXT, primaryKey: true },
			csl: text(),
			title: TEXT,
			type: text(),
			journal: TEXT,
			year: INTEGER,
			doi: TEXT,
			pmid: TEXT,
			pmcid: TEXT,
			citable: flag(),
			authorsKnown: flag(),
			retracted: { ...flag(), defaultValue: false },
			seedHash: TEXT
		},
		{ sequelize, tableName: 'source' }
	);
	Sample.init(
		{
			id: id(),
			sourceId: text(),
			tooth: text(),
			root: text(),
			scope: text(),
			country: text(),
			method: text(),
			subgroup: text(),
			total: INTEGER,
			poolable: BOOLEAN,
			poolableReason: TEXT,
			seedKey: TEXT
		},
		{ sequelize, tableName: 'sample' }
	);
	Entry.init(
		{
			id: id(),
			sampleId: integer(),
			sourceId: text(),
			locator: text(),
			measure: text(),
			state: text(),
			provenance: text(),
			confirmed: { ...flag(), defaultValue: false },
			seedKey: TEXT,
			seedHash: TEXT
		},
		{ sequelize, tableName: 'entry' }
	);
	Figure.init(
		{
			id: id(),
			entryId: integer(),
			position: integer(),
			category: text(),
			count: INTEGER,
			percent: REAL,
			countDerived: flag(),
			note: text()
		},
		{ sequelize, tableName: 'figure' }
	);
	Revision.init(
		{
			id: id(),
			entryId: integer(),
			number: integer(),
			at: text(),
			who: text(),
			whoId: TEXT,
			author: TEXT,
			before: TEXT,
			after: TEXT,
			why: text()
		},
		{ sequelize, tableName: 'revision' }
	);
	TableRevision.init(
		{
			id: id(),
			at: text(),
			why: text(),
			seedDigest: TEXT,
			who: TEXT,
			author: TEXT,
			lastRevision: INTEGER
		},
		{ sequelize, tableName: 'table_revision' }
	);
	UnplacedRow.init(
		{ id: id(), file: text(), line: integer(), sourceId: text(), summary: text(), reason: text() },
		{ sequelize, tableName: 'unplaced_row' }
	);
}
