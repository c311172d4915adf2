import { QueryTypes, type Sequelize } from 'sequelize';
import { stringify } from 'csv-stringify/sync';
import writeXlsxFile from 'write-excel-file/node';
import { OBSERVATION_COLUMNS, type EntryFilters, type Observation } from '$lib/schemas/table';
import { TableRevision } from '../db/models/literature';
import { entryConditions } from './entryConditions';
import { harmlessCell } from './harmlessCells';
import { tableRevision } from './snapshot';

/** Entries read at a time: what is held in memory however large the table is. */
const CHUNK_ENTRIES = 500;

/** Said wherever the table leaves the product. */
export const LICENCE_NOTE =
	'Figures and bibliographic facts as the sources named in each row published them: cite those sources. ' +
	'No licence for the compilation itself has been settled yet.';

/** Keys of a row in JSON, in this order whatever made it. */
const COLUMNS = [...OBSERVATION_COLUMNS];

type Row = Omit<Observation, 'count_derived'> & { count_derived: number; entry: number };

/** The newest revision and when it was published. */
export async function publishedRevision(): Promise<{ revision: number; date: string }> {
	const latest = await TableRevision.findOne({ order: [['id', 'DESC']] });
	return { revision: latest?.id ?? 0, date: latest?.at ?? new Date(0).toISOString() };
}

/**
 * The rows of the table, as they would stand in observations.csv, some hundreds at a time in the order of entry and position.
 * @throws when another revision is published meanwhile: the rows would belong to two tables
 */
async function* observations(
	db: Sequelize,
	filters: EntryFilters,
	revision: number
): AsyncGenerator<Observation[]> {
	const { where, bind } = entryConditions(filters);
	for (let after = 0; ;) {
		const entries = await db.query<{ id: number }>(
			`SELECT entry_row.entry_id AS id FROM entry_row WHERE ${where.join(' AND ')} AND entry_row.entry_id > $after
				ORDER BY entry_row.entry_id LIMIT ${CHUNK_ENTRIES}`,
			{ type: QueryTypes.SELECT, bind: { ...bind, after } }
		);
		if (entries.length === 0) return;
		const rows = await db.query<Row>(
			`SELECT entry.id AS entry, entry.source_id, entry.locator, sample.tooth, sample.root, sample.scope, sample.country, sample.method,
				sample.subgroup, entry.measure, figure.category, figure.count, sample.total, figure.percent, figure.count_derived,
				entry.provenance, figure.note
			FROM figure JOIN entry ON entry.id = figure.entry_id JOIN sample ON sample.id = entry.sample_id
			WHERE entry.id IN (SELECT value FROM json_each($ids)) ORDER BY entry.id, figure.position`,
			{ type: QueryTypes.SELECT, bind: { ids: JSON.stringify(entries.map(({ id }) => id)) } }
		);
		if ((await tableRevision()) !== revision) throw new Error('The table was published anew meanwhile.');
		yield rows.map(({ entry: _, count_derived, ...row }) => ({
			...row,
			count_derived: count_derived === 1 ? 'yes' : 'no'
		}));
		after = entries[entries.length - 1].id;
	}
}

/** The table as CSV text in pieces: the columns of observations.csv, cells made harmless for spreadsheets. */
export const tableCsv = (db: Sequelize, filters: EntryFilters, revision: number) =>
	csvPieces(observations(db, filters, revision));

/** The table as JSON text in pieces, with its revision, date and licence note in front. */
export const tableJson = (
	db: Sequelize,
	filters: EntryFilters,
	published: { revision: number; date: string }
) => jsonPieces(observations(db, filters, published.revision), { ...published, filters });

/** Rows as CSV text in pieces. */
export async function* csvPieces(chunks: AsyncGenerator<Observation[]>) {
	yield stringify([[...OBSERVATION_COLUMNS]]);
	for await (const rows of chunks) {
		yield stringify(
			rows.map((row) => OBSERVATION_COLUMNS.map((column) => harmlessCell(String(row[column] ?? '')))),
			{ quoted_match: /[\r\n]/ }
		);
	}
}

/** Rows as JSON text in pieces. */
export async function* jsonPieces(
	chunks: AsyncGenerator<Observation[]>,
	{ revision, date, filters }: { revision: number; date: string; filters: EntryFilters }
) {
	const head = JSON.stringify({ revision, date, licence: LICENCE_NOTE, filters });
	yield `${head.slice(0, -1)},"rows":[`;
	let between = '\n';
	for await (const rows of chunks) {
		yield rows.map((row, index) => (index === 0 ? between : ',\n') + JSON.stringify(row, COLUMNS)).join('');
		between = ',\n';
	}
	yield '\n]}\n';
}

/** The table as the bytes of an .xlsx file: numbers as numbers, texts as texts, made harmless as in the CSV. */
export async function tableSpreadsheet(
	db: Sequelize,
	filters: EntryFilters,
	revision: number
): Promise<Buffer> {
	const sheet: (string | number | null)[][] = [[...OBSERVATION_COLUMNS]];
	for await (const rows of observations(db, filters, revision)) {
		for (const row of rows)
			sheet.push(
				OBSERVATION_COLUMNS.map((column) => {
					const value = row[column];
					return typeof value === 'string' ? harmlessCell(value) || null : value;
				})
			);
	}
	return writeXlsxFile(sheet, { sheet: `Revision ${revision}`, stickyRowsCount: 1 }).toBuffer();
}
