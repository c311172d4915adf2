import { mm } from './format';

/** `1 root`, `2 roots`, `2 or more roots` for a category of the evidence files. */
function counted(category: string, one: string, many: string): string {
	if (category.endsWith('+')) return `${category.slice(0, -1)} or more ${many}`;
	return `${category} ${category === '1' ? one : many}`;
}

/** Words of the page of a tooth. */
export const tooth = {
	numbers: 'Numbers',
	roots: 'Roots',
	rootsNote: 'Choose a root to see what canals to expect in it and why.',
	premolarNote:
		'Before you know how many roots there are, look at the whole tooth. With one root, look at the single root; with two, each root is a root of its own, and nothing joins between them.',
	moreThanOne: 'More than one canal',
	severalCanals: (often: string, figure: string) =>
		`More than one canal: ${often}, ${figure} in other populations.`,
	fatesOfAll: (fates: string) => `Of all such roots: ${fates}.`,
	borrowed: 'No sample of this root: the figures are borrowed from other roots.',
	printBrief: 'Print the one-page brief',
	briefTitle: (name: string, numbers: string) => `${name} · ${numbers}`,
	briefFoot: (site: string, revision: number, address: string) =>
		`${site}, table revision ${revision}. Every sample with its source and place: ${address}`,
	largest: (samples: string) => `Largest samples: ${samples}.`,
	lookFor: 'What to look for',
	lookForNote:
		'From the figures on this page, the most frequent first; what rests on one or two samples stands last. The range says how far populations differ; it is not a finding in this patient.',
	lookForEmpty:
		'No figure of the table points to anything beyond one canal in each root. That is a lack of samples as much as a finding: look.',
	secondCanal: (root: string, degree: 'expect' | 'look' | 'uncommon') =>
		`${root}: ${{ expect: 'expect a second canal', look: 'look for a second canal', uncommon: 'a second canal is uncommon' }[degree]}`,
	withRange: (often: string, range: string) => `${often}; in other populations ${range}`,
	restsOn: (samples: number) =>
		samples < 3
			? `from only ${samples === 1 ? 'one sample' : `${samples} samples`}`
			: `from ${samples} samples`,
	noEvidenceShort: 'No evidence:',
	silentOn: (features: string) =>
		`no sample of all such teeth reports ${features}. Absence of samples is not absence.`,
	counts: {
		roots: (category: string) => counted(category, 'root', 'roots'),
		canals: (category: string) => counted(category, 'canal', 'canals')
	},
	middleSample: (middle: string, range: string, samples: number) =>
		samples === 1
			? `${middle}, one sample`
			: `${middle} in the middle sample; ${range} over ${samples} samples`,
	countBrief: (name: string, middle: string, range: string, samples: number) =>
		samples === 1 ? `${name} ${middle} (one sample)` : `${name} ${middle} (${range}, ${samples} samples)`,
	stripNote: (unit: string) =>
		`From 0 to 100 ${unit} of teeth. Each dot is a sample, larger with more teeth; the upright line is the middle sample.`,
	noEvidence:
		'No evidence: no sample of this root answers any question. The figures shown are borrowed from other roots.',
	openRoot: 'What to expect, and why',
	openJoin: 'Do they join?',
	inOthers: (range: string) => `in other populations ${range}`,
	rootCounts: 'Number of roots',
	canalCounts: 'Number of canals in the tooth',
	countsNote: 'Samples of all such teeth, shown as counted, not pooled.',
	countsTable: (count: number) => `The ${count === 1 ? 'sample' : `${count} samples`}, with source and place`,
	countsEmpty: 'No sample of all such teeth is in the table.',
	sample: 'Sample',
	place: 'Place',
	teeth: 'Teeth',
	counted: 'Counted',
	countOf: (category: string, share: string) => `${category}: ${share}`,
	features: 'Features, with their samples',
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
