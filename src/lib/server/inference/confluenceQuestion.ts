import type { RESULTS, SEARCHES, TESTS } from '$lib/schemas/terms';
import { LEAVES, leafFacts } from '$lib/anatomy/sequence';
import type { Leaf } from '$lib/anatomy/sequence';

export type Test = (typeof TESTS)[number];
export type Result = (typeof RESULTS)[number];
/** How the root was searched for further canals. */
type Search = (typeof SEARCHES)[number];

/** One test of two canals and what it showed. */
export interface Finding {
	test: Test;
	result: Result;
	/** The two canals tested, e.g. 'MB-ML'; needed with three canals. */
	pair?: string;
}

/** What a person says of one root. */
export interface ConfluenceQuestion {
	/** Canals negotiated. */
	canals: number;
	/** Orifices seen, if stated. */
	orifices?: number;
	search?: Search;
	/** Probability of one exit from which the second canal is planned as joined; 0.90 unless stated. */
	threshold?: number;
	findings: Finding[];
}

/** A field of a question that cannot be answered, and why. */
interface QuestionProblem {
	/** The field, in the notation of the API: `canals`, `findings.1.test`. */
	path: string;
	message: string;
}

/** Most canals side by side that the table's leaves tell apart. */
export const MOST_CANALS = Math.max(...LEAVES.map((leaf) => leafFacts(leaf).width));

/** The canals known to be there: f = max(canals negotiated, orifices seen). */
export function canalsKnown(question: Pick<ConfluenceQuestion, 'canals' | 'orifices'>): number {
	return Math.max(question.canals, question.orifices ?? 0);
}

/**
 * The leaves that the canals and orifices leave possible (inference, section 3): width w ≥ f, and with o
 * orifices stated a start a with o ≤ a ≤ o + (w - f); the orifices say nothing more once f ≥ 3.
 */
export function possibleLeaves(question: Pick<ConfluenceQuestion, 'canals' | 'orifices'>): Leaf[] {
	const known = canalsKnown(question);
	const { orifices } = question;
	return LEAVES.filter((leaf) => {
		const { width, orifices: start } = leafFacts(leaf);
		if (width < known) return false;
		if (orifices === undefined || known >= MOST_CANALS) return true;
		return orifices <= start && start <= orifices + (width - known);
	});
}

/** Two different canal names joined by a hyphen, such as 'MB-ML'. */
function namesPair(pair: string | undefined): boolean {
	const names = (pair ?? '').split('-').map((name) => name.trim());
	return names.length === 2 && names.every((name) => name !== '') && names[0] !== names[1];
}

function findingProblems(question: ConfluenceQuestion): QuestionProblem[] {
	const problems: QuestionProblem[] = [];
	const seen = new Set<Test>();
	question.findings.forEach(({ test, pair }, index) => {
		const path = `findings.${index}.test`;
		if (seen.has(test)) problems.push({ path, message: `${test} is entered more than once.` });
		seen.add(test);
		if (question.canals === 1) {
			problems.push({ path, message: `${test} needs two canals; only one is negotiated.` });
		} else if (question.canals === 3 && !namesPair(pair)) {
			problems.push({
				path: `findings.${index}.pair`,
				message: 'With three canals, name the two that were tested, for example MB-ML.'
			});
		}
	});
	return problems;
}

/**
 * What is wrong with a question, apart from the shapes that its schema already checks: canals outside
 * 1 … 3, orifices that no sequence fits, a test entered twice, a joining test with one canal, a pair not
 * named with three canals, a threshold outside [0.5, 1] (below a half "joined" and "separate" would overlap).
 * @returns one entry for each field at fault; empty when the question can be answered
 */
export function validateQuestion(question: ConfluenceQuestion): QuestionProblem[] {
	const problems: QuestionProblem[] = [];
	const { canals, orifices, threshold } = question;
	if (!Number.isInteger(canals) || canals < 1 || canals > MOST_CANALS) {
		problems.push({ path: 'canals', message: `Canals negotiated must be 1 to ${MOST_CANALS}.` });
	} else if (orifices !== undefined) {
		if (!Number.isInteger(orifices) || orifices < 1) {
			problems.push({ path: 'orifices', message: 'Orifices seen must be a whole number from 1.' });
		} else if (possibleLeaves(question).length === 0) {
			problems.push({
				path: 'orifices',
				message: `No canal sequence of the table fits ${orifices} orifices and ${canals} canals.`
			});
		}
	}
	if (threshold !== undefined && !(threshold >= 0.5 && threshold <= 1)) {
		problems.push({ path: 'threshold', message: 'The threshold must be 0.5 to 1.' });
	}
	problems.push(...findingProblems(question));
	return problems;
}
