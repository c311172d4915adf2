/** Everything the estimator knows of one root: its nine questions pooled, its isthmus, and what was left out. */
import { borrowedPriors, gatherLenders } from './borrowing';
import type { Lender } from './borrowing';
import { gatherEvidence } from './evidence';
import type { IsthmusCandidates, RootEvidence } from './evidence';
import { chooseModel, poolByMethod } from './methodEffect';
import { pool } from './pool';
import type { TableIndex } from './tableIndex';
import { QUESTION_IDS } from './types';
import type {
	Filters,
	MuPrior,
	NotPooled,
	QuestionId,
	QuestionStudy,
	RootModel,
	RootQuestion
} from './types';

/** From this pooled share of roots with more than one canal on, all roots may stand for two-canal roots. */
const NEARLY_ALL = 0.9;

/** What a caller may keep or choose. */
interface RootModelOptions {
	/** Level of the intervals; 0.95 unless stated. */
	level?: number;
	/** `gatherLenders(index, filters)` kept from an earlier root under the same filters. */
	lenders?: readonly Lender[];
}

/**
 * Pools a root's questions, each by the model that predicts its samples better.
 *
 * @param index the table made ready (indexTable); keep it for one revision of the table
 * @param tooth slug of the tooth
 * @param root a root the product answers for
 * @param filters an empty object leaves everything in; they hold for the lenders too
 */
export function buildRootModel(
	index: TableIndex,
	tooth: string,
	root: string,
	filters: Filters,
	options: RootModelOptions = {}
): RootModel {
	const evidence = gatherEvidence(index, tooth, root, filters);
	const priors = borrowedPriors(options.lenders ?? gatherLenders(index, filters), tooth, root);
	const questions = QUESTION_IDS.map((id) =>
		poolQuestion(id, evidence.questions[id], priors[id], options.level)
	);
	const isthmus = poolIsthmus(evidence, questions[0], options.level);
	return {
		tooth,
		root,
		questions,
		isthmus: isthmus.pooled,
		hasEvidence: questions.some(({ borrowed }) => !borrowed),
		notPooled: [...evidence.notPooled, ...isthmus.notPooled],
		reviews: evidence.reviews
	};
}

/** The choice of the model is made anew under any filters, so that an answer depends on nothing but what was asked. */
function poolQuestion(
	id: QuestionId,
	studies: QuestionStudy[],
	prior: MuPrior,
	level: number | undefined
): RootQuestion {
	const { shown, logScore } = chooseModel(studies, prior);
	const { offsets, ...pooled } =
		shown === 'method'
			? poolByMethod(studies, { prior, level })
			: { ...pool(studies, { prior, level }), offsets: [] };
	return {
		...pooled,
		id,
		evidence: studies,
		prior,
		method: { shown, logScore, offsets },
		borrowed: studies.length === 0
	};
}

/**
 * The isthmus has the pooling's own wide prior: section 2 borrows for the nine questions only. A borrowed q1 is no
 * evidence that nearly all roots have two canals.
 */
function poolIsthmus(
	{ isthmus, questions }: RootEvidence,
	q1: RootQuestion,
	level: number | undefined
): { pooled: RootModel['isthmus']; notPooled: NotPooled[] } {
	const allQualify = !q1.borrowed && q1.pooled.mean >= NEARLY_ALL;
	const studies = [...isthmus.twoCanalRoots, ...(allQualify ? isthmus.allRoots : [])];
	return {
		pooled: studies.length > 0 ? { ...pool(studies, { level }), evidence: studies } : null,
		notPooled: allQualify ? [] : isthmusNotPooled(isthmus, questions)
	};
}

function isthmusNotPooled(isthmus: IsthmusCandidates, questions: RootEvidence['questions']): NotPooled[] {
	const used = new Set([
		...QUESTION_IDS.flatMap((id) => questions[id].map(({ entry }) => entry)),
		...isthmus.twoCanalRoots.map(({ entry }) => entry)
	]);
	return isthmus.allRoots
		.filter(({ entry }) => !used.has(entry))
		.map(({ source, entry }) => ({
			source,
			entry,
			measure: 'feature',
			reason:
				'An isthmus counted in all roots, of which too many have one canal to tell how often two canals have one.'
		}));
}
