/** `npm run backup`: makes a backup, while the server serves or not, and removes the oldest beyond BACKUP_KEEP. */
import path from 'node:path';
import process from 'node:process';
import { fileURLToPath } from 'node:url';
import { BackupRefused, makeBackup, pruneBackups } from '../lib/server/backup/archive.js';
import { readEnvironment } from '../lib/server/config/environment.js';

const result = readEnvironment(process.env, path.resolve(fileURLToPath(import.meta.url), '../../..'));
try {
	if ('mistakes' in result) throw new BackupRefused(result.mistakes.join(' '));
	const { DATA_DIR, BACKUP_DIR, BACKUP_KEEP } = result.environment;
	const file = await makeBackup({ dataDir: DATA_DIR, backupDir: BACKUP_DIR });
	// With 0 the server makes none by itself, and those made by hand are for whoever made them to remove.
	const removed = BACKUP_KEEP === 0 ? [] : await pruneBackups(BACKUP_DIR, BACKUP_KEEP);
	process.stdout.write(`${file}\n${removed.map((name) => `removed ${name}\n`).join('')}`);
} catch (error) {
	if (!(error instanceof BackupRefused)) throw error;
	process.stderr.write(`No backup was made. ${error.message}\n`);
	process.exitCode = 1;
}
