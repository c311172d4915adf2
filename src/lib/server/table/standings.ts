import { QueryTypes } from 'sequelize';
import { serverDatabase } from '../db/server';

/** How the table knows an entry: seen in its source, quoted by another, or recalled and not yet confirmed. */
export type EntryStanding = 'read' | 'secondary' | 'unverified';

/** The standings of entries by their ids; ids that are not in the table are left out. */
export async function standingsOf(ids: readonly number[]): Promise<Record<number, EntryStanding>> {
	if (ids.length === 0) return {};
	const db = await serverDatabase();
	const rows = await db.query<{ id: number; provenance: string; confirmed: number }>(
		'SELECT id, provenance, confirmed FROM entry WHERE id IN (SELECT value FROM json_each($ids))',
		{ type: QueryTypes.SELECT, bind: { ids: JSON.stringify(ids) } }
	);
	return Object.fromEntries(
		rows.map(({ id, provenance, confirmed }) => [id, standingOf(provenance, confirmed === 1)])
	);
}

function standingOf(provenance: string, confirmed: boolean): EntryStanding {
	if (provenance === 'secondary') return 'secondary';
	return provenance === 'memory' && !confirmed ? 'unverified' : 'read';
}
