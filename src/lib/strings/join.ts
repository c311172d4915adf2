import type { Fate } from '$lib/anatomy/sequence';

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
	findingsHint:
		'Leave out what you have not done. The order matters to the account alone, not to the answer.',
	notDone: 'Not done',
	unclear: 'Unclear',
	pair: 'Which two canals',
	choosePair: 'Choose two canals',
	submit: 'Work it out',
	startAgain: 'Start again',
	waiting: 'Say how many canals you have negotiated; the answer appears here.',
	choice: (label: string, detail: string) => (detail === '' ? label : `${label}: ${detail}`),
	undo: 'Undo',
	redo: 'Redo',
	history: 'Undo and redo',
	answerTitle: 'How probable it is',
	answerFor: (canals: number) =>
		canals === 1 ? 'with one canal negotiated' : `with ${canals} canals negotiated`,
	inShort: 'The answer in short',
	shortFates: {
		'one-canal': 'One canal',
		'shared-exit': 'Share one exit',
		'meet-and-part': 'Meet and part',
		'partly-shared': 'Share in part',
		separate: 'Separate'
	} satisfies Record<Fate, string>,
	/** Read out when the answer changes. */
	status: (advice: string, fates: string) => `${advice}. ${fates}.`,
	statusFate: (fate: string, value: string, range: string) => `${fate}: ${value}, ${range}`,
	meet: 'The canals meet somewhere',
	before: (value: string, range: string) => `Before these findings: ${value} (${range}).`,
	fates: 'What becomes of the canals',
	drawing: 'Sequences still possible',
	drawingLabel: (place: string) => `Canal sequences still possible: ${place}`,
	hidden: 'Another canal is still hidden',
	hiddenUnknown: 'Whether a fourth canal is there, the table cannot say.',
	exits: 'Number of exits',
	exitsNamed: (count: number) => `${count} ${count === 1 ? 'exit' : 'exits'}`,
	accountTitle: 'The account, step by step',
	accountNote: 'What each finding left of the possibilities, with the 95 % range.',
	start: 'Canals and search alone',
	because: (meet: string, never: string) =>
		`This result is expected in ${meet} of roots whose canals meet and in ${never} of those whose canals never do.`,
	speaks: {
		for: 'It speaks for meeting.',
		against: 'It speaks against meeting.',
		neither: 'It tells the two apart hardly at all.'
	},
	unclearSays: 'An unclear result counts as not made.',
	moveUp: (finding: string) => `Move up: ${finding}`,
	moveDown: (finding: string) => `Move down: ${finding}`,
	remove: (finding: string) => `Remove: ${finding}`,
	accuracyAssumed: 'Accuracy assumed, not published',
	accuracyFrom: 'Accuracy derived from',
	advice: {
		title: 'What it means',
		heads: {
			'treat-as-joined': 'Treat as joined',
			'treat-as-separate': 'Treat as separate',
			undecided: 'Undecided: plan as separate',
			none: 'No advice',
			noEvidence: 'No advice'
		},
		sentences: {
			'treat-as-joined': 'The canals share one exit with at least the probability you ask for.',
			'treat-as-separate': 'Shape, clean and fill each canal to its own full length.',
			undecided: 'Whether they share one exit is not settled.',
			none: 'With one canal there is nothing to join.',
			noEvidence: 'There is no evidence on this root.'
		},
		line: (percent: string, from: 'address' | 'device' | 'usual') =>
			`The line is at ${percent} for a shared exit, ${
				{ address: 'as set here', device: 'as kept on this device', usual: 'the usual one' }[from]
			}.`,
		heldBack:
			'A shared exit is more probable than the line asks for, but this rests on findings whose accuracy is assumed, not published: with their weight halved the line is not reached.',
		settled: 'Further testing will not change what you do.',
		open: 'A further test could change this.'
	},
	lineTitle: 'Treat as joined from',
	lineUnit: '% for a shared exit',
	lineSlider: 'The line, in percent',
	lineHint: (percent: string, from: 'device' | 'usual') =>
		`From 50 to 99. Blank: ${percent}, ${from === 'device' ? 'as kept on this device' : 'the usual line'}. It is high on purpose: shortening a separate canal leaves it unfilled, the worse mistake. Findings whose accuracy is assumed must still reach it with their weight halved (the square root of their likelihood ratio).`,
	lineError: 'Give a percentage from 50 to 99.',
	nextTitle: 'What would settle it',
	nextNote:
		'Tests not yet made, the most telling first. Bits: the information expected about what becomes of the canals. Effort and radiation are common practice, no source.',
	bits: (bits: string) => `${bits} bits`,
	effort: { low: 'little effort', medium: 'some effort', high: 'much effort' } as Record<string, string>,
	ifResult: (probability: string, sharedExit: string) =>
		`probability ${probability}, then a shared exit is ${sharedExit}`,
	enter: (result: string, detail: string, test: string) => `${result}: ${detail} (${test.toLowerCase()})`,
	assumedTitle: 'Assumed, not published',
	assumed: (names: string) =>
		`No accuracy was ever published for: ${names}. The figures used for them are assumptions of the editors.`,
	assumedNames: { isthmus: 'how often an isthmus is there' } as Record<string, string>,
	searchNamed: (name: string) => `search by ${name.toLowerCase()}`,
	notesTitle: 'How this was worked out',
	borrowed: (count: number) =>
		count === 1
			? 'One of the nine questions behind this answer has no sample of this root: its figures are borrowed from other roots.'
			: `${count} of the nine questions behind this answer have no sample of this root: their figures are borrowed from other roots.`,
	evidence: (count: number) => `From ${count} ${count === 1 ? 'source' : 'sources'} on this root.`,
	openEvidence: 'Open the samples',
	revision: (number: number) => `Table revision ${number}.`,
	wholeError: 'Something is missing or does not fit together: see the field marked beside it.',

	said: {
		date: 'Date (UTC)',
		canals: 'Canals negotiated',
		orifices: 'Orifices seen',
		roots: 'Roots seen',
		search: 'Search',
		samples: 'Samples narrowed to',
		findings: 'Findings, in order',
		none: 'none'
	},
	record: {
		title: 'As text for the record',
		lead: 'Plain text with nothing that identifies a patient. Select it, or copy it as a whole.',
		label: 'Text for the record',
		copy: 'Copy the text',
		copied: 'Copied.',
		notCopied: 'The browser did not allow it: the text is selected, copy it with the keyboard.',
		heading: 'Do the canals join? An estimate from published samples',
		dated: (date: string, revision: number) => `${date} (UTC), table revision ${revision}`,
		estimate: 'Estimate, 95 % range in brackets',
		before: (value: string) => `before the findings ${value}`,
		advice: 'Advice',
		level: 'Level of the confluence',
		cone: 'Second cone',
		basis: 'What it rests on',
		cautions: 'Cautions',
		address: 'The same answer',
		identity: 'No patient identity belongs in this product.',
		assumedMark: 'accuracy assumed'
	},
	print: 'Print'
};
