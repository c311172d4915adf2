/** What a change of the table would do to one root, worked out without publishing it. Pure. */
import type { OutsideCheck, RootFigures } from '$lib/entry/effect';
import { gatherLenders } from './borrowing';
import { isInside, predictCounts } from './countPrediction';
import { expectRoot, type Expectation } from './expectation';
import { leaveEachOut } from './leaveOut';
import { Mixture } from './mixture';
import { makeGrid } from './pool';
import { buildRootModel } from './rootModel';
import { indexTable } from './tableIndex';
import type { ObservationRow, RootModel, RootQuestion, SourceFacts } from './types';

const LEVEL = 0.95;

/** Rows that would come and entries that would go. */
export interface TableChange {
	added: ObservationRow[];
	/** The sources of the added rows, which may be newer than the table. */
	sources: SourceFacts[];
	removed: number[];
}

/** A root under a change. */
export interface ChangedRoot {
	figures: RootFigures;
	checks: OutsideCheck[];
	notPooled: string | null;
}

/** The main figures of a root. */
export function rootFigures(model: RootModel, expectation: Expectation): RootFigures {
	const sources = new Set(model.questions.flatMap(({ evidence }) => evidence.map(({ source }) => source)));
	return {
		studies: sources.size,
		orifices: expectation.orifices,
		fates: Object.entries(expectation.fates).map(([fate, estimate]) => ({ fate, ...estimate })),
		questions: model.questions.map(({ id, evidence, borrowed, pooled, predictive }) => ({
			id,
			studies: evidence.length,
			borrowed,
			pooled: { mean: pooled.mean, interval: pooled.interval },
			predictive: predictive.interval
		}))
	};
}

/**
 * Works a root out under a change. The whole table is indexed anew, since what a root borrows may change too.
 * @param entry the entry whose sample is looked at: the added rows carry its id
 */
export function changedRoot(
	table: { rows: readonly ObservationRow[]; sources: readonly SourceFacts[] },
	change: TableChange,
	{ tooth, root, entry }: { tooth: string; root: string; entry: number }
): ChangedRoot {
	const removed = new Set(change.removed);
	const rows = [...table.rows.filter((row) => !removed.has(row.entry)), ...change.added];
	const index = indexTable(rows, [...table.sources, ...change.sources]);
	const model = buildRootModel(index, tooth, root, {}, { lenders: gatherLenders(index, {}) });
	const source = change.added[0]?.source;
	const checks = model.questions.flatMap((question) => checkOutside(question, source) ?? []);
	return {
		figures: rootFigures(model, expectRoot(model)),
		checks,
		notPooled: model.notPooled.find((one) => one.entry === entry)?.reason ?? null
	};
}

/** One source answers a question once, so its answer is found by the source. */
function checkOutside(question: RootQuestion, source: string | undefined): OutsideCheck | null {
	const place = question.evidence.findIndex((study) => study.source === source);
	if (place === -1) return null;
	const study = question.evidence[place];
	const base = { question: question.id, events: study.events, total: study.total };
	const others = question.evidence.length - 1;
	if (others === 0) return { ...base, others, inside: null, range: null };
	const population = leaveEachOut(question.evidence, question.prior, question.method.shown)[
		place
	].population();
	const { grid } = makeGrid(new Mixture(population));
	return {
		...base,
		others,
		inside: isInside(predictCounts(population)(study), LEVEL),
		range: [quantile(grid, (1 - LEVEL) / 2), quantile(grid, (1 + LEVEL) / 2)]
	};
}

/** The mass point at which a share of the distribution is reached. */
function quantile({ p, mass }: { p: Float64Array; mass: Float64Array }, share: number): number {
	let sum = 0;
	for (let i = 0; i < p.length; i++) {
		sum += mass[i];
		if (sum >= share) return p[i];
	}
	return p[p.length - 1];
}
