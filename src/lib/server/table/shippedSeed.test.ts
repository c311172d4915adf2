import { readFileSync } from 'node:fs';
import path from 'node:path';
import { parse } from 'csv-parse/sync';
import { QueryTypes, type DatabaseError, type Model, type ModelStatic, type Sequelize } from 'sequelize';
import { beforeAll, describe, expect, it } from 'vitest';
import { temporaryDatabase } from '../../../../tests/support/database';
import { Entry, Figure, Revision, Source, TableRevision, UnplacedRow } from '../db/models/literature';
import { Characteristic, Diagnostic, Measurement, Standard } from '../db/models/supplements';
import { readLiteratureFiles } from './literatureFiles';
import { rootShapeOf } from './rootShape';
import { seedLiterature, type SeedReport } from './seed';

const FOLDER = path.resolve(import.meta.dirname, '../../../../data/literature');

let db: Sequelize;
let report: SeedReport;
beforeAll(async () => {
	db = await temporaryDatabase();
	report = await seedLiterature(db, await readLiteratureFiles(FOLDER));
});

describe('the shipped files', () => {
	it.each<[string, ModelStatic<Model>]>([
		['observations.csv', Figure],
		['measurements.csv', Measurement],
		['diagnostics.csv', Diagnostic],
		['finding-characteristics.csv', Characteristic],
		['standards.csv', Standard]
	])('lose no row of %s: each is placed or listed', async (file, model) => {
		const rows: unknown[] = parse(readFileSync(path.join(FOLDER, file)), { columns: true });
		const placed = await model.count();
		expect(placed).toBeGreaterThan(0);
		expect(placed + (await UnplacedRow.count({ where: { file } }))).toBe(rows.length);
	});

	it('lose no source', async () => {
		const sources = JSON.parse(readFileSync(path.join(FOLDER, 'sources.json'), 'utf8')) as { id: string }[];
		expect((await Source.findAll()).map(({ id }) => id).sort()).toEqual(sources.map(({ id }) => id).sort());
	});

	it('leave over the 18 observations without a locator, and nothing else', async () => {
		const rows: { locator: string }[] = parse(readFileSync(path.join(FOLDER, 'observations.csv')), {
			columns: true
		});
		expect(rows.filter(({ locator }) => locator.trim() === '')).toHaveLength(18);
		const unplaced = await UnplacedRow.findAll();
		expect(unplaced).toHaveLength(18);
		expect(report.unplaced).toBe(18);
		for (const { file, reason, summary } of unplaced) {
			expect(file).toBe('observations.csv');
			expect(reason).toContain('no locator');
			expect(summary).toContain('tooth: ');
		}
	});

	it('change nothing the second time', async () => {
		const counts = () => Promise.all([Source.count(), Entry.count(), Figure.count(), Revision.count()]);
		const before = await counts();
		const again = await seedLiterature(db, await readLiteratureFiles(FOLDER));
		expect(again).toEqual({
			...{ changed: false, revision: 1, sources: report.sources, unplaced: 18 },
			...{ entriesAdded: 0, entriesChanged: 0, entriesWithdrawn: 0 }
		});
		expect(await counts()).toEqual(before);
		expect(await TableRevision.count()).toBe(1);
	});

	it('keep every percentage within a point of its count, but where the source itself is at odds', async () => {
		// Both come from the same place in the source: a slip of a column in the file would part them.
		const apart = await db.query<{ source: string; note: string }>(
			`SELECT entry.source_id AS source, figure.note FROM figure
				JOIN entry ON entry.id = figure.entry_id JOIN sample ON sample.id = entry.sample_id
				WHERE ABS(100.0 * figure.count / sample.total - figure.percent) > 1`,
			{ type: QueryTypes.SELECT }
		);
		expect(apart.map(({ source }) => source)).toEqual(['anon-jordan-2024']);
		expect(apart[0].note).toContain('2538 of 3342 is 75.9 %, not 80 %');
	});
});

describe('the shape of a root of the shipped table', () => {
	// Weine et al. 1969 (id weine-1969): in 78 of 208 mesiobuccal roots two canals joined 1 to 4 mm from the apex.
	it('has the confluence of MB of the upper first molar at 1 to 4 mm, as Weine 1969 gives it', async () => {
		const { confluence } = await rootShapeOf('maxillary-first-molar', 'MB');
		expect(confluence).toEqual({
			...{ mm: 2.5, range: [1, 4], source: 'weine-1969', locator: 'summary, results', verified: true }
		});
	});

	it('has no confluence where none is published for the root', async () => {
		expect((await rootShapeOf('maxillary-first-molar', 'DB')).confluence).toBeNull();
	});
});

describe('the database', () => {
	/** What SQLite says to a statement; Sequelize wraps it in words of its own. */
	const refusal = (sql: string) =>
		db.query(sql).then(
			() => 'accepted',
			(error: DatabaseError) => error.parent.message
		);
	const insertEntry = (columns: string) =>
		`INSERT INTO entry (sample_id, source_id, locator, measure, state, provenance)
			SELECT ${columns}, 'feature', 'published', 'read' FROM sample ORDER BY id LIMIT 1`;

	it('takes an entry with a source and a locator', async () => {
		const before = await Entry.count();
		await db.query(insertEntry("id, source_id, 'p. 4'"));
		expect(await Entry.count()).toBe(before + 1);
	});

	it.each([
		['without a source', "id, NULL, 'p. 4'", /NOT NULL.*source_id/],
		['without a locator', 'id, source_id, NULL', /NOT NULL.*locator/],
		['with a blank locator', "id, source_id, '  '", /CHECK.*locator/],
		['with another source than its sample has', "id, 'kim-2013', 'p. 4'", /FOREIGN KEY/],
		['with a source that does not exist', "id, 'nobody-1999', 'p. 4'", /FOREIGN KEY/]
	])('refuses an entry %s', async (_, columns, message) => {
		expect(await Source.findByPk('kim-2013')).not.toBeNull();
		expect(await refusal(insertEntry(columns))).toMatch(message);
	});

	it.each([
		['state', 'lost'],
		['provenance', 'hearsay']
	])('refuses an entry of unknown %s', async (column, value) => {
		expect(await refusal(`UPDATE entry SET ${column} = '${value}' WHERE id = 1`)).toMatch(/CHECK/);
	});

	it('refuses to part an entry from its source, and to delete a source or sample that has entries', async () => {
		expect(await refusal("UPDATE entry SET source_id = 'kim-2013' WHERE source_id = 'weine-1969'")).toMatch(
			/FOREIGN KEY/
		);
		expect(await refusal("DELETE FROM source WHERE id = 'weine-1969'")).toMatch(/FOREIGN KEY/);
		expect(await refusal("DELETE FROM sample WHERE source_id = 'weine-1969'")).toMatch(/FOREIGN KEY/);
	});

	it('refuses to change or delete a revision', async () => {
		expect(await refusal("UPDATE revision SET why = 'other' WHERE id = 1")).toMatch(/append-only/);
		expect(await refusal('DELETE FROM revision WHERE id = 1')).toMatch(/append-only/);
	});
});
