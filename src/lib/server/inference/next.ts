import { leafFacts } from '$lib/anatomy/sequence';
import type { Fate } from '$lib/anatomy/sequence';
import { TESTS, USUAL_THRESHOLD } from '$lib/schemas/terms';
import type { Test } from './confluenceQuestion';
import type { Inquiry } from './inquiry';
import { combine, findingLikelihood } from './likelihoods';
import type { ClearResult, FindingLikelihood } from './likelihoods';
import { exactWeights, fateShares, shareOf } from './posterior';
import type { FateProbabilities, Reading } from './posterior';

type Effort = 'low' | 'medium' | 'high';
type Risk = 'none' | 'radiation';

/** Chair time a test takes, and what it exposes the patient to. Common practice, no source. */
const COSTS: Record<Test, { effort: Effort; risk: Risk }> = {
	'cone-mark': { effort: 'medium', risk: 'none' },
	draw: { effort: 'low', risk: 'none' },
	'file-contact': { effort: 'low', risk: 'none' },
	'two-files': { effort: 'low', risk: 'none' },
	'angled-radiograph': { effort: 'medium', risk: 'radiation' },
	'cbct-reading': { effort: 'high', risk: 'radiation' }
};

/** A test not yet made: how much it can be expected to tell, and what each result would leave. */
export interface NextTest {
	test: Test;
	/** Expected information about the fate, in bits. */
	bits: number;
	/** Positive and negative, with their probabilities among clear results. */
	results: { result: ClearResult; probability: number; fates: FateProbabilities }[];
	effort: Effort;
	risk: Risk;
}

type Advice = 'treat-as-joined' | 'treat-as-separate' | 'undecided';

export interface Decision {
	threshold: number;
	/** Null with one canal or without evidence. */
	advice: Advice | null;
	/** False only if neither all-positive nor all-negative remaining results would change the advice. */
	furtherTestingCanChangeIt: boolean;
}

/** Tests without a clear result that the table knows; none with one canal. */
function remainingTests({ question, entered, characteristics, context }: Inquiry): Test[] {
	if (question.canals < 2) return [];
	return TESTS.filter(
		(test) =>
			!entered.some((made) => made.test === test) &&
			findingLikelihood(test, 'positive', characteristics, context.isthmus) !== null
	);
}

function resultOf({ characteristics, context }: Inquiry, test: Test, result: ClearResult): FindingLikelihood {
	return findingLikelihood(test, result, characteristics, context.isthmus)!;
}

function weightsAfter(
	{ leaves, priors, context }: Inquiry,
	findings: FindingLikelihood[],
	reading?: Reading
) {
	return exactWeights(leaves, priors, combine(findings, context), reading);
}

/** Kullback-Leibler divergence of `after` from `before`, bits. */
function informationBits(after: FateProbabilities, before: FateProbabilities): number {
	let bits = 0;
	for (const fate of Object.keys(after) as Fate[]) {
		const p = after[fate]!;
		if (p > 0) bits += p * Math.log2(p / before[fate]!);
	}
	return bits;
}

function prospectOf(inquiry: Inquiry, test: Test): NextTest {
	const { leaves, entered } = inquiry;
	const now = weightsAfter(inquiry, entered);
	const before = fateShares(leaves, now);
	const stepsDown = shareOf(leaves, now, (leaf) => leafFacts(leaf).stepsDown);
	const results = (['positive', 'negative'] as const).map((result) => {
		const likelihood = resultOf(inquiry, test, result);
		const { meet, never } = likelihood.expected;
		return {
			result,
			probability: stepsDown * meet + (1 - stepsDown) * never,
			fates: fateShares(leaves, weightsAfter(inquiry, [...entered, likelihood]))
		};
	});
	// For an independent test the mean divergence is the mutual information of fate and result. Of file contact
	// and two files, the second tells only where it replaces the first; the divergence says so, too.
	const bits = results.reduce(
		(sum, { probability, fates }) => sum + probability * informationBits(fates, before),
		0
	);
	// A divergence is never negative; rounding alone (1e-12, see the tests) can take a sum of nothing below 0.
	return { test, bits: Math.max(bits, 0), results, ...COSTS[test] };
}

/** The tests not yet made (an unclear one may be made again), the most informative first. */
export function rankNext(inquiry: Inquiry): NextTest[] {
	return remainingTests(inquiry)
		.map((test) => prospectOf(inquiry, test))
		.sort((a, b) => b.bits - a.bits);
}

/** Likelihood ratios of assumed findings replaced by their square roots. */
const cautious: Reading = ({ expected, assumed }) =>
	assumed ? { meet: Math.sqrt(expected.meet), never: Math.sqrt(expected.never) } : expected;

function adviceFor(inquiry: Inquiry, findings: FindingLikelihood[], threshold: number): Advice | null {
	const { leaves, question, hasEvidence } = inquiry;
	if (question.canals < 2 || !hasEvidence) return null;
	const sharedExit = (reading?: Reading) =>
		shareOf(
			leaves,
			weightsAfter(inquiry, findings, reading),
			(leaf) => leafFacts(leaf).fate === 'shared-exit'
		);
	const probability = sharedExit();
	if (probability >= threshold && sharedExit(cautious) >= threshold) return 'treat-as-joined';
	return probability <= 1 - threshold ? 'treat-as-separate' : 'undecided';
}

/** The advice (inference, section 4), and whether the tests not yet made could still change it. */
export function decide(inquiry: Inquiry): Decision {
	const { question, entered } = inquiry;
	const threshold = question.threshold ?? USUAL_THRESHOLD;
	const advice = adviceFor(inquiry, entered, threshold);
	const remaining = advice === null ? [] : remainingTests(inquiry);
	const allShow = (result: ClearResult) =>
		adviceFor(inquiry, [...entered, ...remaining.map((test) => resultOf(inquiry, test, result))], threshold);
	return {
		threshold,
		advice,
		furtherTestingCanChangeIt: allShow('positive') !== advice || allShow('negative') !== advice
	};
}
