import type { AppraisalDomain, AppraisalQuestion } from '$lib/schemas/appraisal';
import type { AppraisalAnswer, AppraisalGrade } from '$lib/schemas/terms';

/** Words of appraising a source. The questions are this product's own. */
export const appraisal = {
	title: 'Appraisal',
	lead: 'How the source was made, as far as it says. An answer that is not a yes leaves a concern; a domain has that of its worst answer.',
	basis:
		'The domains follow two published tools: AQUA for anatomical studies (Henry and others 2017, Clinical Anatomy; five domains; the paper is cited from memory, the page of the tool was read) and PROUD 2020 for studies of root and canal anatomy (Ahmed and Rossi-Fedele 2020, European Endodontic Journal 5(3):159–176; sample selection, methodological procedures, detection and evaluation; read in its abstract). The questions and the marks are our own.',
	none: 'Not appraised yet.',
	note: 'Remarks',
	save: 'Save the appraisal',
	saved: 'Appraised.',
	why: 'Appraised.',
	domains: {
		sample: 'Sample',
		method: 'Method',
		agreement: 'Agreement of observers',
		completeness: 'Completeness'
	} satisfies Record<AppraisalDomain, string>,
	follows: {
		sample: 'AQUA: objectives and subject characteristics; study design. PROUD 2020: sample selection.',
		method: 'AQUA: methodology characterization. PROUD 2020: methodological procedures.',
		agreement: 'AQUA: descriptive anatomy. PROUD 2020: detection and evaluation.',
		completeness: 'AQUA: reporting of results.'
	} satisfies Record<AppraisalDomain, string>,
	questions: {
		'sample-origin': 'Is it said where the teeth come from: country, period, age and sex?',
		'sample-choice': 'Were the teeth taken without regard to the anatomy that was looked for?',
		'sample-size': 'Is the number of teeth or roots given for each kind of tooth, with a reason for it?',
		'method-described': 'Could the method be repeated from its description?',
		'method-resolution': 'Can the method show what was counted (voxel size, staining, magnification)?',
		'method-classes': 'Is it said how classes were told apart, with a named scheme or pictures?',
		'agreement-observers': 'Did at least two observers read, or one twice, without knowing the first result?',
		'agreement-figure': 'Is their agreement given as a figure, and is it good?',
		'completeness-all': 'Are all teeth accounted for, left-out ones too?',
		'completeness-counts': 'Are counts given, not percentages alone?',
		'completeness-sums': 'Do the figures add up?'
	} satisfies Record<AppraisalQuestion, string>,
	answers: { yes: 'Yes', partly: 'In part', no: 'No', unclear: 'Not said' } satisfies Record<
		AppraisalAnswer,
		string
	>,
	grades: { low: 'low concern', some: 'some concern', high: 'high concern' } satisfies Record<
		AppraisalGrade,
		string
	>,
	inShort: (parts: string) => `Appraisal: ${parts}`
};
