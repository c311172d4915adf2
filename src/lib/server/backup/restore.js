/** Restoring a backup: everything is verified before anything is touched, and what was there is kept aside. Plain JavaScript, see archive.js. */
import { randomBytes } from 'node:crypto';
import { existsSync } from 'node:fs';
import fs from 'node:fs/promises';
import path from 'node:path';
import * as tar from 'tar';
import {
	BackupRefused,
	DATABASE_FILE,
	describe,
	FORMAT,
	KEY_FILE,
	MANIFEST_FILE,
	runSql,
	schemaOf,
	UPLOADS_FOLDER
} from './archive.js';

/** @typedef {import('./archive.js').Manifest} Manifest */

/** What an archive of ours may hold, and nothing else is unpacked. */
const EXPECTED =
	/^(manifest\.json|watersmeet\.sqlite|secret\.key|uploads\/?|uploads\/[\w-]{1,64}(\.[a-z]{2,5})?)$/;
const PARTS = [DATABASE_FILE, `${DATABASE_FILE}-wal`, `${DATABASE_FILE}-shm`, UPLOADS_FOLDER, KEY_FILE];

/**
 * Restores an archive into a data folder.
 * @param {{ file: string, dataDir: string, knownSchema: readonly string[] }} request `knownSchema` names the migrations this version has
 * @returns {Promise<{ made: string, files: number, aside: string | null }>} `aside` is where the old data is kept, if there was any
 * @throws BackupRefused with a sentence; the data folder is then as it was
 */
export async function restoreBackup({ file, dataDir, knownSchema }) {
	if (!existsSync(file)) throw new BackupRefused(`There is no file ${file}.`);
	await fs.mkdir(dataDir, { recursive: true });
	const work = path.join(dataDir, `.restore-${randomBytes(6).toString('hex')}`);
	await fs.mkdir(work, { mode: 0o700 });
	try {
		await unpack(file, work);
		const manifest = await verify(work, knownSchema);
		await refuseIfServing(dataDir);
		const aside = await keepAside(dataDir);
		for (const name of PARTS)
			if (existsSync(path.join(work, name))) await fs.rename(path.join(work, name), path.join(dataDir, name));
		return { made: manifest.made, files: manifest.files.length, aside };
	} finally {
		await fs.rm(work, { recursive: true, force: true });
	}
}

/**
 * @param {string} file
 * @param {string} work
 */
async function unpack(file, work) {
	/** @type {string[]} */
	const strange = [];
	try {
		await tar.extract({
			file,
			cwd: work,
			strict: true,
			filter: (name, entry) => {
				const plain = 'type' in entry && ['File', 'OldFile', 'Directory'].includes(entry.type);
				if (plain && EXPECTED.test(name)) return true;
				strange.push(name);
				return false;
			}
		});
	} catch {
		throw new BackupRefused(
			'The file is no backup of Watersmeet, or it is damaged: it could not be unpacked.'
		);
	}
	if (strange.length > 0)
		throw new BackupRefused(
			`The archive holds what no backup of Watersmeet does (${strange[0]}). Nothing was restored.`
		);
}

/**
 * @param {string} work
 * @param {readonly string[]} knownSchema
 * @returns {Promise<Manifest>}
 */
async function verify(work, knownSchema) {
	const manifest = await readManifest(work);
	const found = await describe(work);
	const hashes = new Map(found.map((one) => [one.path, one.sha256]));
	for (const { path: name, sha256 } of manifest.files) {
		if (!hashes.has(name))
			throw new BackupRefused(`The archive lacks ${name}, which its manifest lists. Nothing was restored.`);
		if (hashes.get(name) !== sha256)
			throw new BackupRefused(
				`${name} is not what it was when the backup was made: its hash differs. Nothing was restored.`
			);
		hashes.delete(name);
	}
	if (hashes.size > 0)
		throw new BackupRefused(
			`The archive holds ${[...hashes.keys()][0]}, which its manifest does not list. Nothing was restored.`
		);
	const database = path.join(work, DATABASE_FILE);
	if (!existsSync(database)) throw new BackupRefused('The archive holds no database. Nothing was restored.');
	const [check] = await runSql(database, 'PRAGMA integrity_check').catch(() => [
		{ integrity_check: 'unreadable' }
	]);
	if (Object.values(check)[0] !== 'ok')
		throw new BackupRefused('The database in the archive is damaged. Nothing was restored.');
	const newer = (await schemaOf(database)).filter((name) => !knownSchema.includes(name));
	if (newer.length > 0)
		throw new BackupRefused(
			`The backup was made by a newer version of Watersmeet (${newer[newer.length - 1]}). Install that version, then restore. Nothing was restored.`
		);
	return manifest;
}

/**
 * @param {string} work
 * @returns {Promise<Manifest>}
 */
async function readManifest(work) {
	try {
		/** @type {unknown} */
		const value = JSON.parse(await fs.readFile(path.join(work, MANIFEST_FILE), 'utf8'));
		const manifest = /** @type {Manifest} */ (value);
		if (manifest.format === FORMAT && Array.isArray(manifest.files)) return manifest;
	} catch {
		// Missing or no JSON: said below.
	}
	throw new BackupRefused('The archive has no manifest that this version can read. Nothing was restored.');
}

/**
 * A server that has the database open keeps it from leaving its write-ahead log.
 * @param {string} dataDir
 */
async function refuseIfServing(dataDir) {
	const database = path.join(dataDir, DATABASE_FILE);
	if (!existsSync(database)) return;
	const sentence = 'The server is running on this data. Stop it, then restore. Nothing was restored.';
	try {
		const [answer] = await runSql(database, 'PRAGMA journal_mode = DELETE', { readOnly: false });
		if (Object.values(answer)[0] !== 'delete') throw new BackupRefused(sentence);
	} catch (error) {
		// A database too damaged to answer is no reason against restoring.
		if (error instanceof BackupRefused || /** @type {{ code?: string }} */ (error).code === 'SQLITE_BUSY')
			throw new BackupRefused(sentence);
	}
}

/**
 * @param {string} dataDir
 * @returns {Promise<string | null>}
 */
async function keepAside(dataDir) {
	const present = PARTS.filter((name) => existsSync(path.join(dataDir, name)));
	if (present.length === 0) return null;
	const aside = path.join(
		dataDir,
		`before-restore-${new Date().toISOString().slice(0, 19).replaceAll(':', '-')}Z`
	);
	await fs.mkdir(aside, { mode: 0o700 });
	for (const name of present) await fs.rename(path.join(dataDir, name), path.join(aside, name));
	return aside;
}
