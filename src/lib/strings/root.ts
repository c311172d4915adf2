import type { StudySort } from '$lib/schemas/terms';
import { count } from './format';

/** Words of the page of a root. */
export const root = {
	expectTitle: 'What to expect',
	of: (tooth: string) => `of the ${tooth.toLowerCase()}`,
	evidence: (studies: number, roots: number) =>
		`From ${count(studies)} ${studies === 1 ? 'source' : 'sources'} and about ${count(roots)} roots.`,
	fewSamples: (number: number) =>
		`The headline rests on ${number === 1 ? 'one sample' : `${number} samples`} only: open it before you lean on it.`,
	seeWhole: 'Look at the whole tooth instead, for which there are samples',
	noEvidence:
		'No evidence: no sample of this root answers any question. Every figure here is borrowed from other roots, and no advice is given.',
	noEvidenceShort: 'No evidence',
	drawingLabel: (tooth: string, rootName: string) =>
		`Canal sequences to expect: ${tooth}, ${rootName.toLowerCase()}`,
	drawingText: (likely: string) => `The most probable sequences, from orifice to exit: ${likely}.`,
	shapeFrom: 'Drawn with:',
	lengthFrom: 'length from',
	levelFrom: 'level of the confluence from',
	outside: (number: number) =>
		`${number === 1 ? 'One sequence was' : `${number} sequences were`} seen more or less often in some sample than the range says. Such samples are mostly partial tables, which cannot answer every question below and are not pooled there; read the range with that in mind.`,
	outsideMark: 'outside the range',
	sequencesTitle: 'Sequences, with their class names',
	sequence: 'Sequence',
	classes: 'Class',
	fate: 'What becomes of the canals',
	probability: 'In a new population (95 %)',
	observed: 'Seen in samples',
	observedRange: (range: string, studies: number) =>
		`${range} in ${studies} ${studies === 1 ? 'sample' : 'samples'}`,
	notObserved: 'not named by a sample',
	vertucci: (name: string) => `Vertucci ${name}`,
	weine: (name: string) => `Weine ${name}`,
	sertBayirli: (name: string) => `Sert and Bayirli ${name}`,
	rareNote:
		'A rare sequence is counted with the one that starts and ends alike; the samples keep its own name.',
	fatesTitle: 'What becomes of the canals',
	countsTitle: 'Orifices and exits',
	orifices: 'Orifices',
	exits: 'Exits',
	joinLink: 'Two canals found? Work out whether they join',
	questionsTitle: 'Why: the questions and the samples behind them',
	questionsNote:
		'The distribution above is made of nine yes/no questions. Each is pooled over the samples that answer it; open one to see them. “A new population” is where the next patient comes from, so its range is the honest one.',
	borrowed: 'borrowed from other roots: no sample here',
	byMethod: 'shown by method: the figures are those of CBCT',
	offsetsTitle: 'Offsets against CBCT (logit scale)',
	groups: {
		laboratory: 'micro-CT, clearing, sectioning',
		clinical: 'clinic, microscope',
		radiograph: 'radiograph'
	} as Record<string, string>,
	offset: (group: string, mean: string, from: string, to: string, studies: number) =>
		`${group}: ${mean} (${from} to ${to}), ${studies} ${studies === 1 ? 'sample' : 'samples'}`,
	scores: (plain: string, method: string) =>
		`Log score of left-out samples (nearer to 0 is better): ${plain} plain, ${method} by method`,
	coverage: (samples: number, inside95: string, inside80: string) =>
		`Of ${samples} samples left out in turn, ${inside95} fell into their 95 % range and ${inside80} into their 80 % range`,
	coverageFlag: 'This question covers too little: do not lean on its range.',
	coverageTitle: 'How far to trust these ranges',
	coveragePending: 'Being worked out: load the page again in a moment.',
	coverageNone: 'No question of this root has three samples, so none can be left out and predicted.',
	coverageMore: 'How this is measured',
	samples: (number: number) => `${number} ${number === 1 ? 'sample' : 'samples'}`,
	middle: 'Middle population',
	spread: (tau: string) => `Spread between populations (tau, logit scale): ${tau}`,
	observedAll: (range: string) => `Seen in samples: ${range}`,
	reviewsTitle: 'Published reviews, beside the pooled values',
	reviewsNote: 'Reviews pool studies of their own; they are compared, never pooled again.',
	review: 'Review',
	question: 'Question',
	share: 'Share',
	notPooledTitle: (number: number) =>
		`Not pooled: ${number} ${number === 1 ? 'entry' : 'entries'}, with the reason`,
	notPooledNote: 'Shown so that nothing is hidden. An editor may complete or confirm them.',
	source: 'Source',
	entry: 'Entry',
	reason: 'Why it is not pooled',
	featuresTitle: 'Features of this root',
	filters: {
		title: 'Narrow the samples',
		method: 'How it was seen',
		country: 'Country',
		anyCountry: 'Any country',
		years: 'Published from',
		yearTo: 'up to',
		minTotal: 'At least so many roots or teeth',
		exclude: 'Sources to leave out',
		apply: 'Narrow',
		clear: 'Take all samples',
		active: 'Only some samples are taken: the figures below are for these.',
		wrong: 'These filters could not be used, so the figures below are for all samples:'
	},
	change: {
		title: 'What the filters changed',
		figure: 'Figure',
		all: 'All samples',
		taken: 'Samples taken',
		sources: 'Sources',
		roots: 'Roots, about',
		samplesOf: (question: string) => `Samples on: ${question}`,
		nothing: 'No sample of this root is left: every figure on the right is borrowed from other roots.',
		note: 'In a new population, with its 95 % range. Where fewer samples are left, the ranges widen and other roots count for more.'
	},
	order: {
		title: 'Order of the samples',
		sorts: {
			share: 'highest share first',
			year: 'newest first',
			size: 'largest first',
			weight: 'heaviest first',
			source: 'by source',
			country: 'by country'
		} satisfies Record<StudySort, string>,
		group: 'Methods apart',
		apply: 'Put in order'
	},
	borrowedShare: (share: string) =>
		`Besides the samples, what other roots lend makes up ${share} of the information about the middle population`,
	rareTitle: 'Also named by samples',
	countedWith: (leaf: string) => `counted with ${leaf}`,
	noOwn: 'none of its own',
	downloads: {
		title: 'Take it with you',
		csv: 'Samples and estimates (CSV)',
		json: 'The whole answer (JSON)',
		svg: 'Drawing (SVG)',
		png: 'Drawing (PNG)',
		failed: 'The picture could not be made: take the SVG instead.',
		note: 'Each holds the filters and the revision of the table it was made from.'
	},
	compareTitle: 'Compare with',
	methods: {
		'micro-ct': 'micro-CT',
		clearing: 'clearing',
		sectioning: 'sectioning',
		cbct: 'CBCT',
		microscope: 'microscope',
		clinical: 'clinical',
		mixed: 'mixed methods',
		radiograph: 'radiograph',
		review: 'review'
	} as Record<string, string>
};
