/**
 * Short questions of our own about how a source was made, in four domains. They follow what two published tools ask for, without taking
 * over their wording: AQUA (Henry and others 2017; five domains, of which the page of the tool was read and the paper is cited from memory)
 * and PROUD 2020 (Ahmed and Rossi-Fedele 2020; three domains, read in its abstract). Words stand in strings/appraisal.ts.
 */
import type { AppraisalAnswer, AppraisalGrade } from './terms';

export const APPRAISAL_DOMAINS = {
	sample: ['sample-origin', 'sample-choice', 'sample-size'],
	method: ['method-described', 'method-resolution', 'method-classes'],
	agreement: ['agreement-observers', 'agreement-figure'],
	completeness: ['completeness-all', 'completeness-counts', 'completeness-sums']
} as const;

export type AppraisalDomain = keyof typeof APPRAISAL_DOMAINS;
export type AppraisalQuestion = (typeof APPRAISAL_DOMAINS)[AppraisalDomain][number];
export type AppraisalAnswers = Record<AppraisalQuestion, AppraisalAnswer>;
export type AppraisalProfile = Record<AppraisalDomain, AppraisalGrade>;

export const DOMAINS = Object.keys(APPRAISAL_DOMAINS) as AppraisalDomain[];
export const QUESTIONS: readonly AppraisalQuestion[] = DOMAINS.flatMap((domain) => [
	...APPRAISAL_DOMAINS[domain]
]);

const ORDER: readonly AppraisalGrade[] = ['low', 'some', 'high'];
const worst = (grades: readonly AppraisalGrade[]): AppraisalGrade =>
	grades.reduce((most, grade) => (ORDER.indexOf(grade) > ORDER.indexOf(most) ? grade : most), 'low');

/** Concern that one answer leaves: a yes none, a no much, and what is done in part or not said something in between. */
const concernOf = (answer: AppraisalAnswer): AppraisalGrade =>
	answer === 'yes' ? 'low' : answer === 'no' ? 'high' : 'some';

/** The concern of each domain: that of its worst answer. A sum would let a good sample make up for figures that do not add up. */
export function profileOf(answers: AppraisalAnswers): AppraisalProfile {
	const grades = DOMAINS.map((domain) => [
		domain,
		worst(APPRAISAL_DOMAINS[domain].map((question) => concernOf(answers[question])))
	]);
	return Object.fromEntries(grades) as AppraisalProfile;
}

/** The concern of a source: that of its worst domain. */
export const gradeOf = (answers: AppraisalAnswers): AppraisalGrade =>
	worst(Object.values(profileOf(answers)));

/** Whether an appraisal, or its absence, passes a filter. */
export function passesAppraisal(grade: AppraisalGrade | null, filter: 'any' | AppraisalGrade): boolean {
	if (grade === null) return false;
	return filter === 'any' || ORDER.indexOf(grade) <= ORDER.indexOf(filter);
}
