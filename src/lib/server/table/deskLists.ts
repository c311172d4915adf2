/** What waits at the desk for a person, and what of the table wants looking after. */
import { QueryTypes, type Sequelize } from 'sequelize';
import { roundingOf } from '$lib/entry/numbers';
import { teeth } from '$lib/anatomy/teeth';
import { EntryWork } from '../db/models/desk';
import { Source } from '../db/models/literature';
import { contentOf } from './entryState';
import { askedRoot } from '../inference/scope';

/** Rows of a list shown at once; the count says how many there are. */
const MOST_SHOWN = 50;

/** An entry in a list of the desk. */
export interface DeskEntry {
	id: number;
	source: string;
	tooth: string;
	root: string;
	measure: string;
	/** Who wrote it, when it was last touched, and what there is to say: the note to the reviewer, the reasons, the fault. */
	author: string;
	at: string;
	remarks: string[];
}

/** A list with how many there are in all. */
export interface DeskList<Item> {
	items: Item[];
	total: number;
}

/** A source that wants work. */
export interface DeskSource {
	id: string;
	title: string | null;
	entries: number;
}

/** How much evidence a root has. */
export interface RootEvidenceCount {
	root: string;
	sources: number;
	entries: number;
	unverified: number;
}

/** Drafts and reviews from one person's side. */
export async function deskWork(db: Sequelize, personId: string) {
	const rows = await db.query<{
		id: number;
		state: string;
		author: string;
		editors: string;
		reasons: string | null;
		note: string;
		at: string;
		after: string;
	}>(
		`SELECT entry_work.entry_id AS id, entry_work.state, entry_work.author, entry_work.editors, entry_work.reasons, entry_work.note,
			entry_work.at, revision.after
		FROM entry_work JOIN revision ON revision.entry_id = entry_work.entry_id AND revision.number = entry_work.number
		ORDER BY entry_work.at DESC`,
		{ type: QueryTypes.SELECT }
	);
	const lists = {
		drafts: [] as DeskEntry[],
		returned: [] as DeskEntry[],
		sent: [] as DeskEntry[],
		toReview: [] as DeskEntry[]
	};
	for (const { id, state, author, editors, reasons, note, at, after } of rows) {
		const content = contentOf(after);
		if (!content) continue;
		const own = (JSON.parse(editors) as string[]).includes(personId);
		const { source, tooth, root, measure } = content;
		const item = { id, source, tooth, root, measure, author, at };
		if (state === 'in-review')
			(own ? lists.sent : lists.toReview).push({ ...item, remarks: note ? [note] : [] });
		else if (own && reasons !== null)
			lists.returned.push({ ...item, remarks: JSON.parse(reasons) as string[] });
		else if (own) lists.drafts.push({ ...item, remarks: [] });
	}
	const cut = (items: DeskEntry[]): DeskList<DeskEntry> => ({
		items: items.slice(0, MOST_SHOWN),
		total: items.length
	});
	return {
		drafts: cut(lists.drafts),
		returned: cut(lists.returned),
		sent: cut(lists.sent),
		toReview: cut(lists.toReview),
		draftsOfOthers:
			(await EntryWork.count()) - Object.values(lists).reduce((sum, list) => sum + list.length, 0)
	};
}

const ENTRY_COLUMNS = `entry.id, entry.source_id AS source, sample.tooth, sample.root, entry.measure, '' AS author, '' AS at`;
const FROM = 'FROM entry JOIN sample ON sample.id = entry.sample_id';

/** What of the published table wants looking after. */
export async function deskCare(db: Sequelize) {
	const unverified = `${FROM} WHERE entry.state = 'published' AND entry.provenance = 'memory' AND entry.confirmed = 0`;
	const [{ total }] = await db.query<{ total: number }>(`SELECT COUNT(*) AS total ${unverified}`, {
		type: QueryTypes.SELECT
	});
	const items = await db.query<Omit<DeskEntry, 'remarks'> & { locator: string }>(
		`SELECT ${ENTRY_COLUMNS}, entry.locator ${unverified} ORDER BY sample.tooth, sample.root, entry.id LIMIT ${MOST_SHOWN}`,
		{ type: QueryTypes.SELECT }
	);
	return {
		unverified: { total, items: items.map(({ locator, ...item }) => ({ ...item, remarks: [locator] })) },
		arithmetic: await arithmeticProblems(db),
		incomplete: await sourcesWhere(db, '(source.citable = 0 OR source.authors_known = 0)'),
		retracted: await sourcesWhere(db, 'source.retracted = 1'),
		sources: await Source.count()
	};
}

async function sourcesWhere(db: Sequelize, where: string): Promise<DeskList<DeskSource>> {
	const [{ total }] = await db.query<{ total: number }>(
		`SELECT COUNT(*) AS total FROM source WHERE ${where}`,
		{
			type: QueryTypes.SELECT
		}
	);
	const items = await db.query<DeskSource>(
		`SELECT source.id, source.title,
			(SELECT COUNT(*) FROM entry WHERE entry.source_id = source.id AND entry.state = 'published') AS entries
		FROM source WHERE ${where} ORDER BY entries DESC, source.id LIMIT ${MOST_SHOWN}`,
		{ type: QueryTypes.SELECT }
	);
	return { items, total };
}

type Fault = Omit<DeskEntry, 'remarks'> & {
	category: string | null;
	count: number;
	percent: number;
	total: number;
};

/** Published figures that contradict themselves: classes above their total, and percentages that do not fit their counts. */
async function arithmeticProblems(db: Sequelize): Promise<DeskList<DeskEntry>> {
	const sums = await db.query<Fault>(
		`SELECT ${ENTRY_COLUMNS}, NULL AS category, SUM(figure.count) AS count, 0 AS percent, sample.total
			${FROM} JOIN figure ON figure.entry_id = entry.id
			WHERE entry.state = 'published' AND entry.measure <> 'feature' AND sample.total IS NOT NULL
			GROUP BY entry.id HAVING SUM(figure.count) - sample.total > MAX(1, 0.01 * sample.total)`,
		{ type: QueryTypes.SELECT }
	);
	const shares = await db.query<Fault & { derived: number }>(
		`SELECT ${ENTRY_COLUMNS}, figure.category, figure.count, figure.percent, sample.total, figure.count_derived AS derived
			${FROM} JOIN figure ON figure.entry_id = entry.id
			WHERE entry.state = 'published' AND figure.percent IS NOT NULL
				AND abs(100.0 * figure.count / sample.total - figure.percent) > CASE figure.count_derived WHEN 1 THEN 50.0 / sample.total ELSE 0 END`,
		{ type: QueryTypes.SELECT }
	);
	const unfit = shares.filter(
		({ count, total, percent }) => Math.abs((100 * count) / total - percent) > roundingOf(percent) + 1e-9
	);
	const found = new Map<number, DeskEntry>();
	for (const { category, count, percent, total, ...item } of [...sums, ...unfit]) {
		const { id, source, tooth, root, measure, author, at } = item;
		const fault = found.get(id) ?? { id, source, tooth, root, measure, author, at, remarks: [] };
		found.set(id, fault);
		fault.remarks.push(
			category === null ? `${count} > ${total}` : `${category}: ${count} / ${total}, ${percent} %`
		);
	}
	const items = [...found.values()];
	return { items: items.slice(0, MOST_SHOWN), total: items.length };
}

/** How much evidence each root of each tooth has, in published entries of sources that are not retracted. */
export async function evidenceByRoot(
	db: Sequelize
): Promise<{ tooth: string; roots: RootEvidenceCount[] }[]> {
	const rows = await db.query<{
		tooth: string;
		root: string;
		source: string;
		entries: number;
		unverified: number;
	}>(
		`SELECT sample.tooth, sample.root, entry.source_id AS source, COUNT(*) AS entries,
			SUM(entry.provenance = 'memory' AND entry.confirmed = 0) AS unverified
		${FROM} JOIN source ON source.id = entry.source_id
		WHERE entry.state = 'published' AND source.retracted = 0 GROUP BY sample.tooth, sample.root, entry.source_id`,
		{ type: QueryTypes.SELECT }
	);
	return teeth.map(({ id: tooth, roots }) => ({
		tooth,
		roots: roots.map((root) => {
			const own = rows.filter((row) => row.tooth === tooth && askedRoot(tooth, row.root) === root);
			const sum = (of: (row: (typeof own)[number]) => number) => own.reduce((all, row) => all + of(row), 0);
			return {
				root,
				sources: new Set(own.map(({ source }) => source)).size,
				entries: sum(({ entries }) => entries),
				unverified: sum(({ unverified }) => unverified)
			};
		})
	}));
}
