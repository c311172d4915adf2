import { environment } from '../config';
import { log } from '../log';
import { listBackups, makeBackup, pruneBackups } from './archive.js';

const DAY_MS = 86_400_000;
/** Looked at this often: a server that is started anew each evening still makes its backup. */
const EVERY_MS = 3_600_000;

/** When a backup was made, from its name; 0 for none. */
const madeAt = (name: string | undefined): number =>
	name ? Date.parse(name.replace(/^watersmeet-(.+T\d\d)-(\d\d)-(\d\d)Z\.tar\.gz$/, '$1:$2:$3Z')) : 0;

/**
 * Makes a backup if the newest is a day old, and removes those beyond BACKUP_KEEP.
 * @internal for its test
 */
export async function backUpIfDue(now = Date.now()): Promise<string | null> {
	const { DATA_DIR, BACKUP_DIR, BACKUP_KEEP } = environment;
	const [newest] = await listBackups(BACKUP_DIR);
	if (BACKUP_KEEP === 0 || now - madeAt(newest) < DAY_MS) return null;
	const file = await makeBackup({ dataDir: DATA_DIR, backupDir: BACKUP_DIR });
	await pruneBackups(BACKUP_DIR, BACKUP_KEEP);
	return file;
}

/** Backs up once a day for as long as the server runs; the first time an hour after its start. */
export function backUpDaily(): void {
	const look = () =>
		backUpIfDue().then(
			(file) => file && log.info({ file }, 'backup made'),
			(error: unknown) => log.error({ err: error }, 'the daily backup failed')
		);
	setInterval(() => void look(), EVERY_MS).unref();
}
