/** Priors of a root's questions, borrowed from the other roots (inference, section 2, "Borrowing"). Pure. */
import { teeth } from '$lib/anatomy/teeth';
import { gatherQuestions } from './evidence';
import { DEFAULT_PRIOR } from './pool';
import type { TableIndex } from './tableIndex';
import { QUESTION_IDS } from './types';
import type { Filters, MuPrior, QuestionId, QuestionStudy } from './types';

/** However alike the lenders are, another root may differ; no prior is narrower than this (logit scale). */
const SMALLEST_SD = 1.5;

/** A root lends on a question from this many samples on, and so many roots must lend. */
const FEWEST = 2;

/** All roots the product answers for. */
export const ANSWERED_ROOTS: readonly { tooth: string; root: string }[] = teeth.flatMap(({ id, roots }) =>
	roots.map((root) => ({ tooth: id, root }))
);

/** What one root has to lend: the logit of its summed counts, for each question with two or more samples. */
export interface Lender {
	tooth: string;
	root: string;
	logits: Partial<Record<QuestionId, number>>;
}

/** What every root has to lend under some filters; the same for every borrower, so worth keeping beside the index. */
export function gatherLenders(index: TableIndex, filters: Filters): Lender[] {
	return ANSWERED_ROOTS.map(({ tooth, root }) => {
		const questions = gatherQuestions(index, tooth, root, filters);
		const logits: Lender['logits'] = {};
		for (const id of QUESTION_IDS)
			if (questions[id].length >= FEWEST) logits[id] = summedLogit(questions[id]);
		return { tooth, root, logits };
	});
}

/**
 * The prior of mu for each question on a root: Normal(median, max(1.5, standard deviation)) of the other roots'
 * logits, or Normal(0, 2.5) with fewer than two such roots. `whole` and `single` of one premolar are two roots here and
 * lend to each other, as the page says for `single`.
 */
export function borrowedPriors(
	lenders: readonly Lender[],
	tooth: string,
	root: string
): Record<QuestionId, MuPrior> {
	const others = lenders.filter((lender) => lender.tooth !== tooth || lender.root !== root);
	return Object.fromEntries(
		QUESTION_IDS.map((id) => {
			const logits = others.flatMap((lender) => lender.logits[id] ?? []);
			return [id, priorFrom(logits)];
		})
	) as Record<QuestionId, MuPrior>;
}

function priorFrom(logits: readonly number[]): MuPrior {
	if (logits.length < FEWEST) return { ...DEFAULT_PRIOR };
	return { mean: median(logits), sd: Math.max(SMALLEST_SD, standardDeviation(logits)) };
}

/** ln((E + 0.5)/(N − E + 0.5)) of the summed counts; the halves keep it finite at 0 and at all. */
function summedLogit(studies: readonly QuestionStudy[]): number {
	const events = studies.reduce((sum, study) => sum + study.events, 0);
	const total = studies.reduce((sum, study) => sum + study.total, 0);
	return Math.log((events + 0.5) / (total - events + 0.5));
}

function median(values: readonly number[]): number {
	const sorted = [...values].sort((a, b) => a - b);
	const middle = Math.floor(sorted.length / 2);
	return sorted.length % 2 === 1 ? sorted[middle] : (sorted[middle - 1] + sorted[middle]) / 2;
}

/** With n − 1. */
function standardDeviation(values: readonly number[]): number {
	const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
	return Math.sqrt(values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (values.length - 1));
}
