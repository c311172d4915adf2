import { mm } from './format';

/** Words of the page of a tooth. */
export const tooth = {
	numbers: 'Numbers',
	roots: 'Roots',
	rootsNote: 'Choose a root to see what canals to expect in it and why.',
	premolarNote:
		'Before you know how many roots there are, look at the whole tooth. With one root, look at the single root; with two, each root is a root of its own, and nothing joins between them.',
	moreThanOne: 'More than one canal',
	meet: 'The canals come together somewhere',
	noEvidence:
		'No evidence: no sample of this root answers any question. The figures shown are borrowed from other roots.',
	openRoot: 'What to expect, and why',
	openJoin: 'Do they join?',
	inOthers: (range: string) => `in other populations ${range}`,
	rootCounts: 'Number of roots',
	canalCounts: 'Number of canals in the tooth',
	countsNote: 'Samples of all such teeth, largest first. Shown as counted, not pooled.',
	countsEmpty: 'No sample of all such teeth is in the table.',
	sample: 'Sample',
	place: 'Place',
	teeth: 'Teeth',
	counted: 'Counted',
	countOf: (category: string, share: string) => `${category}: ${share}`,
	showAll: (count: number) => `Show all ${count} samples`,
	features: 'What else to look for',
	featuresNote:
		'How often a feature is there: the range in which a new population is expected (95 %), from the samples named.',
	featuresEmpty: 'No sample of all such teeth reports a feature.',
	feature: 'Feature',
	expected: 'In a new population',
	samples: (count: number) => `${count} ${count === 1 ? 'sample' : 'samples'}`,
	lengths: 'Lengths',
	lengthsNote:
		'Published means and ranges, each from its own sample; working length is measured in the patient.',
	lengthsEmpty: 'No length of this tooth is in the table.',
	quantities: {
		'tooth-length': 'Whole tooth',
		'root-length': 'Root',
		'crown-length': 'Crown',
		'working-length': 'Working length'
	} as Record<string, string>,
	quantity: 'Length',
	value: 'Mean (spread)',
	sdOf: (sd: number) => `sd ${mm(sd)}`,
	unverified: 'unverified: recalled, not yet checked against the source',
	cautionsTitle: 'Cautions',
	cautions: [
		'A probability from published samples is not a finding in this patient. Image when in doubt; follow local imaging guidance.',
		'Published samples come from populations and methods of their own: open them before you lean on a figure.'
	]
};
