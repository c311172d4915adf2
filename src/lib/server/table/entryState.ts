import type { Transaction } from 'sequelize';
import { sameSample, type EntryContent } from '$lib/entry/content';
import type { Situation, Standing } from '$lib/entry/workflow';
import { EntryWork } from '../db/models/desk';
import { Entry, Figure, Revision, Sample } from '../db/models/literature';

/** What a revision records besides the content. */
type RecordedState = 'draft' | 'in-review' | 'discarded' | 'published' | 'withdrawn';

/** An entry as a revision keeps it. */
export interface Recorded extends EntryContent {
	state: RecordedState;
	/** Recalled figures that somebody has seen in the source since. */
	confirmed?: boolean;
	poolable?: boolean | null;
	poolableReason?: string | null;
}

/** An entry with all that stands beside it. */
export interface EntryNow {
	entry: Entry;
	sample: Sample;
	standing: Standing;
	/** What everybody sees; null before the first publication. */
	published: EntryContent | null;
	work: EntryWork | null;
	/** What an edit begins from: the draft, else what is published, else the last draft there was. */
	content: EntryContent;
	/** Number of the newest revision, which an edit must name. */
	number: number;
	/** Who made it. */
	who: string;
	/** Id of who wrote what is published. */
	publishedBy: string | null;
}

/** The content of a revision; null for one that kept none. */
export function contentOf(text: string | null): EntryContent | null {
	if (text === null) return null;
	const {
		state: _,
		confirmed: _1,
		poolable: _2,
		poolableReason: _3,
		...content
	} = JSON.parse(text) as Recorded;
	return Array.isArray(content.figures) && typeof content.tooth === 'string' ? content : null;
}

/** Reads an entry; null for an unknown id. */
export async function readEntry(id: number, transaction?: Transaction): Promise<EntryNow | null> {
	const entry = await Entry.findByPk(id, { transaction });
	if (!entry) return null;
	const [sample, figures, work, revisions] = [
		await Sample.findByPk(entry.sampleId, { transaction, rejectOnEmpty: true }),
		await Figure.findAll({ where: { entryId: id }, order: ['position'], transaction }),
		await EntryWork.findByPk(id, { transaction }),
		await Revision.findAll({ where: { entryId: id }, order: [['number', 'DESC']], transaction })
	];
	const standing: Standing =
		entry.state === 'published' || entry.state === 'withdrawn' ? entry.state : 'never';
	const published = standing === 'never' ? null : contentFromRows(entry, sample, figures);
	const draft = work && contentOf(revisions.find(({ number }) => number === work.number)?.after ?? null);
	const last = published ?? contentOf(revisions[0]?.after ?? null);
	if (!last) throw new Error(`Entry ${id} has neither rows nor a revision with its content.`);
	const publication = revisions.find(({ after }) => after !== null && stateOf(after) === 'published');
	return {
		...{ entry, sample, standing, published, work },
		content: draft ?? last,
		number: revisions[0]?.number ?? 0,
		who: revisions[0]?.who ?? '',
		publishedBy: publication ? authorOf(publication, revisions) : null
	};
}

const stateOf = (after: string): string => (JSON.parse(after) as { state: string }).state;

/** Who wrote what a publication published: the last one before it who changed the draft. */
function authorOf(publication: Revision, revisions: readonly Revision[]): string | null {
	const draft = revisions.find(
		({ number, after }) => number < publication.number && after !== null && stateOf(after) === 'draft'
	);
	return (publication.author === null ? publication : (draft ?? publication)).whoId;
}

function contentFromRows(entry: Entry, sample: Sample, figures: readonly Figure[]): EntryContent {
	const { tooth, root, scope, country, method, subgroup, total } = sample;
	const { sourceId: source, locator, measure, provenance } = entry;
	return {
		...{ source, locator, provenance, tooth, root, scope, country, subgroup, total },
		method: method as EntryContent['method'],
		measure: measure as EntryContent['measure'],
		figures: figures.map(({ category, count, percent, countDerived, note }) => ({
			...{ category, count, percent, countDerived, note }
		}))
	};
}

/** The situation by which the rules decide. */
export function situationOf({ standing, work, entry, publishedBy }: EntryNow): Situation {
	return {
		standing,
		work: work && { state: work.state, editors: JSON.parse(work.editors) as string[] },
		unverified: standing === 'published' && entry.provenance === 'memory' && !entry.confirmed,
		publishedBy
	};
}

/** Columns of a sample that its content sets. */
export function sampleColumns({
	source,
	tooth,
	root,
	scope,
	country,
	method,
	subgroup,
	total
}: EntryContent) {
	return { sourceId: source, tooth, root, scope, country, method, subgroup, total };
}

/** Columns of an entry that its content sets. */
export function entryColumns({ source, locator, measure, provenance }: EntryContent) {
	return { sourceId: source, locator, measure, provenance };
}

/** Whether nothing that a confirmation vouched for has changed. */
export const staysConfirmed = (before: EntryContent, after: EntryContent): boolean =>
	sameSample(before, after) &&
	before.measure === after.measure &&
	before.locator === after.locator &&
	JSON.stringify(before.figures) === JSON.stringify(after.figures);
