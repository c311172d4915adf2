/** The table as it stood at any of its revisions, put together from the revisions of its entries. */
import { QueryTypes, type Sequelize } from 'sequelize';
import type { Observation } from '$lib/schemas/table';
import { TableRevision } from '../db/models/literature';
import type { Recorded } from './entryState';
import { csvPieces, jsonPieces } from './wholeTable';

/** Entries read at a time: what is held in memory however large the table is. */
const CHUNK_ENTRIES = 500;

/** A revision of the table; null for a number it never had. */
export async function findTableRevision(
	number: number
): Promise<{ revision: number; date: string; last: number } | null> {
	const found = await TableRevision.findByPk(number);
	return found && { revision: found.id, date: found.at, last: found.lastRevision ?? 0 };
}

/** Rows of the table at the time of its entries' revision `last`, as they would stand in observations.csv. */
async function* observationsThen(db: Sequelize, last: number): AsyncGenerator<Observation[]> {
	for (let after = 0; ;) {
		const entries = await db.query<{ entry: number; content: string }>(
			`SELECT entry_id AS entry, after AS content FROM revision WHERE id IN (
				SELECT MAX(id) FROM revision WHERE id <= $last AND entry_id > $after
					AND json_extract(after, '$.state') IN ('published', 'withdrawn')
					GROUP BY entry_id ORDER BY entry_id LIMIT ${CHUNK_ENTRIES}
			) ORDER BY entry_id`,
			{ type: QueryTypes.SELECT, bind: { last, after } }
		);
		if (entries.length === 0) return;
		const rows = entries
			.map(({ content }) => JSON.parse(content) as Recorded)
			.filter(({ state }) => state === 'published')
			.flatMap(toObservations);
		if (rows.length > 0) yield rows;
		after = entries[entries.length - 1].entry;
	}
}

function toObservations(entry: Recorded): Observation[] {
	const { source, locator, tooth, root, scope, country, method, subgroup, measure, total, provenance } =
		entry;
	return entry.figures.map(({ category, count, percent, countDerived, note }) => ({
		...{
			source_id: source,
			locator,
			tooth,
			root,
			scope,
			country,
			method,
			subgroup,
			measure,
			category,
			count
		},
		...{ total, percent, count_derived: countDerived ? 'yes' : 'no', provenance, note }
	}));
}

interface Then {
	revision: number;
	date: string;
	last: number;
}

/** The table of a revision as CSV text in pieces. */
export const pastCsv = (db: Sequelize, { last }: Then) => csvPieces(observationsThen(db, last));

/** The table of a revision as JSON text in pieces. */
export const pastJson = (db: Sequelize, { revision, date, last }: Then) =>
	jsonPieces(observationsThen(db, last), { revision, date, filters: {} });
