import fs from 'node:fs';
import path from 'node:path';
import { Sequelize, Transaction } from 'sequelize';
import sqlite3 from 'sqlite3';

/** How long a connection waits for another's write lock before it gives up. */
const BUSY_TIMEOUT_MS = 5000;

/**
 * Sequelize opens a connection of its own for each transaction and sets only foreign_keys on it, and its connect hooks never fire for SQLite.
 * So the pragmas are run by the driver itself, on every connection it opens.
 */
function driver(foreignKeys: boolean) {
	const pragmas = [
		'PRAGMA journal_mode = WAL',
		`PRAGMA busy_timeout = ${BUSY_TIMEOUT_MS}`,
		'PRAGMA synchronous = FULL',
		`PRAGMA foreign_keys = ${foreignKeys ? 'ON' : 'OFF'}`
	].join('; ');

	class Database extends sqlite3.Database {
		constructor(filename: string, mode: number, callback: (error: Error | null) => void) {
			super(filename, mode, (error) => {
				if (error) return callback(error);
				this.exec(pragmas, callback);
			});
		}
	}
	return { ...sqlite3, Database };
}

/**
 * Opens the database file, making its folder if need be.
 * @param file path of the SQLite file; one file per test worker, never `:memory:` (it has a single connection)
 * @param foreignKeys off only for migrations, which check them afterwards
 */
export function openDatabase(file: string, { foreignKeys = true } = {}): Sequelize {
	fs.mkdirSync(path.dirname(file), { recursive: true });
	return new Sequelize({
		dialect: 'sqlite',
		dialectModule: driver(foreignKeys),
		// Sequelize would issue its own PRAGMA FOREIGN_KEYS = ON otherwise.
		dialectOptions: {},
		storage: file,
		foreignKeys,
		logging: false,
		transactionType: Transaction.TYPES.IMMEDIATE,
		define: { timestamps: false, underscored: true, freezeTableName: true }
	} as ConstructorParameters<typeof Sequelize>[0] & object);
}
