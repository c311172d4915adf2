import type { SEARCH_KINDS } from '$lib/schemas/terms';
import { count } from './format';

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
	kinds: {
		tooth: 'Teeth',
		root: 'Roots and canals',
		feature: 'Features',
		source: 'Sources',
		country: 'Countries'
	} satisfies Record<(typeof SEARCH_KINDS)[number], string>,
	countryEntries: (entries: number) =>
		`${count(entries)} ${entries === 1 ? 'entry' : 'entries'} of the table, samples from there`,
	nothingHint: 'Look up a tooth by number or name, a root, a feature, the author of a paper, or a country.',
	didYouMean: 'Did you mean',
	examplesTitle: 'All of these work',
	examples: ['16', '#3', 'UR6', 'upper first molar', 'mb2', 'isthmus', 'c-shape', 'vertucci 84', 'Brazil'],
	orChart: 'or choose from the chart of all teeth',
	recent: 'Looked up on this device',
	recentNote: 'Kept on this device only.',
	clearRecent: 'Forget these',
	shortcuts: 'Press / or Ctrl+K anywhere to look something up.',
	suggestions: 'Suggestions',
	suggestionCount: (count: number) =>
		count === 0
			? 'Nothing found so far; press Enter to see why.'
			: `${count} ${count === 1 ? 'suggestion' : 'suggestions'}; arrow keys choose, Escape closes.`,
	types: 'The sixteen types of tooth',
	typesHint:
		'Entries are the published rows of the table about that root; sources are the papers they come from.',
	counts: (entries: number, studies: number) =>
		entries === 0
			? 'no entry'
			: `${entries} ${entries === 1 ? 'entry' : 'entries'}, ${studies} ${studies === 1 ? 'source' : 'sources'}`
};
