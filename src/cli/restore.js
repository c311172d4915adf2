/** `npm run restore -- FILE`: verifies a backup and puts it in the place of the data, which is kept aside. The server must be stopped. */
import { readdirSync } from 'node:fs';
import path from 'node:path';
import process from 'node:process';
import { fileURLToPath } from 'node:url';
import { BackupRefused } from '../lib/server/backup/archive.js';
import { restoreBackup } from '../lib/server/backup/restore.js';
import { readEnvironment } from '../lib/server/config/environment.js';

const root = path.resolve(fileURLToPath(import.meta.url), '../../..');
const result = readEnvironment(process.env, root);
const file = process.argv[2];
try {
	if ('mistakes' in result) throw new BackupRefused(result.mistakes.join(' '));
	if (!file) throw new BackupRefused('Name the backup: npm run restore -- FILE');
	const folder = path.join(root, 'src/lib/server/db/migrations');
	const knownSchema = readdirSync(folder).map((name) => name.replace(/\.ts$/, ''));
	const restored = await restoreBackup({
		file: path.resolve(file),
		dataDir: result.environment.DATA_DIR,
		knownSchema
	});
	process.stdout.write(
		`Restored the backup of ${restored.made}: ${restored.files} files, all as they were.\n`
	);
	if (restored.aside) process.stdout.write(`The data that was there is kept in ${restored.aside}\n`);
} catch (error) {
	if (!(error instanceof BackupRefused)) throw error;
	process.stderr.write(`${error.message}\n`);
	process.exitCode = 1;
}
