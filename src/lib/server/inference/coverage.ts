/** Does the table predict what it has not seen? Each sample left out and predicted from the others (inference, section 6). Pure. */
import { borrowedPriors } from './borrowing';
import type { Lender } from './borrowing';
import { isInside, predictCounts } from './countPrediction';
import { gatherQuestions } from './evidence';
import { leaveEachOut } from './leaveOut';
import { chooseModel, FEWEST_SAMPLES, logScoreOf } from './methodEffect';
import type { TableIndex } from './tableIndex';
import { QUESTION_IDS } from './types';
import type { Filters, ModelName, MuPrior, QuestionId, QuestionMethod, QuestionStudy } from './types';

/** A table whose ranges hold less than this does not predict as well as it says. */
const FLAG_BELOW_95 = 0.9;
const FLAG_BELOW_80 = 0.7;

/** One left-out sample. */
interface LeftOutSample {
	source: string;
	entry: number;
	inside95: boolean;
	inside80: boolean;
	/** Of the very count that was seen. */
	predictiveProbability: number;
}

/** Shares of left-out samples inside their ranges. */
interface CoverageFigures {
	samples: number;
	level95: number;
	level80: number;
	/** Sum of ln predictive probability. */
	logScore: number;
	flagged: boolean;
}

/** Coverage of one question, under the model that is shown. */
export interface QuestionCoverage extends CoverageFigures {
	id: QuestionId;
	method: Omit<QuestionMethod, 'offsets'>;
	each: LeftOutSample[];
}

/** Coverage of one root. */
export interface RootCoverage {
	tooth: string;
	root: string;
	/** Over all its questions; null where none has three samples. */
	figures: CoverageFigures | null;
	/** Those with three samples or more. */
	questions: QuestionCoverage[];
}

/** Coverage over roots. */
export interface TableCoverage {
	figures: CoverageFigures | null;
	roots: RootCoverage[];
}

function summarise(each: readonly LeftOutSample[], logScore: number): CoverageFigures {
	const level95 = each.filter(({ inside95 }) => inside95).length / each.length;
	const level80 = each.filter(({ inside80 }) => inside80).length / each.length;
	return {
		samples: each.length,
		level95,
		level80,
		logScore,
		flagged: level95 < FLAG_BELOW_95 || level80 < FLAG_BELOW_80
	};
}

/** Over several questions, each left-out sample counted once. */
function overall(questions: readonly QuestionCoverage[]): CoverageFigures | null {
	if (questions.length === 0) return null;
	return summarise(
		questions.flatMap(({ each }) => each),
		questions.reduce((sum, { logScore }) => sum + logScore, 0)
	);
}

/**
 * Coverage of one question under the model that is shown for it.
 * @param studies its samples
 * @param prior of mu, as the root's question has it
 * @param model shown by the log score unless named
 * @returns null with fewer than three samples: each must have two others
 * @internal exported for its tests
 */
export function questionCoverage(
	id: QuestionId,
	studies: readonly QuestionStudy[],
	prior: MuPrior,
	model?: ModelName
): QuestionCoverage | null {
	if (studies.length < FEWEST_SAMPLES) return null;
	const { shown, logScore, leftOut } = chooseModel(studies, prior);
	const predicted = leftOut?.[model ?? shown] ?? leaveEachOut(studies, prior, 'plain');
	const each = studies.map((study, i): LeftOutSample => {
		const probabilities = predictCounts(predicted[i].population())(study);
		return {
			source: study.source,
			entry: study.entry,
			inside95: isInside(probabilities, 0.95),
			inside80: isInside(probabilities, 0.8),
			predictiveProbability: probabilities.at
		};
	});
	return { id, ...summarise(each, logScoreOf(predicted)), method: { shown, logScore }, each };
}

/**
 * Coverage of one root under some filters.
 * @param lenders `gatherLenders(index, filters)`: other roots, so that leaving a sample out changes no prior
 */
export function rootCoverage(
	index: TableIndex,
	tooth: string,
	root: string,
	filters: Filters,
	lenders: readonly Lender[]
): RootCoverage {
	const studies = gatherQuestions(index, tooth, root, filters);
	const priors = borrowedPriors(lenders, tooth, root);
	const questions = QUESTION_IDS.flatMap((id) => questionCoverage(id, studies[id], priors[id]) ?? []);
	return { tooth, root, figures: overall(questions), questions };
}

/** Sums roots up; those without a question to count are left away. */
export function sumCoverage(roots: readonly RootCoverage[]): TableCoverage {
	return {
		figures: overall(roots.flatMap(({ questions }) => questions)),
		roots: roots.filter(({ figures }) => figures !== null)
	};
}
