import { count } from './format';

const tenth = new Intl.NumberFormat('en', { maximumFractionDigits: 1 });

/** What the checks of an entry say (lib/entry/checks.ts). */
export const checks = {
	required: {
		source: 'Name the source the figures come from.',
		locator:
			'Say where in the source the figures stand, such as “table 3” or “p. 412”: without it nobody can check them.',
		scope: 'Say which teeth or roots the total counts; “all” if it counts all that were examined.',
		subgroup: 'Say which part of the sample this is; “all” for the whole of it.'
	},
	tooLong: (most: number) => `This is too long: at most ${most} characters.`,
	unknownSource: (id: string) => `The table has no source ${id}. Add the source first.`,
	unknownTooth: 'Choose a tooth from the list.',
	pooledTeeth:
		'No tooth: the source pools several kinds of teeth, so the figures speak for no single one and enter no estimate.',
	root: (list: readonly string[]) => `Choose a root: ${list.join(', ')}.`,
	unusualRoot: 'The product gives no estimates for this root of this tooth; the entry is kept and shown.',
	method: (list: readonly string[]) => `Choose a method: ${list.join(', ')}.`,
	measure: (list: readonly string[]) => `Choose what the figures count: ${list.join(', ')}.`,
	provenance: (list: readonly string[]) => `Say how the figures came here: ${list.join(', ')}.`,
	memory:
		'From memory: shown as unverified, and in no estimate until somebody has confirmed it against the source.',
	country:
		'Write countries as three capital letters (ISO 3166 alpha-3), several joined by +, such as BRA or BRA+TUR; “multi” for a pooled review.',
	noCountry: 'No country: the entry passes no filter on countries.',
	wholeNumber: 'Write a whole number in digits alone, such as 1234.',
	zeroTotal: 'The total cannot be zero.',
	noTotal: 'No total: the figures are shown and enter no estimate.',
	percentage: 'Write a percentage from 0 to 100, such as 63.4.',
	noFigures: 'Give at least one category with its figure.',
	tooManyFigures: (most: number) => `At most ${most} categories.`,
	noCategory: 'Name the category.',
	twice: (category: string) => `The category ${category} stands here twice.`,
	orOther: 'Write “other” for classes that the source does not name.',
	feature: 'Write a feature in small letters and hyphens, such as c-shape.',
	joining: 'Write joined or separate.',
	counted: 'Write a number from 1 to 9, or such as 2+ for two or more.',
	noNumber: 'Give a count, a percentage, or both.',
	aboveTotal: 'The count is larger than the total.',
	countDerived: (worked: number, percent: number, total: number) =>
		`${count(worked)}, worked out: ${percent} % of ${count(total)}. It will be marked as worked out.`,
	percentDerived: (share: number, number: number, total: number) =>
		`${tenth.format(share)} %, worked out from ${count(number)} of ${count(total)}.`,
	percentUnfit: (share: number, percent: number) =>
		`The count makes ${tenth.format(share)} %, not ${percent} %. Check which of the two the source means.`,
	sumAbove: (sum: number, total: number) =>
		`The categories sum to ${count(sum)}, more than the total of ${count(total)}. Such a table contradicts itself and enters few questions.`,
	sumBelow: (sum: number, total: number) =>
		`The categories sum to ${count(sum)} of ${count(total)}; ${count(total - sum)} are in none. A table this incomplete may enter only some questions.`,
	sumRounded: (sum: number, total: number) =>
		`The categories sum to ${count(sum)} of ${count(total)}, which rounding explains.`,
	newClass: (sequence: string) =>
		`No published entry of this root has ever shown ${sequence}. Check that it is not a slip.`,
	sameSample: (id: number) =>
		`The same sample stands in entry ${id} already, with figures for the same measure.`
};
