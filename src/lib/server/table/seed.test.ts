import type { Sequelize } from 'sequelize';
import { beforeAll, describe, expect, it } from 'vitest';
import { temporaryDatabase } from '../../../../tests/support/database';
import { cslSource, literature, measurement, observation } from '../../../../tests/support/madeUpLiterature';
import { Entry, Figure, Revision, Sample, Source, TableRevision, UnplacedRow } from '../db/models/literature';
import { Characteristic, Measurement } from '../db/models/supplements';
import type { LiteratureFiles } from './literatureFiles';
import { seedLiterature } from './seed';

/** Two entries of one source. */
const TWO_ENTRIES = [
	observation({ category: '1', count: '40' }),
	observation({ category: '2-1', count: '60' }),
	observation({ tooth: 'mandibular-first-molar', root: 'M', category: '2', count: '70' })
];
const original = literature({ observations: TWO_ENTRIES, measurements: [measurement()] });
const changed = literature({
	observations: TWO_ENTRIES.map((row) => (row.category === '2' ? { ...row, count: '71' } : row)),
	measurements: [measurement()]
});
const shortened = literature({ observations: TWO_ENTRIES.slice(0, 2), measurements: [measurement()] });

let db: Sequelize;
const seed = (files: LiteratureFiles) => seedLiterature(db, files);
const entryOf = (tooth: string) =>
	Sample.findOne({ where: { tooth } }).then((sample) =>
		Entry.findOne({ where: { sampleId: sample!.id }, rejectOnEmpty: true })
	);
const revisionsOf = (entryId: number) => Revision.findAll({ where: { entryId }, order: ['number'] });
const countsOf = async (entryId: number) =>
	(await Figure.findAll({ where: { entryId }, order: ['position'] })).map(({ count }) => count);

async function afresh(files: LiteratureFiles) {
	db = await temporaryDatabase();
	return seed(files);
}

describe('a first seeding', () => {
	beforeAll(() => afresh(original));

	it('publishes every entry with its figures, its place and one revision by the seed', async () => {
		const entries = await Entry.findAll({ order: ['id'] });
		expect(entries).toHaveLength(2);
		expect(entries.map(({ state, confirmed }) => [state, confirmed])).toEqual([
			['published', false],
			['published', false]
		]);
		expect(await countsOf(entries[0].id)).toEqual([40, 60]);
		const [first, ...more] = await revisionsOf(entries[0].id);
		expect(more).toEqual([]);
		expect(first).toMatchObject({ number: 1, who: 'seed', before: null });
		expect(JSON.parse(first.after!)).toMatchObject({
			state: 'published',
			locator: 'table 1',
			figures: [{ count: 40 }, { count: 60 }]
		});
		expect(await Measurement.count()).toBe(1);
		expect(await TableRevision.count()).toBe(1);
	});

	it('is not repeated for the same files', async () => {
		const counts = () =>
			Promise.all([Source.count(), Sample.count(), Entry.count(), Figure.count(), Revision.count()]);
		const before = await counts();
		expect(await seed(original)).toMatchObject({ changed: false, revision: 1, sources: 1, unplaced: 0 });
		expect(await counts()).toEqual(before);
		expect(await TableRevision.count()).toBe(1);
	});
});

describe('a seeding cut short', () => {
	it('is completed by the next one, without anything twice', async () => {
		await afresh(original);
		// As if the process had ended after the first chunk: one entry is there, and no table revision.
		const second = await entryOf('mandibular-first-molar');
		await db.query('DROP TRIGGER revision_no_delete');
		await Revision.destroy({ where: { entryId: second.id } });
		await second.destroy();
		await TableRevision.destroy({ where: {} });
		expect(await seed(original)).toMatchObject({ changed: true, entriesAdded: 1, entriesChanged: 0 });
		expect([await Entry.count(), await Figure.count(), await Sample.count()]).toEqual([2, 3, 2]);
	});
});

describe('a seeding of changed files cut short', () => {
	it('is undone when the files go back to those before', async () => {
		await afresh(original);
		await db.query(
			"CREATE TRIGGER full_disk BEFORE INSERT ON measurement BEGIN SELECT RAISE(ABORT, 'disk full'); END"
		);
		await expect(seed(changed)).rejects.toMatchObject({
			parent: { message: 'SQLITE_CONSTRAINT: disk full' }
		});
		const entry = await entryOf('mandibular-first-molar');
		expect(await countsOf(entry.id)).toEqual([71]);
		await db.query('DROP TRIGGER full_disk');
		expect(await seed(original)).toMatchObject({ changed: true, entriesChanged: 1 });
		expect(await countsOf(entry.id)).toEqual([70]);
		expect(await Measurement.count()).toBe(1);
	});
});

describe('a changed figure', () => {
	it('touches its own entry alone and keeps what it was before in a revision', async () => {
		await afresh(original);
		const other = await entryOf('maxillary-first-molar');
		const entry = await entryOf('mandibular-first-molar');
		expect(await seed(changed)).toMatchObject({
			changed: true,
			revision: 2,
			entriesAdded: 0,
			entriesChanged: 1,
			entriesWithdrawn: 0
		});
		expect(await countsOf(entry.id)).toEqual([71]);
		const revisions = await revisionsOf(entry.id);
		expect(revisions.map(({ number }) => number)).toEqual([1, 2]);
		expect(revisions[1].before).toBe(revisions[0].after);
		expect(JSON.parse(revisions[1].before!)).toMatchObject({ figures: [{ count: 70 }] });
		expect(JSON.parse(revisions[1].after!)).toMatchObject({ figures: [{ count: 71 }] });
		expect(await revisionsOf(other.id)).toHaveLength(1);
	});

	it('is seeded back when the files go back', async () => {
		await afresh(original);
		await seed(changed);
		expect(await seed(original)).toMatchObject({ changed: true, revision: 3, entriesChanged: 1 });
		const entry = await entryOf('mandibular-first-molar');
		expect(await countsOf(entry.id)).toEqual([70]);
		expect(await revisionsOf(entry.id)).toHaveLength(3);
		expect(await seed(original)).toMatchObject({ changed: false });
	});
});

describe('a row that is gone from the files', () => {
	it('withdraws its entry and deletes nothing', async () => {
		await afresh(original);
		expect(await seed(shortened)).toMatchObject({ entriesWithdrawn: 1, entriesChanged: 0 });
		const entry = await entryOf('mandibular-first-molar');
		expect(entry.state).toBe('withdrawn');
		expect(await countsOf(entry.id)).toEqual([70]);
		const [first, second] = await revisionsOf(entry.id);
		expect(second).toMatchObject({ number: 2, who: 'seed', before: first.after });
		expect(JSON.parse(second.after!)).toMatchObject({ state: 'withdrawn', locator: 'table 1' });
		expect((await entryOf('maxillary-first-molar')).state).toBe('published');
	});

	it('publishes its entry again, unchanged, when it comes back', async () => {
		await afresh(original);
		await seed(shortened);
		expect(await seed(original)).toMatchObject({ entriesAdded: 0, entriesChanged: 1 });
		const entry = await entryOf('mandibular-first-molar');
		expect(entry.state).toBe('published');
		expect(await countsOf(entry.id)).toEqual([70]);
		const revisions = await revisionsOf(entry.id);
		expect(revisions).toHaveLength(3);
		expect(JSON.parse(revisions[2].before!)).toMatchObject({ state: 'withdrawn' });
		expect(await Entry.count()).toBe(2);
	});
});

describe('an entry that a person has revised', () => {
	const revise = async (entry: Entry) => {
		await Figure.update({ count: 65 }, { where: { entryId: entry.id } });
		await Revision.create({
			entryId: entry.id,
			number: 2,
			at: new Date(0).toISOString(),
			who: 'editor',
			before: null,
			after: '{}',
			why: 'The table was misread.'
		});
	};

	it('is left alone when its figure changes in the files', async () => {
		await afresh(original);
		const entry = await entryOf('mandibular-first-molar');
		await revise(entry);
		expect(await seed(changed)).toMatchObject({ changed: true, entriesChanged: 0 });
		expect(await countsOf(entry.id)).toEqual([65]);
		expect(await revisionsOf(entry.id)).toHaveLength(2);
	});

	it('is left alone when its row is gone', async () => {
		await afresh(original);
		const entry = await entryOf('mandibular-first-molar');
		await revise(entry);
		expect(await seed(shortened)).toMatchObject({ entriesWithdrawn: 0 });
		expect((await entry.reload()).state).toBe('published');
	});
});

describe('sources', () => {
	it('with hardly anything in them are kept, as not citable', async () => {
		await afresh(literature({ sources: [{ id: 'bare' }, cslSource('adams-2001')] }));
		const bare = await Source.findByPk('bare', { rejectOnEmpty: true });
		expect(bare).toMatchObject({
			...{ title: null, journal: null, year: null, doi: null },
			...{ type: 'article', citable: false, authorsKnown: false, retracted: false }
		});
		expect(await Source.findByPk('adams-2001')).toMatchObject({
			...{ title: 'Canals as adams-2001 saw them', journal: 'Journal of Roots', year: 2001 },
			...{ citable: true, authorsKnown: true }
		});
	});

	it('are completed by later files; a retraction noted meanwhile stays', async () => {
		await afresh(literature({ sources: [{ id: 'bare' }] }));
		await Source.update({ retracted: true }, { where: { id: 'bare' } });
		await seed(literature({ sources: [cslSource('bare', { DOI: '10.1000/bare' })] }));
		const source = await Source.findByPk('bare', { rejectOnEmpty: true });
		expect(source).toMatchObject({ doi: '10.1000/bare', citable: true, retracted: true });
		expect(JSON.parse(source.csl)).toMatchObject({ DOI: '10.1000/bare' });
	});
});

describe('rows of the smaller files', () => {
	const characteristic = (change: Record<string, string>) => ({
		...{ finding: 'draw', parameter: 'shared', tooth_group: 'any', beta_a: '4', beta_b: '5', sd_mm: '' },
		...{ basis: 'derived', source_ids: 'adams-2001', note: '', ...change }
	});

	it('that cannot be placed are listed with their reason', async () => {
		const report = await afresh(
			literature({
				measurements: [
					measurement(),
					measurement({ locator: '' }),
					measurement({ mean: 'long' }),
					measurement({ source_id: 'nobody-1999' })
				],
				characteristics: [
					characteristic({}),
					characteristic({ parameter: 'a', source_ids: '' }),
					characteristic({ parameter: 'b', source_ids: 'adams-2001;nobody-1999' }),
					characteristic({ parameter: 'c', basis: 'guessed' }),
					characteristic({ parameter: 'd', basis: 'assumed', source_ids: '' }),
					characteristic({ parameter: 'e', beta_a: '0' }),
					characteristic({ parameter: 'f', beta_b: 'some' }),
					characteristic({ note: 'the same finding, parameter and group again' })
				]
			})
		);
		expect(report.unplaced).toBe(9);
		const reasons = await UnplacedRow.findAll({ order: ['file', 'line'] });
		expect(reasons.map(({ file, line, reason }) => [file, line, reason])).toEqual([
			['finding-characteristics.csv', 3, 'A derived value must name its sources.'],
			['finding-characteristics.csv', 4, 'The source nobody-1999 is not among the sources.'],
			['finding-characteristics.csv', 5, 'The basis "guessed" is unknown.'],
			['finding-characteristics.csv', 7, 'beta_a must be a number above zero.'],
			['finding-characteristics.csv', 8, 'beta_b must be a number above zero.'],
			['finding-characteristics.csv', 9, 'An earlier row gives this parameter of the finding.'],
			['measurements.csv', 3, expect.stringContaining('no locator')],
			['measurements.csv', 4, 'mean is not a number.'],
			['measurements.csv', 5, 'The source nobody-1999 is not among the sources.']
		]);
		expect([await Measurement.count(), await Characteristic.count()]).toEqual([1, 2]);
	});
});
