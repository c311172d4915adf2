import { existsSync, mkdirSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import * as tar from 'tar';
import type { Sequelize } from 'sequelize';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { temporaryFolder } from '../../../../tests/support/database';
import { cslSource, literature, observation } from '../../../../tests/support/madeUpLiterature';
import { newPerson } from '../../../../tests/support/people';
import { environment } from '../config';
import { closeDatabase, database } from '../db';
import { Source } from '../db/models/literature';
import { seedLiterature } from '../table/seed';
import {
	BackupRefused,
	DATABASE_FILE,
	hashOf,
	listBackups,
	makeBackup,
	pruneBackups,
	runSql,
	schemaOf
} from './archive.js';
import { backUpIfDue } from './daily';
import { restoreBackup } from './restore.js';

let dataDir: string;
let db: Sequelize;
let known: string[];

beforeAll(async () => {
	dataDir = temporaryFolder();
	db = await database(dataDir);
	await seedLiterature(db, literature({ sources: [cslSource('adams-2001')], observations: [observation()] }));
	await newPerson({ id: 'ida', roles: ['educator'] });
	mkdirSync(path.join(dataDir, 'uploads'));
	writeFileSync(path.join(dataDir, 'uploads', 'abcdefgh12.png'), 'a picture');
	writeFileSync(path.join(dataDir, 'secret.key'), 'a key');
	known = await schemaOf(path.join(dataDir, DATABASE_FILE));
});
afterAll(closeDatabase);

let backupDir: string;
beforeEach(() => {
	backupDir = temporaryFolder();
});

const tables = ['source', 'entry', 'sample', 'figure', 'person', 'person_role', 'source_row'];
/** Every row of the tables that matter, in the order of their keys. */
const contentOf = async (file: string) =>
	Promise.all(tables.map((table) => runSql(file, `SELECT * FROM ${table} ORDER BY 1, 2`)));
const make = () => makeBackup({ dataDir, backupDir });

/** The archive with something about its files changed. */
async function tampered(change: (folder: string) => void): Promise<string> {
	const folder = temporaryFolder();
	await tar.extract({ file: await make(), cwd: folder });
	change(folder);
	const file = path.join(backupDir, 'tampered.tar.gz');
	await tar.create({ gzip: true, cwd: folder, file }, readdirSync(folder));
	return file;
}
const restore = (file: string, into: string, knownSchema = known) =>
	restoreBackup({ file, dataDir: into, knownSchema });

describe('a backup', () => {
	it('made while others write is whole, and restored into an empty folder is the table, the people and the files', async () => {
		let going = true;
		const writing = (async () => {
			for (let number = 0; going; number++)
				await Source.create({
					...{ id: `busy-${number}`, csl: '{}', title: null, type: 'article', journal: null, year: null },
					...{
						doi: null,
						pmid: null,
						pmcid: null,
						citable: false,
						authorsKnown: false,
						retracted: false,
						seedHash: null
					}
				});
		})();
		const file = await make();
		going = false;
		await writing;
		const into = path.join(temporaryFolder(), 'new');
		const { aside } = await restore(file, into);
		expect(aside).toBeNull();
		expect(readFileSync(path.join(into, 'uploads', 'abcdefgh12.png'), 'utf8')).toBe('a picture');
		expect(readFileSync(path.join(into, 'secret.key'), 'utf8')).toBe('a key');
		const restored = await contentOf(path.join(into, DATABASE_FILE));
		// Sources of the writer are there up to one moment, without a gap; everything else is what it is.
		const busy = restored[0].filter(({ id }) => String(id).startsWith('busy-'));
		expect(busy.map(({ id }) => id).sort()).toEqual(
			Array.from({ length: busy.length }, (_, n) => `busy-${n}`).sort()
		);
		const [sources, ...others] = await contentOf(path.join(dataDir, DATABASE_FILE));
		expect(restored[0].find(({ id }) => id === 'adams-2001')).toEqual(
			sources.find(({ id }) => id === 'adams-2001')
		);
		expect(restored.slice(1, 6)).toEqual(others.slice(0, 5));
	});

	it('keeps the data that was there aside', async () => {
		const into = temporaryFolder();
		writeFileSync(path.join(into, 'secret.key'), 'the old key');
		const { aside } = await restore(await make(), into);
		expect(readFileSync(path.join(aside!, 'secret.key'), 'utf8')).toBe('the old key');
		expect(readFileSync(path.join(into, 'secret.key'), 'utf8')).toBe('a key');
		expect(readdirSync(into).filter((name) => name.startsWith('.restore'))).toEqual([]);
	});
});

describe('an archive that is refused, with nothing touched', () => {
	const refusal = async (file: string, sentence: RegExp, knownSchema = known) => {
		const into = temporaryFolder();
		const attempt = restore(file, into, knownSchema);
		await expect(attempt).rejects.toBeInstanceOf(BackupRefused);
		await expect(attempt).rejects.toThrow(sentence);
		expect(readdirSync(into)).toEqual([]);
	};

	it('has a file that was changed, is missing, or was put in', async () => {
		await refusal(
			await tampered((folder) => writeFileSync(path.join(folder, 'uploads', 'abcdefgh12.png'), 'another')),
			/hash differs/
		);
		await refusal(
			await tampered((folder) => writeFileSync(path.join(folder, 'uploads', 'zzzzzzzz12.png'), 'more')),
			/manifest does not list/
		);
		await refusal(
			await tampered((folder) => writeFileSync(path.join(folder, 'manifest.json'), '{}')),
			/no manifest/
		);
		await refusal(
			await tampered((folder) => writeFileSync(path.join(folder, 'run.sh'), 'rm')),
			/no backup of Watersmeet does/
		);
	});

	it('comes from a newer version', async () => {
		await refusal(await make(), /newer version/, known.slice(0, -1));
	});

	it('is none', async () => {
		const file = path.join(backupDir, 'text.tar.gz');
		writeFileSync(file, 'no archive at all');
		await refusal(file, /no backup of Watersmeet|no manifest/);
		await refusal(path.join(backupDir, 'missing.tar.gz'), /no file/);
	});

	it('is for data that a server has open', async () => {
		const file = await make();
		const before = await hashOf(path.join(dataDir, 'secret.key'));
		await expect(restore(file, dataDir)).rejects.toThrow(/server is running/);
		expect(await hashOf(path.join(dataDir, 'secret.key'))).toBe(before);
	});
});

describe('the daily backup', () => {
	it('is made once a day, and the oldest go', async () => {
		Object.assign(environment, { DATA_DIR: dataDir, BACKUP_DIR: backupDir, BACKUP_KEEP: 2 });
		for (const day of ['01', '02', '03'])
			writeFileSync(path.join(backupDir, `watersmeet-2020-01-${day}T00-00-00Z.tar.gz`), 'old');
		writeFileSync(path.join(backupDir, 'notes.txt'), 'mine');
		const file = await backUpIfDue();
		expect(existsSync(file!)).toBe(true);
		expect(await listBackups(backupDir)).toEqual([
			path.basename(file!),
			'watersmeet-2020-01-03T00-00-00Z.tar.gz'
		]);
		expect(await backUpIfDue()).toBeNull();
		expect(await pruneBackups(backupDir, 0)).toHaveLength(1);
		expect(readdirSync(backupDir)).toContain('notes.txt');
	});
});
