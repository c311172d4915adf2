/** What the product is for and what it is not: the statement of intended use. */
export const about = {
	title: 'What this is and is not',
	lead: 'Watersmeet looks up what the literature says of root canals and weighs what you found against it. It does not look at your patient.',
	sections: [
		{
			title: 'For whom',
			points: [
				'Dentists who treat root canals, before they open a tooth and at the chair.',
				'Educators who keep and teach the evidence, and students who train their judgement on it.',
				'Not for patients, and not for use without a professional licence or the supervision of somebody who holds one.'
			]
		},
		{
			title: 'For what',
			points: [
				'To see which canals to expect in a root, in how many patients of other populations, found by whom and how.',
				'To work out how probable it is that two canals of a root join, given what was found, and how far literature and tests leave that open.',
				'To open the samples behind each figure: source, place in the source, method, country.'
			]
		},
		{
			title: 'Limits',
			points: [
				'A probability from published samples is not a finding in this patient. Populations differ, often by more than any single study shows: the ranges say by how much.',
				'Many samples are small, many methods miss canals, and the table holds only what has been gathered so far. What is missing is not shown as zero: it says “no evidence”, or borrows from other roots and says so.',
				'The accuracy of most chairside tests was never published. Such values are assumptions of the editors and are marked “assumed” wherever they are used.',
				'Figures recalled but not yet checked against their source are marked “unverified” and never enter an estimate.',
				'Findings are taken as independent of each other, given what the canals do. Two tests that err for the same reason say less than the product credits them with.'
			]
		},
		{
			title: 'Not a substitute',
			points: [
				'It replaces neither imaging nor judgement. Image when in doubt, and follow local guidance on CBCT and dose.',
				'Filling a separate canal short leaves it unfilled: with doubt, treat as separate.',
				'Local protocols, the instructions of manufacturers and your licence come first.'
			]
		},
		{
			title: 'What it keeps',
			points: [
				'No patient identity belongs here: no names, no dates of birth, no numbers that identify.',
				'Without an account nothing you enter is stored. The state of an estimate stands in its address, and your preferences in one cookie on your device.'
			]
		}
	]
};
