import {
	DataTypes,
	Model,
	type CreationOptional,
	type InferAttributes,
	type InferCreationAttributes,
	type Sequelize
} from 'sequelize';
import type { AppraisalGrade } from '$lib/schemas/terms';

export class SourceRevision extends Model<
	InferAttributes<SourceRevision>,
	InferCreationAttributes<SourceRevision>
> {
	declare id: CreationOptional<number>;
	declare sourceId: string;
	declare number: number;
	declare at: string;
	declare who: string;
	declare whoId: string | null;
	declare before: string | null;
	declare after: string | null;
	declare why: string;
}

export class SourceRetraction extends Model<
	InferAttributes<SourceRetraction>,
	InferCreationAttributes<SourceRetraction>
> {
	declare sourceId: string;
	declare at: string;
	declare who: string;
	declare reason: string;
	/** DOI of the notice, where there is one. */
	declare notice: string | null;
}

export class SourceAppraisal extends Model<
	InferAttributes<SourceAppraisal>,
	InferCreationAttributes<SourceAppraisal>
> {
	declare sourceId: string;
	declare at: string;
	declare who: string;
	/** Answers by question, as JSON. */
	declare answers: string;
	declare note: string;
	declare grade: AppraisalGrade;
}

export class Attachment extends Model<InferAttributes<Attachment>, InferCreationAttributes<Attachment>> {
	declare id: string;
	declare sourceId: string;
	/** The name it had when it came, made harmless. */
	declare name: string;
	declare caption: string;
	/** Its name in the storage. */
	declare stored: string;
	declare type: string;
	declare bytes: number;
	declare addedBy: string;
	declare addedAt: string;
}

export type ImportState = 'preview' | 'writing' | 'finishing' | 'done' | 'cancelled' | 'failed';

export class TableImport extends Model<InferAttributes<TableImport>, InferCreationAttributes<TableImport>> {
	declare id: string;
	declare file: string;
	declare stored: string;
	declare kind: 'csv' | 'xlsx';
	/** Column by heading, as JSON. */
	declare mapping: string;
	declare state: ImportState;
	declare publish: CreationOptional<boolean>;
	declare personId: string;
	declare personName: string;
	declare at: string;
	declare endedAt: CreationOptional<string | null>;
	declare rows: CreationOptional<number>;
	declare entries: CreationOptional<number>;
	declare message: CreationOptional<string>;
}

class ImportEntry extends Model<InferAttributes<ImportEntry>, InferCreationAttributes<ImportEntry>> {
	declare entryId: number;
	declare importId: string;
}

class ImportSample extends Model<InferAttributes<ImportSample>, InferCreationAttributes<ImportSample>> {
	declare sampleId: number;
	declare importId: string;
}

const { TEXT, INTEGER, BOOLEAN } = DataTypes;
// Sequelize writes into the objects it is given, so every attribute gets one of its own.
const key = (type: typeof TEXT | typeof INTEGER) => ({ type, primaryKey: true });
const text = () => ({ type: TEXT, allowNull: false });
const integer = () => ({ type: INTEGER, allowNull: false });

/** Ties the models of sources' keeping and of imports to a connection. Tables themselves are made by migrations only. */
export function defineIntake(sequelize: Sequelize) {
	SourceRevision.init(
		{
			id: { type: INTEGER, primaryKey: true, autoIncrement: true },
			sourceId: text(),
			number: integer(),
			at: text(),
			who: text(),
			whoId: TEXT,
			before: TEXT,
			after: TEXT,
			why: text()
		},
		{ sequelize, tableName: 'source_revision' }
	);
	SourceRetraction.init(
		{ sourceId: key(TEXT), at: text(), who: text(), reason: text(), notice: TEXT },
		{ sequelize, tableName: 'source_retraction' }
	);
	SourceAppraisal.init(
		{ sourceId: key(TEXT), at: text(), who: text(), answers: text(), note: text(), grade: text() },
		{ sequelize, tableName: 'source_appraisal' }
	);
	Attachment.init(
		{
			id: key(TEXT),
			sourceId: text(),
			name: text(),
			caption: text(),
			stored: text(),
			type: text(),
			bytes: integer(),
			addedBy: text(),
			addedAt: text()
		},
		{ sequelize, tableName: 'attachment' }
	);
	TableImport.init(
		{
			id: key(TEXT),
			file: text(),
			stored: text(),
			kind: text(),
			mapping: text(),
			state: text(),
			publish: { type: BOOLEAN, allowNull: false, defaultValue: false },
			personId: text(),
			personName: text(),
			at: text(),
			endedAt: TEXT,
			rows: { ...integer(), defaultValue: 0 },
			entries: { ...integer(), defaultValue: 0 },
			message: { ...text(), defaultValue: '' }
		},
		{ sequelize, tableName: 'table_import' }
	);
	ImportEntry.init({ entryId: key(INTEGER), importId: text() }, { sequelize, tableName: 'import_entry' });
	ImportSample.init({ sampleId: key(INTEGER), importId: text() }, { sequelize, tableName: 'import_sample' });
}
