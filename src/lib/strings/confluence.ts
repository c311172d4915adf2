import type { Fate } from '$lib/anatomy/sequence';
import type { RESULTS, SEARCHES, TESTS } from '$lib/schemas/terms';

type Test = (typeof TESTS)[number];
type Result = (typeof RESULTS)[number];
type Search = (typeof SEARCHES)[number];

const tests: Record<Test, { name: string; how: string; positive: string; negative: string }> = {
	'cone-mark': {
		name: 'Cone mark',
		how: 'A cone to length in one canal, a size 10 or 15 file to length in the other. Take the cone out and turn its tip under magnification.',
		positive: 'a groove, nick or pierce',
		negative: 'no mark'
	},
	draw: {
		name: 'Draw test',
		how: 'Draw irrigant from one canal and watch its level in the other. Fluid crosses an isthmus too, so a fall alone says little.',
		positive: 'the level falls',
		negative: 'the level stays'
	},
	'file-contact': {
		name: 'File contact',
		how: 'A file at length in each canal; touching metal shows on an electronic apex locator.',
		positive: 'electrical contact',
		negative: 'no contact'
	},
	'two-files': {
		name: 'Two files together',
		how: 'Can both files stand at full length at the same time?',
		positive: 'only one at a time',
		negative: 'both at length'
	},
	'angled-radiograph': {
		name: 'Angled radiograph',
		how: 'Read a radiograph from an angle. Overlap misleads.',
		positive: 'seem to run together',
		negative: 'seem separate'
	},
	'cbct-reading': {
		name: 'CBCT reading',
		how: 'Follow both canals through the sections of a CBCT that you already have.',
		positive: 'read as joined',
		negative: 'read as separate'
	}
};

const fates: Record<Fate, { name: string; meaning: string }> = {
	'one-canal': { name: 'One canal', meaning: 'There is only one canal in this root.' },
	'shared-exit': {
		name: 'Meet and share one exit',
		meaning: 'The canals come together and end in one exit.'
	},
	'meet-and-part': {
		name: 'Meet, then part again',
		meaning: 'They come together and end apart: each needs its full length.'
	},
	'partly-shared': {
		name: 'Meet in part, share some exits',
		meaning: 'Some come together; fewer exits than canals, but more than one.'
	},
	separate: { name: 'Stay separate', meaning: 'Once apart, they never come together.' }
};

/** Words of the estimator: its page and the sentences of its answer. */
export const confluence = {
	tests,
	fates,
	searches: {
		unaided: 'Naked eye',
		loupes: 'Loupes',
		microscope: 'Microscope, no troughing',
		'microscope-troughing': 'Microscope with troughing',
		cbct: 'CBCT'
	} satisfies Record<Search, string>,
	results: { positive: 'Positive', negative: 'Negative', unclear: 'Unclear' } satisfies Record<
		Result,
		string
	>,
	risks: { none: 'no radiation', radiation: 'radiation: follow local imaging guidance' },
	notes: {
		independent: 'Findings are taken as independent of each other, given what the canals do.',
		superseded: (test: Test, by: Test) =>
			`${tests[test].name} and ${tests[by].name.toLowerCase()} rest on the same mechanism: only ${tests[by].name.toLowerCase()}, which tells more, is counted.`,
		threeCanals: 'With three canals the answer is about the root as a whole, whichever pair was tested.',
		fourthCanal: 'The table cannot say whether a fourth canal is there.',
		noEvidence:
			'No evidence: no sample of this root answers any question. The figures are borrowed from other roots, and no advice is given.'
	},
	cautions: {
		joiningNotStudied:
			'No sample of the table studied whether the canals of this root meet. That part is borrowed from other roots, so the answer rests on those and on your tests. Do not shorten a canal on it alone: first see that the exits are one.',
		meetAndPartSeen: (share: string) =>
			`A sample saw canals that meet and part again in up to ${share} of these roots, more than the range given here. It does not report every class, so it could not be pooled for this one. See that the exits are one before you shorten a canal.`,
		one: [
			'A probability from published samples is not a finding in this patient. Image when in doubt; follow local imaging guidance.'
		],
		joining: [
			'A probability from published samples is not a finding in this patient. Image when in doubt; follow local imaging guidance.',
			'Filling a separate canal short leaves it unfilled: with doubt, treat as separate.',
			'Canals that meet and part again have more than one exit: each needs its full length. Until the exits are shown to be one, do not shorten.'
		]
	}
};
