import { Op, QueryTypes, type Sequelize } from 'sequelize';
import { isSequence } from '$lib/anatomy/sequence';
import type { EntryText } from '$lib/entry/content';
import type { ContextData } from '$lib/entry/context';
import { Entry, Sample, Source } from '../db/models/literature';
import { readEntry } from './entryState';

/** Most entries compared with: a source has some dozens of one root at most. */
const MOST_OTHERS = 200;

/**
 * Reads what an entry is compared with by its checks.
 * @param self the entry's own id, which is not compared
 */
export async function contextFor(
	db: Sequelize,
	{ source, tooth, root }: Pick<EntryText, 'source' | 'tooth' | 'root'>,
	self: number | null
): Promise<ContextData> {
	const about = { source: source.trim(), tooth, root };
	const samples = await Sample.findAll({
		attributes: ['id'],
		where: { sourceId: about.source, tooth, root }
	});
	const rows = await Entry.findAll({
		attributes: ['id'],
		where: { sampleId: samples.map(({ id }) => id), ...(self !== null && { id: { [Op.ne]: self } }) },
		order: ['id'],
		limit: MOST_OTHERS
	});
	const others: ContextData['others'] = [];
	for (const { id } of rows) {
		const entry = await readEntry(id);
		// What was put away or withdrawn repeats nothing.
		if (entry && (entry.work || entry.standing === 'published')) others.push({ id, content: entry.content });
	}
	const sourceKnown = (await Source.count({ where: { id: about.source } })) > 0;
	return { about, self, sourceKnown, shown: await shownSequences(db, tooth, root), others };
}

async function shownSequences(db: Sequelize, tooth: string, root: string): Promise<string[] | null> {
	const rows = await db.query<{ category: string }>(
		`SELECT DISTINCT figure.category FROM figure JOIN entry ON entry.id = figure.entry_id JOIN sample ON sample.id = entry.sample_id
			WHERE entry.state = 'published' AND entry.measure = 'configuration' AND sample.tooth = $tooth AND sample.root = $root
				AND coalesce(figure.count, figure.percent) > 0`,
		{ type: QueryTypes.SELECT, bind: { tooth, root } }
	);
	return rows.length === 0 ? null : rows.map(({ category }) => category).filter(isSequence);
}
