import { Problem } from './api/problem';
import { tableRevision } from './table/snapshot';

/**
 * The server's state. It listens only after migration and seed, so an answer means ready, unless the database has gone since.
 * @throws Problem 503 when the database does not answer
 */
export async function health() {
	try {
		return { status: 'ok' as const, tableRevision: await tableRevision() };
	} catch {
		throw new Problem(503, 'The database does not answer.');
	}
}
