import { UnplacedRow } from '../db/models/literature';

/** Rows of the shipped files that the seed could not place, in the order of file and line. */
export async function listUnplaced() {
	const rows = await UnplacedRow.findAll({ order: ['file', 'line'] });
	return rows.map(({ file, line, sourceId, summary, reason }) => ({ file, line, sourceId, summary, reason }));
}
