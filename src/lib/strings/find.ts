/** Words of the page that finds a tooth. */
export const find = {
	title: 'Find a tooth',
	lead: 'See which canals to expect in a root before you open it, and work out at the chair whether two of them join. Every figure comes from a published sample you can open.',
	chart: 'All 32 teeth, two shores',
	chartHint: 'As you face the patient: the patient’s right is on your left.',
	quadrants: {
		UR: 'Upper right',
		UL: 'Upper left',
		LR: 'Lower right',
		LL: 'Lower left'
	},
	results: (query: string, count: number) =>
		count === 0
			? `Nothing here answers to “${query}”`
			: `${count} ${count === 1 ? 'place answers' : 'places answer'} to “${query}”`,
	noResultsHint:
		'Type a number (16, #3, UR6), a name (upper first molar) or a feature (mb2, middle mesial, c-shape).',
	types: 'The sixteen types of tooth',
	typesHint:
		'Entries are the published rows of the table about that root; sources are the papers they come from.',
	tooth: 'Tooth',
	roots: 'Roots',
	counts: (entries: number, studies: number) =>
		entries === 0
			? 'no entry'
			: `${entries} ${entries === 1 ? 'entry' : 'entries'}, ${studies} ${studies === 1 ? 'source' : 'sources'}`
};
