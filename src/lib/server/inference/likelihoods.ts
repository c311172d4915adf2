import type { BetaCharacteristic, Characteristics } from './characteristics';
import { TESTS } from '$lib/schemas/terms';
import { canalsKnown } from './confluenceQuestion';
import type { ConfluenceQuestion, Finding, Result, Test } from './confluenceQuestion';
import { gridMean } from './predictiveGrid';
import { betaPowerMoment } from './special';
import type { RootModel } from './types';

/** Results that say something; "unclear" has likelihood 1. */
export type ClearResult = Exclude<Result, 'unclear'>;

/**
 * A finding's likelihood over sequences. It depends only on whether the number of canals ever steps down,
 * and for the draw test, where it never does, on an isthmus.
 */
export interface FindingLikelihood {
	test: Test;
	result: ClearResult;
	/** P(positive | the number steps down). */
	meet: BetaCharacteristic;
	/** P(positive | it never does); of the draw test, without an isthmus. */
	never: BetaCharacteristic;
	/** Draw test only: P(positive | it never does, isthmus). */
	neverIsthmus: BetaCharacteristic | null;
	/** E[P(result | state)], the draw test's averaged over the isthmus. */
	expected: { meet: number; never: number };
	/** Some characteristic it rests on is assumed. */
	assumed: boolean;
}

/** How often two canals have an isthmus between them. */
export interface Isthmus {
	/** E[prevalence]. */
	mean: number;
	/** Its Beta where no study of the root qualifies; null where the root's pooled prevalence is used. */
	beta: BetaCharacteristic | null;
}

/** The search for further canals: the Beta of finding each one after the first, and the canals known, f. */
interface SearchLikelihood {
	beta: BetaCharacteristic;
	known: number;
}

/** The findings that count, and what they count for. */
export interface Evidence {
	likelihoods: FindingLikelihood[];
	superseded: Superseded | null;
	isthmus: Isthmus;
	search: SearchLikelihood | null;
}

/** File contact and two files share a mechanism: only the one that says more counts. */
export interface Superseded {
	test: Test;
	by: Test;
}

const SAME_MECHANISM: Test[] = ['file-contact', 'two-files'];

/** Mean of a Beta(a, b). */
export function betaMean({ a, b }: BetaCharacteristic): number {
	return a / (a + b);
}

/** P(result) where a positive has probability `positive`. */
export function ofResult(result: ClearResult, positive: number): number {
	return result === 'positive' ? positive : 1 - positive;
}

/** Beta of a parameter after one result that it bore on. */
export function updated({ a, b }: { a: number; b: number }, result: ClearResult): { a: number; b: number } {
	return result === 'positive' ? { a: a + 1, b } : { a, b: b + 1 };
}

/**
 * Prevalence of an isthmus of a root: its pooled predictive mean, else the table's Beta, else Beta(1, 1)
 * assumed.
 */
export function isthmusOf(model: RootModel, characteristics: Characteristics): Isthmus {
	if (model.isthmus) return { mean: gridMean(model.isthmus.grid), beta: null };
	const listed = characteristics.beta('isthmus', 'present-if-two-canals');
	const beta = listed ?? { a: 1, b: 1, assumed: true, sourceIds: [] };
	return { mean: betaMean(beta), beta };
}

/**
 * The likelihood of one clear result; null where the table lacks the characteristics of the test.
 * @param isthmus used by the draw test only
 */
export function findingLikelihood(
	test: Test,
	result: ClearResult,
	characteristics: Characteristics,
	isthmus: Isthmus
): FindingLikelihood | null {
	const draw = test === 'draw';
	const meet = characteristics.beta(test, 'positive-if-meet');
	const never = characteristics.beta(
		test,
		draw ? 'positive-if-never-meet-no-isthmus' : 'positive-if-never-meet'
	);
	const neverIsthmus = draw ? characteristics.beta(test, 'positive-if-never-meet-isthmus') : null;
	if (!meet || !never || (draw && !neverIsthmus)) return null;
	const without = ofResult(result, betaMean(never));
	const expectedNever = neverIsthmus
		? isthmus.mean * ofResult(result, betaMean(neverIsthmus)) + (1 - isthmus.mean) * without
		: without;
	return {
		test,
		result,
		meet,
		never,
		neverIsthmus,
		expected: { meet: ofResult(result, betaMean(meet)), never: expectedNever },
		assumed:
			meet.assumed ||
			never.assumed ||
			(neverIsthmus !== null && (neverIsthmus.assumed || isthmus.beta?.assumed === true))
	};
}

function strength({ expected }: FindingLikelihood): number {
	return Math.abs(Math.log(expected.meet / expected.never));
}

/**
 * What a set of likelihoods counts for: in a fixed order whatever order they came in, so that the answer has
 * the same digits; the weaker of file contact and two files is dropped where both are entered, of equals the
 * second.
 */
export function combine(
	entered: FindingLikelihood[],
	context: Pick<Evidence, 'isthmus' | 'search'>
): Evidence {
	const { isthmus, search } = context;
	const sorted = [...entered].sort((a, b) => TESTS.indexOf(a.test) - TESTS.indexOf(b.test));
	const rivals = sorted.filter(({ test }) => SAME_MECHANISM.includes(test));
	if (rivals.length < 2) return { likelihoods: sorted, superseded: null, isthmus, search };
	const [first, second] = rivals;
	const [counts, dropped] = strength(second) > strength(first) ? [second, first] : [first, second];
	return {
		likelihoods: sorted.filter((likelihood) => likelihood !== dropped),
		superseded: { test: dropped.test, by: counts.test },
		isthmus,
		search
	};
}

/**
 * The likelihoods of findings in the order they were made; null for an "unclear" one, which counts for
 * nothing.
 * @throws RangeError where the table lacks the characteristics of a test
 */
export function likelihoodsOf(
	findings: Finding[],
	characteristics: Characteristics,
	isthmus: Isthmus
): (FindingLikelihood | null)[] {
	return findings.map(({ test, result }) => {
		if (result === 'unclear') return null;
		const likelihood = findingLikelihood(test, result, characteristics, isthmus);
		if (!likelihood) throw new RangeError(`The table has no characteristics of ${test}.`);
		return likelihood;
	});
}

/**
 * The likelihood of a question's search; null where none is stated.
 * @throws RangeError where the table lacks the characteristics of the search
 */
export function searchOf(
	characteristics: Characteristics,
	question: ConfluenceQuestion
): SearchLikelihood | null {
	if (!question.search) return null;
	const beta = characteristics.beta(`search-${question.search}`, 'each-further-canal-found');
	if (!beta) throw new RangeError(`The table has no characteristics of search-${question.search}.`);
	return { beta, known: canalsKnown(question) };
}

/** C(n, k) for the few canals of a root. */
export function choose(n: number, k: number): number {
	let result = 1;
	for (let i = 1; i <= k; i++) result = (result * (n - k + i)) / i;
	return result;
}

/**
 * E[P(f canals found | width w)]: C(w - 1, f - 1) E[s^(f-1) (1 - s)^(w-f)] over the Beta of s, 0 for w < f;
 * 1 for w ≥ f without a search. `f` is at least 1.
 */
export function expectedSearch(search: SearchLikelihood | null, width: number): number {
	if (!search) return 1;
	const { beta, known } = search;
	if (width < known) return 0;
	return choose(width - 1, known - 1) * betaPowerMoment(beta.a, beta.b, known - 1, width - known);
}
