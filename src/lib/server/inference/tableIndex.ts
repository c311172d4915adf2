/**
 * What can be worked out once per revision of the table, whatever the filters: which rows may enter, and the samples
 * they make, by tooth and root.
 */
import { answersOf } from './answers';
import type { Answers } from './answers';
import { admit } from './eligibility';
import { buildSamples, groupBy } from './samples';
import type { AdmittedRow, Sample, ShutOut } from './samples';
import { askedRoot } from './scope';
import type { ObservationRow, SourceFacts } from './types';

/** Everything the table has on one root. */
export interface RootTable {
	samples: readonly Sample[];
	/**
	 * What each sample answers. Filters do not change it: the figures a sample may be read with are of the same source,
	 * country, method and total, so they pass a filter or fail it together.
	 */
	answers: ReadonlyMap<Sample, Answers>;
	/** Rows that may not enter. Reviews are among them. */
	shutOut: readonly ShutOut[];
}

/** The table made ready for the estimator; plain data, safe to keep as long as the table's revision lasts. */
export interface TableIndex {
	sources: ReadonlyMap<string, SourceFacts>;
	roots: ReadonlyMap<string, RootTable>;
}

const NOTHING: RootTable = { samples: [], answers: new Map(), shutOut: [] };

const rootKey = (tooth: string, root: string) => `${tooth}|${root}`;

/**
 * Makes a table ready. Cost grows with the number of rows (some 2,000 rows: a few milliseconds); keep the result for
 * every question asked of one table revision.
 *
 * @param rows all rows of the published table
 * @param sources its sources
 */
export function indexTable(rows: readonly ObservationRow[], sources: Iterable<SourceFacts>): TableIndex {
	const facts = new Map([...sources].map((source) => [source.id, source]));
	const roots = new Map<string, RootTable>();
	for (const [key, group] of groupBy(rows, (row) => rootKey(row.tooth, askedRoot(row.tooth, row.root)))) {
		const admitted: AdmittedRow[] = [];
		const shutOut: ShutOut[] = [];
		for (const row of group) {
			const verdict = admit(row, facts.get(row.source));
			if (verdict.admitted) admitted.push({ row, grant: verdict.grant });
			else shutOut.push({ row, reason: verdict.reason });
		}
		const { samples, shutOut: parts } = buildSamples(admitted);
		roots.set(key, { samples, answers: answersBySource(samples), shutOut: [...shutOut, ...parts] });
	}
	return { sources: facts, roots };
}

function answersBySource(samples: readonly Sample[]): Map<Sample, Answers> {
	const answers = new Map<Sample, Answers>();
	for (const group of groupBy(samples, ({ source }) => source).values()) {
		for (const sample of group) answers.set(sample, answersOf(sample, group));
	}
	return answers;
}

/** What the table has on a root; nothing for a root it never names. */
export function rootTable(index: TableIndex, tooth: string, root: string): RootTable {
	return index.roots.get(rootKey(tooth, root)) ?? NOTHING;
}
