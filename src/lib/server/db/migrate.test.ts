import { readdirSync } from 'node:fs';
import path from 'node:path';
import { QueryTypes } from 'sequelize';
import { describe, expect, it } from 'vitest';
import { temporaryFolder } from '../../../../tests/support/database';
import { openDatabase } from './connection';
import { migrate, type Migration } from './migrate';

const newFile = () => path.join(temporaryFolder(), 'test.sqlite');

/** What a query finds in a file, over a connection of its own as the server would open it. */
async function read<Row extends object>(file: string, sql: string): Promise<Row[]> {
	const db = openDatabase(file);
	try {
		return await db.query<Row>(sql, { type: QueryTypes.SELECT });
	} finally {
		await db.close();
	}
}

async function tablesOf(file: string): Promise<string[]> {
	const rows = await read<{ name: string }>(file, "SELECT name FROM sqlite_master WHERE type = 'table'");
	return rows.map(({ name }) => name);
}

const family: Migration = {
	name: '1.family',
	up: [
		'CREATE TABLE parent (id INTEGER PRIMARY KEY, name TEXT)',
		`CREATE TABLE child (id INTEGER PRIMARY KEY,
			parent_id INTEGER NOT NULL REFERENCES parent (id) ON DELETE CASCADE)`,
		"INSERT INTO parent VALUES (1, 'one'), (2, 'two')",
		'INSERT INTO child VALUES (10, 1), (20, 2), (21, 2)'
	]
};

describe('the shipped migrations', () => {
	it('make every table in a fresh file, in order of their names, and run only once', async () => {
		const file = newFile();
		const names = readdirSync(path.join(import.meta.dirname, 'migrations'))
			.map((name) => name.replace(/\.ts$/, ''))
			.sort();
		expect(await migrate(file)).toEqual(names);
		expect(await tablesOf(file)).toEqual(expect.arrayContaining(['source', 'sample', 'entry', 'revision']));
		expect(await migrate(file)).toEqual([]);
	});
});

describe('migrate', () => {
	it('runs only what a file has not had yet', async () => {
		const file = newFile();
		await migrate(file, [family]);
		const later: Migration = { name: '2.later', up: ['CREATE TABLE later (id INTEGER PRIMARY KEY)'] };
		expect(await migrate(file, [family, later])).toEqual(['2.later']);
		expect(await tablesOf(file)).toContain('later');
	});

	it('takes a migration that fails half way back as a whole, and tries it again next time', async () => {
		const file = newFile();
		const make = 'CREATE TABLE half (id INTEGER PRIMARY KEY)';
		const fill = "INSERT INTO parent VALUES (3, 'three')";
		const failing: Migration = { name: '2.half', up: [make, fill, 'INSERT INTO nowhere VALUES (1)'] };
		await expect(migrate(file, [family, failing])).rejects.toThrow(/nowhere/);
		expect(await tablesOf(file)).not.toContain('half');
		// The one before it stays.
		expect(await read(file, 'SELECT id FROM parent')).toHaveLength(2);
		expect(await migrate(file, [family, { name: '2.half', up: [make, fill] }])).toEqual(['2.half']);
		expect(await tablesOf(file)).toContain('half');
		expect(await read(file, 'SELECT id FROM parent')).toHaveLength(3);
	});

	it('refuses one that leaves broken references, and takes it back', async () => {
		const file = newFile();
		const orphaning: Migration = { name: '2.orphans', up: ['DELETE FROM parent WHERE id = 2'] };
		await expect(migrate(file, [family, orphaning])).rejects.toThrow(/2\.orphans leaves 2 broken/);
		expect(await read(file, 'SELECT id FROM parent')).toHaveLength(2);
		expect(await migrate(file, [family])).toEqual([]);
	});

	it('keeps the children of a table that is rebuilt by dropping it', async () => {
		const file = newFile();
		const rebuild: Migration = {
			name: '2.rebuild',
			up: [
				'CREATE TABLE parent_new (id INTEGER PRIMARY KEY, name TEXT NOT NULL)',
				'INSERT INTO parent_new SELECT id, name FROM parent',
				'DROP TABLE parent',
				'ALTER TABLE parent_new RENAME TO parent'
			]
		};
		await migrate(file, [family, rebuild]);
		expect(await read(file, 'SELECT id FROM child ORDER BY id')).toEqual([
			{ id: 10 },
			{ id: 20 },
			{ id: 21 }
		]);
		// And the new table is the one they refer to.
		await expect(read(file, 'INSERT INTO child VALUES (30, 3)')).rejects.toThrow(/FOREIGN KEY/);
	});
});
