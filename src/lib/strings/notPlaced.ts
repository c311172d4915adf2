/** Words of the page that lists rows of the shipped files which could not be placed. */
export const notPlaced = {
	title: 'Rows that could not be placed',
	lead: 'Every entry of the table needs a source and a place in it. These rows of the shipped files lack something, so they are listed here instead of being dropped.',
	empty: 'Every row of the shipped files was placed.',
	where: 'File and line',
	row: 'Row',
	reason: 'Why'
};
