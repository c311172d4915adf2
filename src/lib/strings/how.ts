/** Words of the page that explains the method. */
export const how = {
	title: 'How it works',
	lead: 'One idea carries everything: before you open it, a root is a set of possible canal sequences, each with a probability. The literature gives the probabilities, every finding reweighs them, and each answer is a sum over them.',
	sequences: {
		title: '1. A root is a distribution over sequences',
		text: [
			'A canal sequence is the number of canals at each level, read from orifice to exit: 2-1 opens with two canals and ends with one. From it follows everything else: orifices, exits, whether canals meet, what becomes of them.',
			'The picture draws every sequence over the others, as strongly as it is probable. It is the upper first molar’s mesiobuccal root, from the table as it stands.'
		]
	},
	questions: {
		title: '2. Nine yes/no questions',
		text: [
			'Studies report at different grains: whole class tables, “a second canal was there”, or “of the two-canal roots, so many joined”. A tree of yes/no questions lets each study inform exactly the questions it can answer, and no others.',
			'Multiply the answers along a path and you have the probability of the sequence at its end.'
		],
		label: 'The tree of questions',
		yes: 'yes',
		no: 'no',
		rare: 'A sequence rarer than these is counted with the one that starts and ends alike, and keeps its own name in the table.'
	},
	pooling: {
		title: '3. Pooling: the middle and the new population',
		text: [
			'Samples of the same question differ by more than chance: populations differ, methods see more or less. So each sample has a proportion of its own, spread around a middle (on the logit scale, with a spread called tau that is estimated as well).',
			'Two figures come out. The middle population says where the samples centre. The new population says what to expect in the next one, and your next patient comes from one; its range is wider, and it is the honest one. Screens lead with it.'
		],
		example: 'More than one canal in the upper first molar’s mesiobuccal root',
		pooled: 'Middle population',
		predictive: 'New population',
		facts: (samples: number, min: string, max: string) =>
			`Pooled from ${samples} samples, in which ${min} to ${max} of roots had more than one canal.`
	},
	borrowing: {
		title: '4. What nobody studied',
		text: [
			'A question no sample of a root answers borrows: its starting point is the middle of the other roots, with a spread at least as wide as theirs. Such figures are marked “borrowed from other roots”.',
			'A root without a sample on any question says “no evidence”, and no advice is given.'
		]
	},
	findings: {
		title: '5. Findings are likelihoods, never verdicts',
		text: [
			'Each test is positive more often when canals meet than when they do not. How much more often is what makes it telling. Where that was never published, the value is an assumption of the editors and says so.',
			'Canals negotiated count too, with how the root was searched: a search that misses easily proves little. Fluid crosses an isthmus between separate canals, so a positive draw test is weaker than it looks.',
			'Means are exact sums. Intervals come from 4,096 evenly spread combinations of everything that is uncertain: the literature, the patient’s population, the accuracy of the tests. The same question always gives the same digits.'
		],
		caption: 'How often each test is positive, and where that comes from',
		test: 'Test',
		meet: 'If canals meet',
		never: 'If they never do',
		neverIsthmus: 'with an isthmus',
		neverNoIsthmus: 'without an isthmus',
		basis: 'From',
		assumed: 'assumed',
		derived: 'derived from'
	},
	advice: {
		title: '6. From probability to advice',
		text: [
			'Canals are treated as joined when a shared exit is at least as probable as the line you set (90 % unless you change it), and still so when every assumed test counts only half its weight. They are treated as separate when a shared exit is at most as probable as what is left (10 %). Between the two, plan as separate.',
			'The line leans towards separate on purpose: filling a separate canal short leaves it unfilled, the worse mistake.',
			'For each test not yet made, the expected information says how much it would tell about what becomes of the canals, in bits: 0 tells nothing, 1 would settle an even question.'
		]
	},
	coverage: {
		title: '7. Does the table predict what it has not seen?',
		text: [
			'Leave one sample out, predict it from the rest, and see whether it falls into the range. Done for every sample of every question with at least two others beside it.',
			'A table that claims 95 % and covers 70 % must say so: questions that cover too little are named below.'
		],
		overall: (samples: number, inside95: string, inside80: string) =>
			`Of ${samples} samples left out in turn, ${inside95} fell into their 95 % range and ${inside80} into their 80 % range.`,
		none: 'No question has three samples yet, so nothing can be left out and predicted.',
		plotLabel: (questions: number, flagged: number) =>
			`Share of left-out samples inside their 95 % range for ${questions} questions; ${flagged} flagged. The table below has the figures.`,
		flaggedTitle: 'Questions that cover too little',
		flagged: (name: string, samples: number, inside95: string, inside80: string) =>
			`${name}: of ${samples} samples, ${inside95} inside the 95 % range, ${inside80} inside the 80 % range`,
		noneFlagged: 'No question is flagged.',
		few: 'With three to six samples one miss is enough to be flagged; a flag says “do not lean on this range”, not that the figure is wrong.',
		allTitle: (count: number) => `All ${count} questions`,
		place: 'Root and question',
		samples: 'Samples',
		in95: 'In 95 % range',
		in80: 'In 80 % range',
		model: 'Shown model',
		models: { plain: 'plain', method: 'by method' },
		scores: 'Log score, plain / by method',
		notCompared: 'not compared',
		methodTitle: 'Does it matter how one looked?',
		method: [
			'Micro-CT and clearing see more canals than CBCT, CBCT more than radiographs. So each question is also pooled with an offset for each group of methods: laboratory (micro-CT, clearing, sectioning), clinical (clinic, microscope) and radiograph, against CBCT.',
			'Whichever of the two models gave the left-out samples the higher probability (the log score, nearer to 0 is better) is shown; both scores stand in the table and on the root’s page.'
		],
		gained: (questions: number, compared: number) =>
			`Of ${compared} questions with samples of two groups of methods, ${questions} ${questions === 1 ? 'is' : 'are'} shown by method.`
	},
	assumptions: {
		title: '8. What is assumed',
		points: [
			'Samples of a question are exchangeable once their method is allowed for where that helps: no sample’s population is known to be nearer to your patient’s than another’s, unless you narrow the samples.',
			'Findings are independent given what the canals do; file contact and two files together rest on one mechanism, so only the more telling one counts.',
			'Canals after the first are each found independently, with a probability that depends on how one searched; none is invented.',
			'The level of a confluence is measured with a normal error; its spread is assumed.'
		]
	},
	unknown: {
		title: '9. What the product does not know',
		points: [
			'Anything about your patient beyond what you enter: age, restorations, calcification, the other side, images.',
			'Whether a fourth canal is there once three are negotiated: the table cannot say.',
			'How independent two tests really are, and how accurate most of them are.',
			'What was published and not gathered. Rows that wait for a source or a locator are listed, not used.'
		]
	}
};
