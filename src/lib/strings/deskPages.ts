import { categoryOf } from '$lib/entry/difference';
import { count } from './format';

const fields: Record<string, string> = {
	source: 'Source',
	locator: 'Place in the source',
	provenance: 'How the figures came here',
	tooth: 'Tooth',
	root: 'Root',
	scope: 'What the total counts',
	country: 'Country',
	method: 'Method',
	subgroup: 'Part of the sample',
	total: 'Total',
	measure: 'What the figures say',
	figures: 'Categories',
	betaA: 'Parameter a',
	betaB: 'Parameter b',
	sdMm: 'Standard deviation, mm',
	basis: 'Rests on',
	sourceIds: 'Sources',
	note: 'Note'
};

/** Words of the pages of the desk. */
export const deskPages = {
	title: 'The evidence desk',
	lead: 'What waits for you, and what of the table wants looking after. Every entry cites its source and place, and somebody other than its author checks it.',
	newEntry: 'New entry',
	characteristics: 'Finding characteristics',
	record: 'Record of the table',
	back: 'Back to the desk',
	more: (shown: number, total: number) => `The first ${count(shown)} of ${count(total)}.`,
	by: (author: string) => `by ${author}`,
	lists: {
		toReview: {
			title: 'Waiting for your review',
			empty:
				'Nothing waits for you. When a colleague asks for a review, the entry stands here and a mail tells you.'
		},
		returned: { title: 'Returned to you', empty: 'No reviewer has sent anything back.' },
		drafts: {
			title: 'Your drafts',
			empty: 'No draft. Begin with a table of a paper you have at hand: “New entry”.'
		},
		sent: { title: 'With a reviewer', empty: 'Nothing of yours is with a reviewer.' },
		unverified: {
			title: 'Unverified entries',
			hint: 'Recalled from memory: in no estimate until somebody finds them in the source.',
			empty: 'Every published entry has been seen in its source.'
		},
		arithmetic: {
			title: 'Figures that contradict themselves',
			hint: 'Classes above their total, or a percentage that does not fit its count. Some are the source’s own.',
			empty: 'All published figures add up.'
		},
		incomplete: {
			title: 'Incomplete citations',
			hint: 'Without authors, or not citable at all; what cannot be cited enters no estimate.',
			empty: 'Every source can be found again.'
		},
		retracted: { title: 'Retracted sources', empty: 'No source has been retracted.' }
	},
	othersDrafts: (number: number) =>
		`${count(number)} ${number === 1 ? 'draft of a colleague is' : 'drafts of colleagues are'} in work.`,
	entriesOf: (number: number) => `${count(number)} ${number === 1 ? 'entry' : 'entries'}`,
	evidence: {
		title: 'How much evidence each root has',
		lead: 'Sources with a published entry on the root; the darker the field, the more. Open a root to see what they say.',
		tooth: 'Tooth',
		roots: 'Roots',
		unverified: 'unverified',
		cell: (sources: number, entries: number, unverified: number) =>
			sources === 0
				? 'no source'
				: `${count(sources)} ${sources === 1 ? 'source' : 'sources'}, ${count(entries)} ${entries === 1 ? 'entry' : 'entries'}${unverified > 0 ? `, ${count(unverified)} unverified` : ''}`
	},
	fields,
	part: (part: string): string => {
		const category = categoryOf(part);
		return category === null ? (fields[part] ?? part) : `Category ${category}`;
	},
	form: {
		newTitle: 'New entry',
		editTitle: (id: number) => `Entry ${id}`,
		newLead:
			'A sample’s figures for one measure, from one place in one source. Everything can be typed; nothing is lost when something is wrong.',
		choose: 'Choose',
		pooled: 'kinds of teeth pooled',
		hints: {
			source: 'Id of a source of the table; begin to type a name.',
			locator: 'Table, figure or page, so that another finds it.',
			scope: '“all” if the total counts every such root or tooth examined.',
			country: 'Three capital letters, several joined by +; “multi” for a review.',
			subgroup: '“all”, or such as male, left, age 20–40.',
			total: 'Roots or teeth examined, as the scope says.'
		} as Record<string, string>,
		provenances: {
			read: 'read in the source',
			secondary: 'quoted in another source',
			memory: 'recalled from memory'
		} as Record<string, string>,
		sourceLegend: 'Where it stands',
		sampleLegend: 'The sample',
		figuresLegend: 'The figures',
		category: 'Category',
		count: 'Count',
		percent: 'Percent',
		note: 'Note',
		rowOf: (name: string, row: number) => `${name}, row ${row}`,
		addRows: 'More rows',
		pick: 'Pick a canal sequence',
		pickOne: (sequence: string) => `Add ${sequence}`,
		check: 'Check',
		save: 'Save draft',
		saved: 'Saved.',
		levels: { error: 'Mend', warning: 'Look at', note: 'Note' } as Record<string, string>,
		sum: (sum: number, total: string) => `Sum of the counts: ${count(sum)}${total ? ` of ${total}` : ''}`,
		problems: (number: number) =>
			`${number} ${number === 1 ? 'thing has' : 'things have'} to be mended before this can be saved.`
	},
	merge: {
		title: 'Somebody has saved this meanwhile',
		lead: (who: string) =>
			`${who} saved a revision after you began. Choose whose version of each part stands; nothing is saved until you do.`,
		yours: 'Yours',
		theirs: 'Theirs',
		was: 'When you began',
		both: 'both changed it',
		save: 'Save the merged draft',
		nothing: 'nothing'
	},
	state: {
		draft: (author: string) => `Draft by ${author}`,
		inReview: (author: string) => `With a reviewer, by ${author}`,
		published: 'Published',
		withdrawn: 'Withdrawn',
		never: 'Never published',
		beside: 'The published entry stays in the estimates until this draft is published.',
		returned: (reviewer: string) => `Returned by ${reviewer}:`,
		noteOf: (author: string) => `${author} says:`,
		says: 'What it says',
		public: 'As everybody sees it',
		changes: 'What the draft changes',
		discarded: 'This draft was put away. Restore one of its revisions to take it up again.'
	},
	actions: {
		title: 'What can be done',
		none: 'There is nothing you can do with this entry now.',
		own: 'You have written in this entry, so somebody else has to check and publish it.',
		'ask-review': 'Ask for review',
		askNote: 'For the reviewer (optional)',
		'take-back': 'Take back',
		return: 'Return with reasons',
		reasons: 'Reasons, one a line',
		publish: 'Publish',
		publishHint: 'You confirm that you have checked the figures against the source.',
		withdraw: 'Withdraw',
		reason: 'Why',
		discard: 'Put the draft away',
		confirm: 'Confirm',
		confirmHint: 'Recalled figures enter the estimates once somebody has found them in the source.',
		'mark-poolable': 'Mark the sample',
		poolable: {
			legend: 'Is the sample pooled?',
			scope: 'As its scope says',
			yes: 'Pool it',
			no: 'Do not pool it',
			hint: 'Holds for every entry of this sample.',
			marked: 'An editor has marked the sample to be pooled:',
			markedNot: 'An editor has marked the sample not to be pooled:'
		},
		done: 'Done.'
	},
	effect: {
		title: 'What publishing does',
		lead: (place: string) => `${place}: the estimates before and after.`,
		none: 'No root the product answers for is concerned, so no estimate moves.',
		show: 'Show what publishing would do',
		figure: 'Figure',
		before: 'Before',
		after: 'After',
		moved: 'Moved',
		still: 'no change',
		points: (points: string) => `${points} points`,
		orifices: (number: number) =>
			number === 3 ? '3 or more orifices' : `${number} ${number === 1 ? 'orifice' : 'orifices'}`,
		samples: (number: number) => `${number} ${number === 1 ? 'sample' : 'samples'}`,
		borrowed: 'borrowed',
		pending: 'How far the estimates moved is being worked out; look again in a moment.',
		notPooled: (reason: string) => `The sample would not be pooled: ${reason}`,
		checksTitle: 'Is the new sample outside the range of the others?',
		inside: (text: string, range: string, others: number) =>
			`Inside: ${text}; the ${others === 1 ? 'other sample would' : `${others} others would`} have a new one in ${range} (95 %).`,
		outside: (text: string, range: string, others: number) =>
			`Outside: ${text}, where the ${others === 1 ? 'other sample would' : `${others} others would`} have a new one in ${range} (95 %). Check figures and scope once more.`,
		alone: (text: string) => `${text}: no other sample to compare with.`,
		noChecks: 'The entry would answer none of the nine questions.',
		others:
			'Roots with few samples borrow from all others, so figures elsewhere may move a little too; they are not listed.'
	},
	revisions: {
		title: 'Revisions',
		restore: (number: number) => `Restore revision ${number}`,
		seed: 'shipped literature',
		number: (number: number) => `Revision ${number}`,
		states: {
			draft: 'draft',
			'in-review': 'in review',
			discarded: 'put away',
			published: 'published',
			withdrawn: 'withdrawn'
		} as Record<string, string>,
		first: 'The first state.',
		same: 'No field changed.',
		before: 'before',
		after: 'after',
		added: 'added',
		removed: 'removed'
	},
	tableRecord: {
		title: 'Record of the table',
		lead: 'Every change of the published table: what changed, who checked it, and how far the estimates moved. Each revision can be cited, and its table downloaded as it stood.',
		revision: (number: number) => `Revision ${number}`,
		shipped: 'the shipped literature',
		by: (who: string, author: string | null) =>
			author ? `written by ${author}, checked and published by ${who}` : `by ${who}`,
		changed: (number: number) => `${count(number)} ${number === 1 ? 'entry' : 'entries'} changed`,
		entry: (id: number) => `Entry ${id}`,
		changes: { published: 'published', withdrawn: 'withdrawn' },
		cite: 'Cite as',
		citation: (product: string, number: number, date: string, address: string) =>
			`${product}, table of root canal anatomy, revision ${number}, ${date}. ${address}`,
		download: (number: number) => `Table of revision ${number}`,
		earlier: 'Earlier revisions',
		movement: (place: string) => `How far the estimates of ${place} moved`
	},
	characteristic: {
		title: 'Finding characteristics',
		lead: 'How good each test is taken to be: a Beta distribution of its rate, drawn as a curve with its 95 % interval. Edited like entries: somebody else puts a change in force.',
		finding: 'Finding',
		rate: 'Rate',
		curve: (name: string, mean: string, range: string) => `${name}: mean ${mean}, 95 % interval ${range}`,
		sd: (sd: number) => `standard deviation ${sd} mm`,
		bases: { published: 'published', derived: 'derived from sources', assumed: 'assumed' } as Record<
			string,
			string
		>,
		group: (group: string) => (group === 'any' ? 'any root' : group.replaceAll('-', ' ')),
		words: (text: string) => text.replaceAll('-', ' '),
		edit: 'Open',
		inForce: 'In force',
		drafted: 'Draft',
		noDraft: 'No draft: what is in force.',
		publish: 'Put in force',
		formHints: {
			betaA: 'As if so many had been positive (plus one).',
			betaB: 'As if so many had been negative (plus one).',
			sourceIds: 'Ids, separated by semicolons; none for an assumed value.'
		} as Record<string, string>
	}
};
