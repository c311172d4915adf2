import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { Provenance } from './literature';

/** A published mean, standard deviation or range. */
export class Measurement extends Model<InferAttributes<Measurement>, InferCreationAttributes<Measurement>> {
	declare id: CreationOptional<number>;
	declare sourceId: string;
	declare locator: string;
	declare tooth: string;
	declare root: string;
	declare scope: string;
	declare country: string;
	declare method: string;
	declare quantity: string;
	declare n: number | null;
	declare mean: number | null;
	declare sd: number | null;
	declare min: number | null;
	declare max: number | null;
	declare unit: string;
	declare provenance: Provenance;
	declare note: string;
}

/** How good a test or an image was. */
export class Diagnostic extends Model<InferAttributes<Diagnostic>, InferCreationAttributes<Diagnostic>> {
	declare id: CreationOptional<number>;
	declare sourceId: string;
	declare locator: string;
	declare test: string;
	declare target: string;
	declare tooth: string;
	declare root: string;
	declare referenceStandard: string;
	declare n: number | null;
	declare tp: number | null;
	declare fp: number | null;
	declare fn: number | null;
	declare tn: number | null;
	declare sensitivity: number | null;
	declare specificity: number | null;
	declare kappa: number | null;
	declare provenance: Provenance;
	declare note: string;
}

/** The Beta distribution (or standard deviation) of one parameter of a finding. */
export class Characteristic extends Model<
	InferAttributes<Characteristic>,
	InferCreationAttributes<Characteristic>
> {
	declare id: CreationOptional<number>;
	declare finding: string;
	declare parameter: string;
	declare toothGroup: string;
	declare betaA: number | null;
	declare betaB: number | null;
	declare sdMm: number | null;
	declare basis: 'published' | 'derived' | 'assumed';
	/** Source ids joined by `;`, empty for an assumed value. */
	declare sourceIds: string;
	declare note: string;
}

/** A dimension, tolerance or colour of a standard. */
export class Standard extends Model<InferAttributes<Standard>, InferCreationAttributes<Standard>> {
	declare id: CreationOptional<number>;
	declare sourceId: string;
	declare standard: string;
	declare item: string;
	/** A number or, for colours and the like, a word. */
	declare value: string;
	declare lower: number | null;
	declare upper: number | null;
	declare unit: string;
	declare provenance: Provenance;
	declare note: string;
}

const { TEXT, INTEGER, REAL } = DataTypes;
// Sequelize writes into the objects it is given, so every attribute gets one of its own.
const id = () => ({ type: INTEGER, primaryKey: true, autoIncrement: true });
const text = () => ({ type: TEXT, allowNull: false });

/** Ties the models of the smaller literature files to a connection. */
export function defineSupplements(sequelize: Sequelize) {
	Measurement.init(
		{
			id: id(),
			sourceId: text(),
			locator: text(),
			tooth: text(),
			root: text(),
			scope: text(),
			country: text(),
			method: text(),
			quantity: text(),
			n: INTEGER,
			mean: REAL,
			sd: REAL,
			min: REAL,
			max: REAL,
			unit: text(),
			provenance: text(),
			note: text()
		},
		{ sequelize, tableName: 'measurement' }
	);
	Diagnostic.init(
		{
			id: id(),
			sourceId: text(),
			locator: text(),
			test: text(),
			target: text(),
			tooth: text(),
			root: text(),
			referenceStandard: text(),
			n: INTEGER,
			tp: INTEGER,
			fp: INTEGER,
			fn: INTEGER,
			tn: INTEGER,
			sensitivity: REAL,
			specificity: REAL,
			kappa: REAL,
			provenance: text(),
			note: text()
		},
		{ sequelize, tableName: 'diagnostic' }
	);
	Characteristic.init(
		{
			id: id(),
			finding: text(),
			parameter: text(),
			toothGroup: text(),
			betaA: REAL,
			betaB: REAL,
			sdMm: REAL,
			basis: text(),
			sourceIds: text(),
			note: text()
		},
		{ sequelize, tableName: 'finding_characteristic' }
	);
	Standard.init(
		{
			id: id(),
			sourceId: text(),
			standard: text(),
			item: text(),
			value: text(),
			lower: REAL,
			upper: REAL,
			unit: text(),
			provenance: text(),
			note: text()
		},
		{ sequelize, tableName: 'standard' }
	);
}
