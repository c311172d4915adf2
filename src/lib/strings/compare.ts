import { inWords } from './format';

const points = (difference: number) => {
	const whole = Math.round(Math.abs(difference) * 100);
	return whole === 1 ? '1 point' : `${whole} points`;
};
const signed = (difference: number) => {
	const whole = Math.round(difference * 100);
	return whole > 0 ? `+${whole}` : whole < 0 ? `−${Math.abs(whole)}` : '0';
};

/** Words of the page that sets two roots, or two choices of samples, beside each other. */
export const compare = {
	title: 'Compare',
	lead: 'Two roots, or two choices of the samples of one root, side by side. Points are percentage points.',
	placeName: (tooth: string, rootName: string) => `${tooth}, ${rootName.toLowerCase()}`,
	methodPair: 'CBCT against clearing, this root',
	allSamples: 'All samples of this root',
	sides: { a: 'First', b: 'Second' },
	place: 'Root',
	narrow: 'Narrow the samples',
	show: 'Compare',
	swap: 'Swap the two',
	same: 'Both sides are the same: choose another root or other samples on one of them.',
	unknownPlace: 'Choose a root of the list.',
	openRoot: 'Open this root',
	samplesOf: (narrowed: boolean) => (narrowed ? 'some samples' : 'all samples'),
	drawings: 'The drawings, to one scale',
	drawingsNote: 'A millimetre is as long in one drawing as in the other.',
	sequences: 'Canal sequences, in a new population',
	sequence: 'Sequence',
	fates: 'What becomes of the canals',
	questions: 'Question by question',
	questionsNote:
		'The middle is the average population; the next is a new one, from which a patient comes. A difference is named only where its 95 % range leaves out 0.',
	question: 'Question',
	middle: 'Middle population',
	next: 'New population',
	verdict: 'What can be said',
	borrowed: 'borrowed: no sample',
	samples: (number: number) => `${number} ${number === 1 ? 'sample' : 'samples'}`,
	noComparison:
		'Nothing: one side or both have no sample of their own here, and borrowed figures are no evidence of a difference.',
	sharedSources: (shared: number) =>
		`${shared === 1 ? 'One source answers' : `${shared} sources answer`} on both sides, so the two are not independent.`,
	differs: (side: string, mean: number, [from, to]: readonly [number, number]) =>
		`On average more often yes on the ${side} side: by ${points(mean)} (range ${signed(from)} to ${signed(to)}).`,
	open: (mean: number, [from, to]: readonly [number, number]) =>
		`No difference shown on average: ${signed(mean)} points, first less second, with a range of ${signed(from)} to ${signed(to)}, which includes 0.`,
	chance: (side: string, probability: number, overlap: boolean) =>
		`For a new population of each, the ${side} side is the higher one in ${inWords(probability)} pairs; the two ranges ${overlap ? 'overlap' : 'do not overlap'}.`,
	either: (overlap: boolean) =>
		`For a new population of each, either side may be the higher one, about as often; the two ranges ${overlap ? 'overlap' : 'do not overlap'}.`,
	overlapNote:
		'The two sides are one root: where they share samples, read this as what the choice of samples changes, not as two groups.',
	sideName: { a: 'first', b: 'second' },
	noEvidence: 'No evidence: every figure of this side is borrowed from other roots.'
};
