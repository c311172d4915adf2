/**
 * Backups: one dated archive with the database as it was at one moment, the uploads, the installation's key and a manifest of hashes.
 * Plain JavaScript, because `npm run backup` and `npm run restore` use it before anything is built; the server uses it every day.
 */
import { createHash, randomBytes } from 'node:crypto';
import { createReadStream, existsSync } from 'node:fs';
import fs from 'node:fs/promises';
import path from 'node:path';
import sqlite3 from 'sqlite3';
import * as tar from 'tar';

export const DATABASE_FILE = 'watersmeet.sqlite';
export const UPLOADS_FOLDER = 'uploads';
export const KEY_FILE = 'secret.key';
export const MANIFEST_FILE = 'manifest.json';
/** Of the manifest; a later one would be refused by this version. */
export const FORMAT = 1;
const ARCHIVE_NAME = /^watersmeet-\d{4}-\d\d-\d\dT\d\d-\d\d-\d\dZ\.tar\.gz$/;
const BUSY_TIMEOUT_MS = 3_000;

/** @typedef {{ path: string, bytes: number, sha256: string }} BackedUpFile */
/** @typedef {{ format: number, made: string, schema: string[], files: BackedUpFile[] }} Manifest */

/** Something a person has to do something about, in a sentence. */
export class BackupRefused extends Error {}

/**
 * Runs one statement on a database file over a connection of its own.
 * @param {string} file
 * @param {string} sql
 * @param {{ bind?: unknown[], readOnly?: boolean }} [options]
 * @returns {Promise<Record<string, unknown>[]>}
 */
export function runSql(file, sql, { bind = [], readOnly = true } = {}) {
	return new Promise((resolve, reject) => {
		const mode = readOnly ? sqlite3.OPEN_READONLY : sqlite3.OPEN_READWRITE;
		const db = new sqlite3.Database(file, mode, (openError) => {
			if (openError) return reject(openError);
			db.configure('busyTimeout', BUSY_TIMEOUT_MS);
			db.all(sql, bind, (error, rows) => {
				db.close(() => (error ? reject(error) : resolve(/** @type {Record<string, unknown>[]} */ (rows))));
			});
		});
	});
}

/**
 * @param {string} file
 * @returns {Promise<string>} SHA-256 in hex
 * @internal for its test
 */
export async function hashOf(file) {
	const hash = createHash('sha256');
	/** @type {AsyncIterable<Buffer>} */
	const chunks = createReadStream(file);
	for await (const chunk of chunks) hash.update(chunk);
	return hash.digest('hex');
}

/**
 * Names of the migrations a database has had: its schema's version.
 * @param {string} file
 */
export async function schemaOf(file) {
	const rows = await runSql(file, 'SELECT name FROM migration ORDER BY name');
	return rows.map(({ name }) => String(name));
}

/**
 * Puts every upload that is not there yet into `to`. Uploads never change, so a second name for the same file is as good as a copy.
 * @param {string} from
 * @param {string} to
 */
async function gatherUploads(from, to) {
	await fs.mkdir(to, { recursive: true });
	const names = await fs.readdir(from).catch(() => /** @type {string[]} */ ([]));
	for (const name of names) {
		if (name.endsWith('.partial') || existsSync(path.join(to, name))) continue;
		const [source, target] = [path.join(from, name), path.join(to, name)];
		try {
			await fs.link(source, target);
		} catch (error) {
			const { code } = /** @type {NodeJS.ErrnoException} */ (error);
			// Removed meanwhile; or the folder of backups is on another disk.
			if (code === 'ENOENT') continue;
			await fs.copyFile(source, target);
		}
	}
}

/**
 * Makes a backup while the server goes on serving.
 * @param {{ dataDir: string, backupDir: string }} folders
 * @returns {Promise<string>} the archive's path
 * @throws BackupRefused where there is nothing to back up
 */
export async function makeBackup({ dataDir, backupDir }) {
	const database = path.join(dataDir, DATABASE_FILE);
	if (!existsSync(database)) throw new BackupRefused(`There is no database in ${dataDir}.`);
	await fs.mkdir(backupDir, { recursive: true });
	const work = path.join(backupDir, `.partial-${randomBytes(6).toString('hex')}`);
	await fs.mkdir(work, { mode: 0o700 });
	try {
		const uploads = path.join(dataDir, UPLOADS_FOLDER);
		// Before and after: a file whose row is in the copy is there, whether it came or went meanwhile.
		await gatherUploads(uploads, path.join(work, UPLOADS_FOLDER));
		await runSql(database, 'VACUUM INTO ?', { bind: [path.join(work, DATABASE_FILE)], readOnly: false });
		await gatherUploads(uploads, path.join(work, UPLOADS_FOLDER));
		const key = path.join(dataDir, KEY_FILE);
		if (existsSync(key)) await fs.copyFile(key, path.join(work, KEY_FILE));
		const made = new Date().toISOString();
		const files = await describe(work);
		/** @type {Manifest} */
		const manifest = { format: FORMAT, made, schema: await schemaOf(path.join(work, DATABASE_FILE)), files };
		await fs.writeFile(path.join(work, MANIFEST_FILE), JSON.stringify(manifest, null, '\t'));
		const name = `watersmeet-${made.slice(0, 19).replaceAll(':', '-')}Z.tar.gz`;
		const partial = path.join(backupDir, `.${name}.partial`);
		await tar.create({ gzip: true, portable: true, cwd: work, file: partial, mode: 0o600 }, [
			MANIFEST_FILE,
			...files.map((file) => file.path)
		]);
		await fs.chmod(partial, 0o600);
		await fs.rename(partial, path.join(backupDir, name));
		return path.join(backupDir, name);
	} finally {
		await fs.rm(work, { recursive: true, force: true });
	}
}

/**
 * Every file below a folder but the manifest, with its hash.
 * @param {string} folder
 * @returns {Promise<BackedUpFile[]>}
 */
export async function describe(folder) {
	const entries = await fs.readdir(folder, { recursive: true, withFileTypes: true });
	const files = [];
	for (const entry of entries) {
		const full = path.join(entry.parentPath, entry.name);
		const relative = path.relative(folder, full).split(path.sep).join('/');
		if (!entry.isFile() || relative === MANIFEST_FILE) continue;
		files.push({ path: relative, bytes: (await fs.stat(full)).size, sha256: await hashOf(full) });
	}
	return files.sort((a, b) => (a.path < b.path ? -1 : 1));
}

/**
 * The backups of a folder, the newest first.
 * @param {string} backupDir
 */
export async function listBackups(backupDir) {
	const names = await fs.readdir(backupDir).catch(() => /** @type {string[]} */ ([]));
	return names
		.filter((name) => ARCHIVE_NAME.test(name))
		.sort()
		.reverse();
}

/**
 * Removes all but the newest backups. Other files of the folder are left alone.
 * @param {string} backupDir
 * @param {number} keep how many stay, at least one
 * @returns {Promise<string[]>} names of those removed
 */
export async function pruneBackups(backupDir, keep) {
	const old = (await listBackups(backupDir)).slice(Math.max(1, keep));
	for (const name of old) await fs.rm(path.join(backupDir, name), { force: true });
	return old;
}
