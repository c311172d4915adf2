/** The tree of questions as a map from leaves to answers, and what follows from the answers' probabilities. Pure. */
import { LEAVES } from '$lib/anatomy/sequence';
import type { Leaf } from '$lib/anatomy/sequence';
import { QUESTION_IDS } from './types';
import type { LeafWeights, QuestionId } from './types';

/** One answer on the way to a leaf. */
export interface Step {
	question: QuestionId;
	answer: boolean;
}

/** A path written short: `q1+` is yes, `q1-` is no. */
function path(text: string): readonly Step[] {
	return text
		.split(' ')
		.map((step) => ({ question: step.slice(0, 2) as QuestionId, answer: step.endsWith('+') }));
}

/** The answers that lead to each leaf (inference, section 2), first question first. */
export const PATHS: Readonly<Record<Leaf, readonly Step[]>> = {
	'1': path('q1-'),
	'2': path('q1+ q2+ q3- q4-'),
	'2-1': path('q1+ q2+ q3- q4+ q5-'),
	'2-1-2': path('q1+ q2+ q3- q4+ q5+'),
	'1-2-1': path('q1+ q2- q6+'),
	'1-2-1-2': path('q1+ q2- q6- q7+'),
	'1-2': path('q1+ q2- q6- q7-'),
	'3': path('q1+ q2+ q3+ q8-'),
	'3-1': path('q1+ q2+ q3+ q8+ q9+'),
	'3-2': path('q1+ q2+ q3+ q8+ q9-')
};

/** For each question the leaves whose path asks it, with the answer. */
const LEAVES_OF = Object.fromEntries(
	QUESTION_IDS.map((id) => [
		id,
		LEAVES.flatMap((leaf) =>
			PATHS[leaf].filter(({ question }) => question === id).map(({ answer }) => ({ leaf, answer }))
		)
	])
) as Record<QuestionId, { leaf: Leaf; answer: boolean }[]>;

/**
 * Exact probability of every leaf from the probability of a yes to each question: the product along its path, since
 * questions are independent a posteriori. The ten sum to 1.
 *
 * @param yes probability of a yes, 0 to 1, for each question; for a new patient the predictive mean
 */
export function leafMeans(yes: Readonly<Record<QuestionId, number>>): LeafWeights {
	const probability = (leaf: Leaf) =>
		PATHS[leaf].reduce(
			(product, { question, answer }) => product * (answer ? yes[question] : 1 - yes[question]),
			1
		);
	return Object.fromEntries(LEAVES.map((leaf) => [leaf, probability(leaf)])) as LeafWeights;
}

/**
 * How many of the roots counted by leaf were asked a question, and how many of them say yes.
 *
 * @param counts roots at each leaf; a leaf not mentioned has none
 */
export function answersFromLeaves(
	counts: ReadonlyMap<Leaf, number>,
	question: QuestionId
): { events: number; total: number } {
	let events = 0;
	let total = 0;
	for (const { leaf, answer } of LEAVES_OF[question]) {
		const count = counts.get(leaf) ?? 0;
		total += count;
		if (answer) events += count;
	}
	return { events, total };
}
