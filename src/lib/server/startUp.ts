import { backUpDaily } from './backup/daily';
import { environment } from './config';
import { closeDatabase, database } from './db';
import { estimator, stopEstimator } from './inference/estimator';
import { recoverImports, stopImports } from './intake/imports';
import { stopReader } from './intake/reader';
import { log } from './log';
import { startMailer, stopMailer } from './mail/mailer';
import { keepHouse } from './people/housekeeping';
import { makeSetUpLink } from './people/links';
import { readLiteratureFiles } from './table/literatureFiles';
import { finishEffects } from './table/publishing';
import { seedLiterature } from './table/seed';

// Hot reload runs init again; the process must not collect listeners.
const held = globalThis as typeof globalThis & { watersmeetStops?: boolean };

/** Migrates, seeds, and only then lets the server listen; closes everything when the server has answered its last request. */
export async function startUp(): Promise<void> {
	const db = await database(environment.DATA_DIR);
	const report = await seedLiterature(db, await readLiteratureFiles(environment.LITERATURE_DIR));
	log.info(report, report.changed ? 'literature seeded' : 'literature unchanged');
	if (report.unplaced > 0)
		log.warn({ rows: report.unplaced }, 'rows of the literature could not be placed: see /table/not-placed');
	await recoverImports(db);
	if (held.watersmeetStops) return;
	held.watersmeetStops = true;
	process.once('sveltekit:shutdown' as 'exit', () => void shutDown());
	keepHouse();
	backUpDaily();
	await startMailer();
	await offerSetUp();
	// Nobody waits for this: it starts the worker, so that the first visitor does not pay for it, and has the table's coverage ready.
	finishEffects()
		.then(estimator)
		.then((current) => current.tableCoverage())
		.catch((error: unknown) =>
			log.error({ err: error }, 'the coverage of the table could not be worked out')
		);
}

/** Prints the link for the first administrator; on the output and not in the log, which must hold no secret. */
async function offerSetUp(): Promise<void> {
	const link = await makeSetUpLink();
	if (link)
		process.stdout.write(
			`Nobody administrates this installation yet. Set it up, once, within a day:\n  ${link}\n`
		);
}

async function shutDown(): Promise<void> {
	await stopImports();
	await stopReader();
	await stopMailer();
	await stopEstimator();
	await closeDatabase();
	log.info('stopped');
}
