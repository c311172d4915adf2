import path from 'node:path';
import { QueryTypes, type Sequelize, type Transaction } from 'sequelize';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { temporaryFolder } from '../../../../tests/support/database';
import { openDatabase } from './connection';

let db: Sequelize;
beforeAll(async () => {
	// In a folder that is not there yet.
	db = openDatabase(path.join(temporaryFolder(), 'deeper', 'test.sqlite'));
	await db.query('CREATE TABLE counter (id INTEGER PRIMARY KEY, value INTEGER NOT NULL)');
	await db.query('INSERT INTO counter VALUES (1, 0)');
});
afterAll(() => db.close());

async function pragma(name: string, transaction?: Transaction, of: Sequelize = db): Promise<unknown> {
	const [row] = await of.query<Record<string, unknown>>(`PRAGMA ${name}`, {
		type: QueryTypes.SELECT,
		transaction
	});
	return Object.values(row)[0];
}

// Values as https://www.sqlite.org/pragma.html numbers them: synchronous 2 is FULL.
const PRAGMAS: [string, unknown][] = [
	['journal_mode', 'wal'],
	['busy_timeout', 5000],
	['synchronous', 2],
	['foreign_keys', 1]
];

describe('a connection', () => {
	it.each(PRAGMAS)('has %s set', async (name, value) => {
		expect(await pragma(name)).toBe(value);
	});

	it.each(PRAGMAS)(
		'has %s set inside a transaction, which is a connection of its own',
		async (name, value) => {
			expect(await db.transaction((transaction) => pragma(name, transaction))).toBe(value);
		}
	);

	it('has foreign keys off where a migration asks for that, inside a transaction too', async () => {
		const loose = openDatabase(path.join(temporaryFolder(), 'test.sqlite'), { foreignKeys: false });
		try {
			expect(await pragma('foreign_keys', undefined, loose)).toBe(0);
			expect(await loose.transaction((transaction) => pragma('foreign_keys', transaction, loose))).toBe(0);
		} finally {
			await loose.close();
		}
	});

	it('lets transactions that read and then write wait for one another, none losing what another wrote', async () => {
		const increase = () =>
			db.transaction(async (transaction) => {
				const [{ value }] = await db.query<{ value: number }>('SELECT value FROM counter', {
					type: QueryTypes.SELECT,
					transaction
				});
				// The others get every chance to read the same value.
				await new Promise((resolve) => setTimeout(resolve, 20));
				await db.query('UPDATE counter SET value = :value', {
					replacements: { value: value + 1 },
					transaction
				});
			});
		await Promise.all([increase(), increase(), increase()]);
		expect(await db.query('SELECT value FROM counter', { type: QueryTypes.SELECT })).toEqual([{ value: 3 }]);
	});
});
