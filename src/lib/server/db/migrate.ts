import { QueryTypes, type QueryInterface, type Sequelize } from 'sequelize';
import { SequelizeStorage, Umzug } from 'umzug';
import { openDatabase } from './connection';

/** A migration: plain SQL statements, run in order in one transaction. Never Sequelize's column changes, which rebuild tables by dropping them. */
export interface Migration {
	name: string;
	up: string[];
}

// An explicit list: a glob over the disk finds nothing once the server is bundled.
const modules = import.meta.glob<{ migration: Migration }>('./migrations/*.ts', { eager: true });
const shipped = Object.values(modules)
	.map((module) => module.migration)
	.sort((a, b) => a.name.localeCompare(b.name));

/**
 * Brings the database file up to date. Each migration runs in a transaction of its own, on a second connection set with foreign keys off
 * (so that rebuilding a table cannot cascade), and the keys are checked before it commits.
 * @returns names of the migrations run
 * @throws when a migration fails or leaves a broken reference; the file is then as before that migration
 */
export async function migrate(file: string, migrations: Migration[] = shipped): Promise<string[]> {
	const sequelize = openDatabase(file, { foreignKeys: false });
	try {
		const umzug = new Umzug<QueryInterface>({
			migrations: migrations.map(({ name, up }) => ({ name, up: () => run(sequelize, name, up) })),
			context: sequelize.getQueryInterface(),
			storage: new SequelizeStorage({ sequelize, tableName: 'migration' }),
			logger: undefined
		});
		return (await umzug.up()).map(({ name }) => name);
	} finally {
		await sequelize.close();
	}
}

async function run(sequelize: Sequelize, name: string, statements: string[]) {
	await sequelize.transaction(async (transaction) => {
		for (const statement of statements) await sequelize.query(statement, { transaction });
		const broken = await sequelize.query('PRAGMA foreign_key_check', {
			type: QueryTypes.SELECT,
			transaction
		});
		if (broken.length > 0) throw new Error(`Migration ${name} leaves ${broken.length} broken references.`);
	});
}
