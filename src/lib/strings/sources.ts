import { count } from './format';

/** Words of the list of sources. */
export const sources = {
	title: 'Sources',
	lead: 'Every publication the table has figures from, or has listed for its figures.',
	q: 'Words in author, title, journal, year, DOI or PMID',
	sort: 'Order',
	sorts: {
		author: 'Author',
		title: 'Title',
		'-year': 'Newest first',
		year: 'Oldest first',
		'-entries': 'Most entries first'
	} as Record<string, string>,
	apply: 'Show',
	clear: 'All sources',
	wrong: 'Something could not be used and was left out:',
	shown: (from: number, to: number, total: number) =>
		from === to
			? `Source ${count(from)} of ${count(total)}`
			: `Sources ${count(from)} to ${count(to)} of ${count(total)}`,
	none: 'No source has these words.',
	noneHint: 'Use fewer words, or the beginning of a name.',
	entries: (number: number) =>
		number === 0 ? 'no entries' : `${count(number)} ${number === 1 ? 'entry' : 'entries'}`,
	retracted: 'Retracted',
	notCitable: 'Not citable as it stands',
	download: 'Download the citations'
};
