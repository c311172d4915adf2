import path from 'node:path';
import type { Sequelize } from 'sequelize';
import { openDatabase } from './connection';
import { migrate } from './migrate';

import { defineIntake } from './models/intake';
import { defineDesk } from './models/desk';
import { defineLiterature } from './models/literature';
import { defineMail } from './models/mail';
import { definePeople } from './models/people';
import { defineSupplements } from './models/supplements';

/** Name of the database file inside DATA_DIR. */
const DATABASE_FILE = 'watersmeet.sqlite';

// Hot reload evaluates this module again; the connection must outlive that.
const held = globalThis as typeof globalThis & { watersmeetDatabase?: Promise<Sequelize> };

/**
 * Migrates and opens the database of a data folder, with every model tied to it.
 * @param dataDir folder of the database file; made if it does not exist
 * @public for tools that open a folder of their own
 */
export async function connect(dataDir: string): Promise<Sequelize> {
	const file = path.join(dataDir, DATABASE_FILE);
	await migrate(file);
	const sequelize = openDatabase(file);
	defineLiterature(sequelize);
	defineSupplements(sequelize);
	defineIntake(sequelize);
	definePeople(sequelize);
	defineMail(sequelize);
	defineDesk(sequelize);
	return sequelize;
}

/** The server's one connection; opened by the first call. */
export function database(dataDir: string): Promise<Sequelize> {
	held.watersmeetDatabase ??= connect(dataDir);
	return held.watersmeetDatabase;
}

/** Closes the server's connection, if there is one. */
export async function closeDatabase(): Promise<void> {
	const open = held.watersmeetDatabase;
	held.watersmeetDatabase = undefined;
	await (await open)?.close();
}
