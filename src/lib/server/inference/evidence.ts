/** Everything the table says of one root: what is pooled for each question, and what is not, with the reason. Pure. */
import { onePerSource, readQuestions, toQuestionStudy } from './questions';
import type { Candidate, RootQuestions } from './questions';
import { reviewFigures } from './reviews';
import { rootTable } from './tableIndex';
import type { RootTable, TableIndex } from './tableIndex';
import { QUESTION_IDS } from './types';
import type { Filters, NotPooled, QuestionId, QuestionStudy, ReviewFigure } from './types';

/** Candidates for the prevalence of an isthmus, one a source in each list. */
export interface IsthmusCandidates {
	/** Counted in roots known to have two canals. */
	twoCanalRoots: QuestionStudy[];
	/** Counted in all roots: they qualify where nearly all roots have more than one canal. */
	allRoots: QuestionStudy[];
}

/** The evidence on one root under one set of filters. */
export interface RootEvidence {
	questions: Record<QuestionId, QuestionStudy[]>;
	isthmus: IsthmusCandidates;
	/** One an entry; a sample of candidates for the isthmus is not listed here. */
	notPooled: NotPooled[];
	reviews: ReviewFigure[];
}

/**
 * Gathers the evidence on a root.
 *
 * @param index the table made ready (indexTable)
 * @param tooth slug of the tooth
 * @param root a root the product answers for; of incisors and canines `single`
 * @param filters an empty object leaves everything in
 */
export function gatherEvidence(
	index: TableIndex,
	tooth: string,
	root: string,
	filters: Filters
): RootEvidence {
	const table = rootTable(index, tooth, root);
	const read = readQuestions(index, table, filters);
	const isthmus = isthmusCandidates(read);
	return {
		questions: toStudies(read.chosen),
		isthmus: {
			twoCanalRoots: isthmus.twoCanalRoots.map(toQuestionStudy),
			allRoots: isthmus.allRoots.map(toQuestionStudy)
		},
		notPooled: listNotPooled(table, read, [...isthmus.twoCanalRoots, ...isthmus.allRoots]),
		reviews: reviewFigures(index, table, filters)
	};
}

/** Only the studies of each question: what lending to other roots needs. */
export function gatherQuestions(
	index: TableIndex,
	tooth: string,
	root: string,
	filters: Filters
): Record<QuestionId, QuestionStudy[]> {
	return toStudies(readQuestions(index, rootTable(index, tooth, root), filters).chosen);
}

function toStudies(chosen: RootQuestions['chosen']): Record<QuestionId, QuestionStudy[]> {
	return Object.fromEntries(QUESTION_IDS.map((id) => [id, chosen[id].map(toQuestionStudy)])) as Record<
		QuestionId,
		QuestionStudy[]
	>;
}

/** A source with both bases is counted by the one that asks the question itself: roots with two canals. */
function isthmusCandidates({ read }: RootQuestions): { twoCanalRoots: Candidate[]; allRoots: Candidate[] } {
	const candidates = read.flatMap(({ sample }) => {
		const events = sample.measure === 'feature' ? sample.counts.get('isthmus') : undefined;
		return events === undefined ? [] : [{ sample, study: { events, total: sample.total } }];
	});
	const twoCanalRoots = onePerSource(candidates.filter(({ sample }) => sample.grant === 'two-canal'));
	const counted = new Set(twoCanalRoots.map(({ sample }) => sample.source));
	const allRoots = onePerSource(
		candidates.filter(({ sample }) => sample.grant === 'every' && !counted.has(sample.source))
	);
	return { twoCanalRoots, allRoots };
}

/** Every entry of which nothing was used, once, with its reasons. */
function listNotPooled(table: RootTable, read: RootQuestions, isthmus: readonly Candidate[]): NotPooled[] {
	const chosen = [...QUESTION_IDS.flatMap((id) => read.chosen[id]), ...isthmus].map(({ sample }) => sample);
	const used = new Set(chosen.flatMap(({ entries }) => entries));
	const listed = new Map<number, { source: string; measure: string; reasons: Set<string> }>();
	const note = (entry: number, source: string, measure: string, reason: string) => {
		if (used.has(entry)) return;
		const item = listed.get(entry) ?? { source, measure, reasons: new Set<string>() };
		listed.set(entry, item);
		item.reasons.add(reason);
	};
	for (const { row, reason } of table.shutOut) note(row.entry, row.source, row.measure, reason);
	for (const { sample, reason } of read.leftOut) {
		for (const entry of sample.entries) note(entry, sample.source, sample.measure, reason);
	}
	for (const { sample, answers } of read.read) {
		const reason = answers.reason ?? whyPassedOver(read, sample.source);
		for (const entry of sample.entries) note(entry, sample.source, sample.measure, reason);
	}
	return [...listed].map(([entry, { source, measure, reasons }]) => ({
		source,
		entry,
		measure,
		reason: [...reasons].join(' ')
	}));
}

function whyPassedOver(read: RootQuestions, source: string): string {
	const another = QUESTION_IDS.some((id) => read.chosen[id].some(({ sample }) => sample.source === source));
	return another
		? 'The same teeth as another sample of this source, which is used.'
		: 'Answers only what other sources were made to find out (a third mesial canal), and those are used.';
}
