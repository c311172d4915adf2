import type { TableColumn } from '$lib/tableQuery';
import { count } from './format';

/** Words of the table of entries and of an entry's page. */
export const table = {
	record: 'Record of the table: what changed, who checked it',
	editAtDesk: 'Work on it at the desk',
	title: 'The literature table',
	lead: 'Every published entry: what one source counted in one sample, with its place in the source. The estimates are pooled from these.',
	find: {
		title: 'Filters',
		q: 'Words in the entry',
		qHint: 'Author, country, note, category… Put what must stand together in quotes.',
		tooth: 'Tooth',
		anyTooth: 'Any tooth',
		root: 'Root',
		anyRoot: 'Any root',
		measure: 'What was counted',
		anyMeasure: 'Anything',
		method: 'Method',
		anyMethod: 'Any method',
		country: 'Country',
		anyCountry: 'Any country',
		source: 'Source, by its id',
		sourceHint: 'Such as vertucci-1984; the list of sources has them all.',
		limit: 'Rows on a page',
		more: 'Tooth, root, method, country and other filters',
		columns: 'Columns',
		apply: 'Show',
		clear: 'Clear the filters',
		wrong: 'Something in the filters could not be used and was left out:'
	},
	columns: {
		measure: 'What was counted',
		figures: 'Figures',
		total: 'Total',
		source: 'Source',
		year: 'Year',
		method: 'Method',
		country: 'Country',
		scope: 'Which teeth',
		subgroup: 'Subgroup',
		locator: 'Place in the source',
		standing: 'Standing'
	} satisfies Record<TableColumn, string>,
	place: 'Tooth and root',
	sortBy: 'Sort by',
	sorted: { ascending: ', sorted upwards', descending: ', sorted downwards' },
	keys: 'Arrow keys go from row to row, Home and End to the first and last.',
	more: (number: number) => `and ${count(number)} more`,
	shown: (from: number, to: number, total: number) =>
		from === to
			? `Entry ${count(from)} of ${count(total)}`
			: `Entries ${count(from)} to ${count(to)} of ${count(total)}`,
	none: 'No entry fits these filters.',
	noneHint: 'Take a filter out, or use fewer words.',
	noneAtAll: 'The table is empty.',
	past: 'This page is empty: it lies beyond the last entry.',
	pages: 'Pages',
	first: 'First',
	previous: 'Previous',
	next: 'Next',
	download: 'Download',
	downloadAll: 'The whole table',
	downloadFound: 'What the filters leave',
	downloadNote:
		'The same columns as the files the table is made from. In CSV a cell that a spreadsheet would run as a formula has an apostrophe in front. Figures and bibliographic facts are as the sources published them: cite those sources.',
	filtered: 'Entries of the table with these figures only',

	entry: (id: number) => `Entry ${id}`,
	backToTable: 'The table',
	facts: 'The sample',
	source: 'Source',
	state: 'State',
	states: {
		draft: 'draft',
		'in-review': 'in review',
		published: 'published',
		withdrawn: 'withdrawn: no longer part of the table, kept for the record'
	},
	provenance: 'How it is known',
	provenances: {
		read: 'seen in the source’s own text',
		secondary: 'seen quoted in another source',
		memory: 'recalled, not seen'
	},
	confirmed: 'confirmed since by an editor',
	all: 'all',
	notGiven: 'not given',
	category: 'Category',
	number: 'Count',
	share: 'Percent',
	note: 'Note',
	asPrinted: 'as printed',
	revisions: 'Revisions',
	revision: (number: number) => `Revision ${number}`,
	seed: 'shipped literature',
	changedFields: (names: string[]) => `Changed: ${names.join(', ')}.`,
	json: 'This entry as JSON',
	inSource: 'Everything the table took from this source'
};
