import { leafFacts } from '$lib/anatomy/sequence';
import type { Fate, Leaf } from '$lib/anatomy/sequence';
import type { Characteristics } from './characteristics';
import { MOST_CANALS, possibleLeaves } from './confluenceQuestion';
import type { ConfluenceQuestion, Finding } from './confluenceQuestion';
import { estimatorOf } from './estimates';
import type { Estimate, Estimator } from './estimates';
import type { Inquiry } from './inquiry';
import { combine, isthmusOf, likelihoodsOf, searchOf } from './likelihoods';
import type { Evidence, FindingLikelihood, Superseded } from './likelihoods';
import { decide, rankNext } from './next';
import type { Decision, NextTest } from './next';
import { exactWeights, expectedLeaves, fatesOf } from './posterior';
import type { FateProbabilities } from './posterior';
import type { RootModel } from './types';

/** What becomes of the canals of a root, and whether one is still hidden. */
export interface ConfluenceOutlook {
	/** 'one-canal' only where a width of 1 is possible. */
	fates: Partial<Record<Fate, Estimate>>;
	/** The canals come together anywhere, whatever they do afterwards. */
	meet: Estimate;
	/** More canals than were negotiated; null for three, where the table cannot say whether a fourth is there. */
	anotherCanal: Estimate | null;
}

/** All that is said of a root: every figure a sum over its possible sequences. */
interface ConfluencePicture extends ConfluenceOutlook {
	/** The numbers of exits that are possible, 3 standing for three or more. */
	exits: ({ count: number } & Estimate)[];
	/** The possible leaves of the tree. */
	sequences: ({ sequence: Leaf } & Estimate)[];
}

/** One finding of the account. */
interface Step {
	finding: Finding;
	/** Fates after this finding and those before it. */
	fates: FateProbabilities;
	intervals: Partial<Record<Fate, [number, number]>>;
	/** How often this result is expected, and what that rests on; null for an unclear one, which says nothing. */
	expected: { meet: number; never: number; assumed: boolean; sources: string[] } | null;
}

/** The answer to a question about one root. */
export interface ConfluenceAnswer {
	/** The same question (canals, orifices, search) without its findings. */
	prior: ConfluenceOutlook;
	posterior: ConfluencePicture;
	/** The account: what each finding left, in the order given. */
	steps: Step[];
	/** The one of file contact and two files that did not count, since the other says more of the same mechanism. */
	superseded: Superseded | null;
	/** Findings (and 'isthmus', and the search) used whose characteristics are assumed, not published. */
	assumed: string[];
	next: NextTest[];
	decision: Decision;
}

function outlookOf(leaves: Leaf[], question: ConfluenceQuestion, estimate: Estimator): ConfluenceOutlook {
	const fates = fatesOf(leaves).map((fate) => [fate, estimate((leaf) => leafFacts(leaf).fate === fate)]);
	return {
		fates: Object.fromEntries(fates) as ConfluenceOutlook['fates'],
		meet: estimate((leaf) => leafFacts(leaf).stepsDown),
		anotherCanal:
			question.canals < MOST_CANALS ? estimate((leaf) => leafFacts(leaf).width > question.canals) : null
	};
}

function pictureOf(inquiry: Inquiry, estimate: Estimator): ConfluencePicture {
	const { leaves, question } = inquiry;
	const counts = [...new Set(leaves.map((leaf) => leafFacts(leaf).exits))].sort((a, b) => a - b);
	return {
		...outlookOf(leaves, question, estimate),
		exits: counts.map((count) => ({ count, ...estimate((leaf) => leafFacts(leaf).exits === count) })),
		sequences: leaves.map((sequence) => ({ sequence, ...estimate((leaf) => leaf === sequence) }))
	};
}

/** What a result is expected to show where canals meet and where they never do. */
function expectedOf(likelihood: FindingLikelihood | null): Step['expected'] {
	if (!likelihood) return null;
	const { meet, never, neverIsthmus, expected, assumed } = likelihood;
	const sources = [meet, never, neverIsthmus].flatMap((beta) => beta?.sourceIds ?? []);
	return { ...expected, assumed, sources: [...new Set(sources)] };
}

/** What of the evidence rests on assumed characteristics. */
function assumedOf({ likelihoods, isthmus, search }: Evidence, question: ConfluenceQuestion): string[] {
	const assumed: string[] = likelihoods.filter(({ assumed }) => assumed).map(({ test }) => test);
	if (isthmus.beta?.assumed && likelihoods.some(({ test }) => test === 'draw')) assumed.push('isthmus');
	if (search?.beta.assumed) assumed.push(`search-${question.search}`);
	return assumed;
}

/** What of an inquiry does not depend on its findings. */
function contextOf(characteristics: Characteristics, question: ConfluenceQuestion, model: RootModel) {
	return { isthmus: isthmusOf(model, characteristics), search: searchOf(characteristics, question) };
}

/**
 * What becomes of the canals under a question's findings, without the rest of an answer. The server keeps it: findings
 * are entered one after the other, and each answer shows the way from no finding to the last.
 * @param model the root under the person's filters
 * @param question one that validateQuestion found nothing wrong with
 * @throws RangeError as answerConfluence
 */
export function confluenceOutlook(
	model: RootModel,
	characteristics: Characteristics,
	question: ConfluenceQuestion
): ConfluenceOutlook {
	const leaves = possibleLeaves(question);
	const context = contextOf(characteristics, question, model);
	const made = likelihoodsOf(question.findings, characteristics, context.isthmus);
	const evidence = combine(
		made.filter((likelihood) => likelihood !== null),
		context
	);
	return outlookOf(leaves, question, estimatorOf(model, leaves, expectedLeaves(model), evidence));
}

/**
 * Answers a question about one root (inference, sections 3 and 4): exact posterior means, intervals, the fates
 * after each finding, what to test next, and advice. Deterministic; the order of findings changes only `steps`.
 * @param model the root under the person's filters; one without evidence is answered, without advice
 * @param characteristics those of the root (characteristicsFor)
 * @param question one that validateQuestion found nothing wrong with
 * @param known what confluenceOutlook answers to the same question after none, one, … of its clear findings, as far as it is known
 * @throws RangeError for a question no sequence of the root fits, or a test the table has no characteristics of
 */
export function answerConfluence(
	model: RootModel,
	characteristics: Characteristics,
	question: ConfluenceQuestion,
	known: ConfluenceOutlook[] = []
): ConfluenceAnswer {
	const leaves = possibleLeaves(question);
	const priors = expectedLeaves(model);
	const context = contextOf(characteristics, question, model);
	const made = likelihoodsOf(question.findings, characteristics, context.isthmus);
	const clear = (likelihood: FindingLikelihood | null) => likelihood !== null;
	const inquiry: Inquiry = {
		question,
		leaves,
		priors,
		characteristics,
		context,
		entered: made.filter(clear),
		hasEvidence: model.hasEvidence
	};
	const evidence = combine(inquiry.entered, context);
	if (!exactWeights(leaves, priors, evidence).some((weight) => weight > 0)) {
		throw new RangeError('No canal sequence of this root fits the question.');
	}
	const posterior = estimatorOf(model, leaves, priors, evidence);
	const outlooks = [...known];
	/** After the first so many clear findings; an unclear one adds nothing, so nothing is worked out for it. */
	const outlookAfter = (count: number) =>
		(outlooks[count] ??= outlookOf(
			leaves,
			question,
			count === inquiry.entered.length
				? posterior
				: estimatorOf(model, leaves, priors, combine(inquiry.entered.slice(0, count), context))
		));
	return {
		prior: outlookAfter(0),
		posterior: pictureOf(inquiry, posterior),
		steps: question.findings.map((finding, index) => {
			const { fates } = outlookAfter(made.slice(0, index + 1).filter(clear).length);
			const each = Object.entries(fates);
			return {
				finding,
				fates: Object.fromEntries(each.map(([fate, { mean }]) => [fate, mean])),
				intervals: Object.fromEntries(each.map(([fate, { interval }]) => [fate, interval])),
				expected: expectedOf(made[index])
			};
		}),
		superseded: evidence.superseded,
		assumed: assumedOf(evidence, question),
		next: rankNext(inquiry),
		decision: decide(inquiry)
	};
}
