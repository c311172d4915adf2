/** Words of the page that works out whether canals join. */
export const join = {
	title: 'Do they join?',
	lead: 'Say what you found. Each finding is a likelihood, never a verdict; the account shows what each one changed.',
	formTitle: 'What was found',
	canals: 'Canals negotiated in this root',
	canalsNamed: (number: number, names: string) =>
		number === 1 ? 'One' : `${number === 2 ? 'Two' : 'Three'} (${names})`,
	search: 'How the root was searched for more',
	searchHint: 'A search that misses easily proves little.',
	notStated: 'Not stated',
	orifices: 'Orifices seen',
	rootsSeen: 'Roots seen',
	rootsSeenOptions: { '': 'Not known yet', one: 'One root', two: 'Two roots' },
	twoRootsLinks: 'With two roots, each is a root of its own and nothing joins between them. Open:',
	findings: 'Tests of whether two canals join',
	findingsHint: 'Leave out what you have not done. The order does not matter to the result.',
	notDone: 'Not done',
	unclear: 'Unclear',
	pair: 'Which two canals',
	choosePair: 'Choose two canals',
	submit: 'Work it out',
	startAgain: 'Start again',
	waiting: 'Say how many canals you have negotiated; the answer appears here.',
	answerTitle: 'How probable it is',
	answerFor: (canals: number) =>
		canals === 1 ? 'with one canal negotiated' : `with ${canals} canals negotiated`,
	meet: 'The canals meet somewhere',
	before: (value: string) => `Before these findings: ${value}.`,
	fates: 'What becomes of the canals',
	drawing: 'Sequences still possible',
	drawingLabel: (place: string) => `Canal sequences still possible: ${place}`,
	hidden: 'Another canal is still hidden',
	hiddenUnknown: 'Whether a fourth canal is there, the table cannot say.',
	exits: 'Number of exits',
	exitsNamed: (count: number) => `${count} ${count === 1 ? 'exit' : 'exits'}`,
	accountTitle: 'The account, step by step',
	step: 'Step',
	start: 'Canals and search alone',
	advice: {
		title: 'What it means',
		'treat-as-joined':
			'Treat as joined: the canals share one exit with at least the probability you ask for.',
		'treat-as-separate': 'Treat as separate: shape, clean and fill each canal to its own full length.',
		undecided: 'Undecided: plan as separate, and see below what would settle it.',
		none: 'No advice: with one canal there is nothing to join.',
		noEvidence: 'No advice: there is no evidence on this root.',
		threshold: (percent: string) =>
			`The line is at ${percent} for a shared exit. It leans towards separate on purpose: shortening a separate canal leaves it unfilled, the worse mistake.`,
		assumedRule:
			'Findings whose accuracy is assumed must still carry the advice when their weight is halved (the square root of their likelihood ratio).',
		heldBack:
			'A shared exit is more probable than the line asks for, but this rests on findings whose accuracy is assumed, not published: with their weight halved the line is not reached.',
		settled: 'Further testing will not change what you do.',
		open: 'A further test could change this.'
	},
	thresholdLabel: 'Treat as joined from',
	nextTitle: 'What would settle it',
	nextNote:
		'Tests not yet made, the most telling first. Bits: the information expected about what becomes of the canals. Effort and radiation are common practice, no source.',
	nextNone: 'Every test has been entered.',
	bits: (bits: string) => `${bits} bits`,
	effort: { low: 'little effort', medium: 'some effort', high: 'much effort' } as Record<string, string>,
	ifResult: (result: string, probability: string, sharedExit: string) =>
		`${result} (probability ${probability}): shared exit ${sharedExit}`,
	test: 'Test',
	information: 'Tells',
	afterwards: 'What each result would leave',
	assumedTitle: 'Assumed, not published',
	assumed: (names: string) =>
		`No accuracy was ever published for: ${names}. The figures used for them are assumptions of the editors.`,
	assumedNames: { isthmus: 'how often an isthmus is there' } as Record<string, string>,
	searchNamed: (name: string) => `search by ${name.toLowerCase()}`,
	notesTitle: 'How this was worked out',
	borrowed: (count: number) =>
		`${count} of the nine questions behind this answer ${count === 1 ? 'has' : 'have'} no sample of this root: their figures are borrowed from other roots.`,
	evidence: (count: number) => `From ${count} ${count === 1 ? 'source' : 'sources'} on this root.`,
	openEvidence: 'Open the samples',
	revision: (number: number) => `Table revision ${number}.`,
	errorTitle: 'This cannot be answered yet',
	wholeError: 'Something is missing or does not fit together: see the field marked beside it.'
};
