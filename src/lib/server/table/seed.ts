import { createHash } from 'node:crypto';
import { Op, type Sequelize, type Transaction } from 'sequelize';
import { SourceRevision } from '../db/models/intake';
import { Entry, Figure, Revision, Sample, Source, TableRevision, UnplacedRow } from '../db/models/literature';
import { citable, yearOf } from './citable';
import type { CslSource, LiteratureFiles } from './literatureFiles';
import { planSamples, type PlannedEntry, type PlannedSample, type Unplaced } from './plan';
import { replaceSupplements } from './supplements';

/** Rows written in one transaction: small enough that none holds the write lock for half a second. */
const CHUNK_ROWS = 400;
const SEED_PERSON = 'seed';

/** What a seeding did. */
export interface SeedReport {
	changed: boolean;
	revision: number;
	sources: number;
	entriesAdded: number;
	entriesChanged: number;
	entriesWithdrawn: number;
	unplaced: number;
}

/**
 * Loads the shipped literature into the database. Idempotent: the same files change nothing; changed files touch only the entries that
 * differ, and never one that a person has since edited. What cannot be placed is listed in `unplaced_row` with its reason.
 * @param db an open, migrated database
 */
export async function seedLiterature(db: Sequelize, files: LiteratureFiles): Promise<SeedReport> {
	const latest = await TableRevision.findOne({ order: [['id', 'DESC']] });
	const seeded = await TableRevision.findOne({
		where: { seedDigest: { [Op.ne]: null } },
		order: [['id', 'DESC']]
	});
	if (latest && seeded?.seedDigest === files.digest) {
		return {
			changed: false,
			revision: latest.id,
			sources: await Source.count(),
			entriesAdded: 0,
			entriesChanged: 0,
			entriesWithdrawn: 0,
			unplaced: await UnplacedRow.count()
		};
	}
	const sourceIds = new Set(files.sources.map((source) => source.id));
	const { samples, unplaced } = planSamples(files.observations, sourceIds);

	// From here until the end the table is that of no files: a start cut short must not be taken for the files before.
	await TableRevision.update({ seedDigest: null }, { where: {} });
	await seedSources(db, files.sources);
	const written = await seedSamples(db, samples);
	const withdrawn = await withdrawMissing(db, samples);
	const leftOver = await replaceSupplements(db, files, sourceIds);
	await listUnplaced(db, [...unplaced, ...leftOver]);
	// Last of all: a start that was cut short finds no revision with a digest and seeds again.
	const revision = await TableRevision.create({
		at: new Date().toISOString(),
		why: latest ? 'The shipped literature changed.' : 'The shipped literature was loaded.',
		seedDigest: files.digest
	});
	return {
		changed: true,
		revision: revision.id,
		sources: files.sources.length,
		entriesAdded: written.added,
		entriesChanged: written.changed,
		entriesWithdrawn: withdrawn,
		unplaced: unplaced.length + leftOver.length
	};
}

/** Runs `work` over chunks of `rows`, each chunk in a transaction of its own. */
async function inChunks<T>(
	db: Sequelize,
	rows: T[],
	work: (chunk: T[], transaction: Transaction) => Promise<void>
) {
	for (let start = 0; start < rows.length; start += CHUNK_ROWS) {
		const chunk = rows.slice(start, start + CHUNK_ROWS);
		await db.transaction((transaction) => work(chunk, transaction));
	}
}

async function seedSources(db: Sequelize, sources: CslSource[]) {
	const known = new Map((await Source.findAll()).map((source) => [source.id, source.seedHash]));
	const rows = sources.map((csl) => {
		const text = JSON.stringify(csl);
		return {
			id: csl.id,
			csl: text,
			title: csl.title ?? null,
			type: csl.type ?? 'article',
			journal: csl['container-title'] ?? null,
			year: yearOf(csl),
			doi: csl.DOI ?? null,
			pmid: csl.PMID ?? null,
			pmcid: csl.PMCID ?? null,
			citable: citable(csl),
			authorsKnown: (csl.author?.length ?? 0) > 0,
			retracted: false,
			seedHash: createHash('sha256').update(text).digest('hex')
		};
	});
	// What an educator has changed stays as it is, whatever the files say.
	const edited = new Set(
		(await SourceRevision.findAll({ attributes: ['sourceId'] })).map(({ sourceId }) => sourceId)
	);
	const changed = rows.filter((row) => known.get(row.id) !== row.seedHash && !edited.has(row.id));
	const fields = Object.keys(rows[0] ?? {}).filter((field) => field !== 'id' && field !== 'retracted');
	await inChunks(db, changed, async (chunk, transaction) => {
		await Source.bulkCreate(chunk, {
			transaction,
			updateOnDuplicate: fields as (keyof (typeof rows)[number])[]
		});
	});
}

/** Adds new samples and entries and rewrites the changed ones that nobody has edited. */
async function seedSamples(db: Sequelize, planned: PlannedSample[]) {
	const [samples, entries, edited] = await Promise.all([
		Sample.findAll({ attributes: ['id', 'seedKey'] }),
		Entry.findAll({ attributes: ['id', 'seedKey', 'seedHash'] }),
		editedEntries()
	]);
	const sampleIds = new Map(samples.map((sample) => [sample.seedKey, sample.id]));
	const known = new Map(entries.map((entry) => [entry.seedKey, entry]));
	let nextSample = Math.max(0, ...samples.map((sample) => sample.id)) + 1;
	let nextEntry = Math.max(0, ...entries.map((entry) => entry.id)) + 1;

	const newSamples = planned.filter((sample) => !sampleIds.has(sample.key));
	for (const sample of newSamples) sampleIds.set(sample.key, nextSample++);
	await inChunks(db, newSamples, async (chunk, transaction) => {
		await Sample.bulkCreate(
			chunk.map(({ key, entries: _, ...sample }) => ({
				...sample,
				id: sampleIds.get(key)!,
				poolable: null,
				seedKey: key
			})),
			{ transaction }
		);
	});

	const all = planned.flatMap((sample) => sample.entries.map((entry) => ({ sample, entry })));
	const fresh = all.filter(({ entry }) => !known.has(entry.key));
	await inChunks(db, fresh, async (chunk, transaction) => {
		const rows = chunk.map(({ sample, entry }) => ({ id: nextEntry++, sample, entry }));
		await Entry.bulkCreate(
			rows.map(({ id, sample, entry }) => ({
				id,
				sampleId: sampleIds.get(sample.key)!,
				sourceId: sample.sourceId,
				locator: entry.locator,
				measure: entry.measure,
				state: 'published' as const,
				provenance: entry.provenance,
				confirmed: false,
				seedKey: entry.key,
				seedHash: entry.hash
			})),
			{ transaction }
		);
		await writeFigures(rows, transaction);
		await writeRevisions(rows, 'Loaded with the shipped literature.', transaction);
	});

	const changed = all.filter(({ entry }) => {
		const before = known.get(entry.key);
		return before && before.seedHash !== entry.hash && !edited.has(before.id);
	});
	await inChunks(db, changed, async (chunk, transaction) => {
		const rows = chunk.map(({ sample, entry }) => ({ id: known.get(entry.key)!.id, sample, entry }));
		for (const { id, entry } of rows) {
			await Entry.update({ seedHash: entry.hash, state: 'published' }, { where: { id }, transaction });
			await Figure.destroy({ where: { entryId: id }, transaction });
		}
		await writeFigures(rows, transaction);
		await writeRevisions(rows, 'The shipped literature changed.', transaction);
	});
	return { added: fresh.length, changed: changed.length };
}

/** Entries that somebody other than the seed has revised: the seed leaves them alone. */
async function editedEntries(): Promise<Set<number>> {
	const revisions = await Revision.findAll({
		attributes: ['entryId'],
		where: { [Op.or]: [{ who: { [Op.ne]: SEED_PERSON } }, { whoId: { [Op.ne]: null } }] },
		group: ['entryId']
	});
	return new Set(revisions.map(({ entryId }) => entryId));
}

async function writeFigures(rows: { id: number; entry: PlannedEntry }[], transaction: Transaction) {
	const figures = rows.flatMap(({ id, entry }) =>
		entry.figures.map((figure, position) => ({ ...figure, entryId: id, position }))
	);
	await Figure.bulkCreate(figures, { transaction });
}

async function writeRevisions(
	rows: { id: number; sample: PlannedSample; entry: PlannedEntry }[],
	why: string,
	transaction: Transaction
) {
	const ids = rows.map(({ id }) => id);
	const earlier = await Revision.findAll({ where: { entryId: ids }, transaction });
	const last = new Map<number, Revision>();
	for (const revision of earlier) {
		const before = last.get(revision.entryId);
		if (!before || before.number < revision.number) last.set(revision.entryId, revision);
	}
	const at = new Date().toISOString();
	await Revision.bulkCreate(
		rows.map(({ id, sample, entry }) => {
			const { locator, measure, provenance, figures } = entry;
			const { sourceId: source, tooth, root, scope, country, method, subgroup, total } = sample;
			const content = {
				source,
				locator,
				provenance,
				tooth,
				root,
				scope,
				country,
				method,
				subgroup,
				total,
				measure,
				figures
			};
			return {
				entryId: id,
				number: (last.get(id)?.number ?? 0) + 1,
				at,
				who: SEED_PERSON,
				before: last.get(id)?.after ?? null,
				after: JSON.stringify({ state: 'published', ...content }),
				why
			};
		}),
		{ transaction }
	);
}

/** Withdraws published entries that came with earlier files and no longer stand in them. Nothing is deleted. */
async function withdrawMissing(db: Sequelize, planned: PlannedSample[]): Promise<number> {
	const kept = new Set(planned.flatMap((sample) => sample.entries.map((entry) => entry.key)));
	const edited = await editedEntries();
	const seeded = await Entry.findAll({ where: { state: 'published' } });
	const gone = seeded.filter(({ id, seedKey }) => seedKey !== null && !kept.has(seedKey) && !edited.has(id));
	await inChunks(db, gone, async (chunk, transaction) => {
		for (const entry of chunk) {
			const last = await Revision.findOne({
				where: { entryId: entry.id },
				order: [['number', 'DESC']],
				transaction
			});
			// Without its hash it counts as changed, and so is published again, should later files bring it back as it was.
			await entry.update({ state: 'withdrawn', seedHash: null }, { transaction });
			await Revision.create(
				{
					entryId: entry.id,
					number: (last?.number ?? 0) + 1,
					at: new Date().toISOString(),
					who: SEED_PERSON,
					before: last?.after ?? null,
					after: JSON.stringify({
						...(JSON.parse(last?.after ?? '{}') as Record<string, unknown>),
						state: 'withdrawn'
					}),
					why: 'No longer part of the shipped literature.'
				},
				{ transaction }
			);
		}
	});
	return gone.length;
}

async function listUnplaced(db: Sequelize, unplaced: Unplaced[]) {
	await db.transaction(async (transaction) => {
		await UnplacedRow.destroy({ where: {}, transaction });
		await UnplacedRow.bulkCreate(unplaced, { transaction });
	});
}
