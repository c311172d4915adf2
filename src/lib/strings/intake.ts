import { count } from './format';

/** Words of importing a table. */
export const intake = {
	unreadable: {
		binary: 'This file holds no text. Save the table as CSV or as .xlsx and choose that file.',
		quotes: (line: number) =>
			`The quotation marks do not match${line ? ` near line ${count(line)}` : ''}: a cell that holds a comma, a line end or a quotation mark must stand in quotation marks, and a mark inside is written twice.`,
		hugeRow: (line: number) =>
			`The row near line ${count(line)} is longer than any row of a table. A quotation mark may have been left open.`,
		rows: (most: number) => `The table has more than ${count(most)} rows. Import it in parts.`,
		columns: (most: number) => `A row has more than ${most} columns. Is this the right file?`,
		brokenSheet:
			'The spreadsheet cannot be read: it is damaged or no .xlsx file. Open it, save it again as .xlsx, and try that.',
		parts: 'The spreadsheet has far more parts than a table needs, and was not opened.',
		encrypted: 'The spreadsheet is protected by a password. Save it without one.',
		bomb: 'The spreadsheet unpacks to more than 100 MB, and was not opened. Keep only the sheet with the table, or save it as CSV.',
		memory:
			'The file needs more memory to read than there is for one import. Import it in parts, or save it as CSV.',
		busy: 'Other files are being read. Try again in a minute.',
		tooLarge: 'The file is larger than 20 MB. Import it in parts.',
		empty: 'The file is empty, or none was chosen.',
		oldSheet: 'This is a spreadsheet of the old kind (.xls). Save it as .xlsx or CSV.',
		notTable: (kind: string) =>
			`This is no table but a file of another kind (${kind}), whatever its name says. Choose a CSV or .xlsx file.`,
		gone: 'The file of this import is no longer kept. Upload it again.'
	},
	missingColumn: (column: string) =>
		`There is no column ${column}. If it has another heading, choose it above.`,
	columnTwice: (column: string) => `Two columns are taken for ${column}. Leave one out above.`,
	noRows: 'Below the headings there is no row.',
	tooManyCells: (cells: number, headings: number) =>
		`The row has ${cells} cells under ${headings} headings. A cell that holds the separator must stand in quotation marks.`,
	tooFewCells: 'The row has one cell only.',
	turnedIntoDate:
		'The spreadsheet program has turned this into a date. Format the column as text and type the value again (a canal sequence such as 2-1).',
	yesOrNo: 'Write yes or no, or leave it empty.',
	inTableOtherwise: (entry: number) =>
		`The table has this entry already, with other figures (entry ${entry}). Change it there, or remove these rows.`,
	draftOf: (entry: number) =>
		`The desk has a draft of this entry already (entry ${entry}). Finish or discard it there, or remove these rows.`,
	why: (file: string) => `Imported from ${file}.`,
	failed: 'Something went wrong while writing. Nothing was kept.',
	interrupted: 'The server stopped while this was being written. Nothing was kept.',
	audit: (entries: number, publish: boolean) => `${entries} entries, ${publish ? 'published' : 'as drafts'}`,
	title: 'Import a table',
	lead: 'A CSV or .xlsx file with the columns of the table. It is looked through first: every problem is named by row and column, and nothing is written unless all of it is right.',
	file: 'Table (CSV or .xlsx, up to 20 MB)',
	upload: 'Look through it',
	columnsTitle: 'Which columns it needs',
	columnsLead:
		'The first row holds the headings, in any order. A count or a percentage is enough; the other may be missing. Download the table below for an example.',
	needed: 'needed',
	mine: 'Your imports',
	noneYet: 'You have imported nothing yet.',
	all: 'Imports',
	states: {
		preview: 'Not imported yet',
		writing: 'Being written',
		finishing: 'Being finished',
		done: 'Imported',
		cancelled: 'Cancelled, nothing was kept',
		failed: 'Failed, nothing was kept'
	} as Record<string, string>,
	entries: (number: number) => `${count(number)} ${number === 1 ? 'entry' : 'entries'}`,
	exportTitle: 'Export',
	exportLead:
		'The whole published table, and the citations of all sources. Cells that begin as a formula does are made harmless, and come back as they were when imported.',
	exportFiltered: 'Narrow the table first, and download what is left',
	rows: 'Rows',
	writtenAs: 'Read as',
	delimiters: { ',': 'commas between cells', ';': 'semicolons between cells', '\t': 'tabs between cells' },
	fresh: 'New',
	already: 'In the table already, left out',
	alreadyTitle: (number: number) => `In the table already: ${count(number)}`,
	nothingYet:
		'Nothing can be imported until the problems below are mended. Mend the file and upload it again, or choose headings.',
	headings: 'Headings',
	headingsLead: 'Which column of the table each heading of the file is.',
	unknownHeading: (heading: string) => `${heading || 'without heading'} (not one of ours)`,
	leaveOut: 'Leave out',
	checkAgain: 'Check again',
	mapped: 'Checked again.',
	problems: 'Problems',
	warnings: 'Worth a look',
	problemCount: (total: number, rows: number) =>
		`${count(total)} in ${count(rows)} ${rows === 1 ? 'row' : 'rows'}.`,
	firstOnly: (shown: number) => `The first ${count(shown)} are listed.`,
	byColumn: (list: [string, number][]) =>
		`By column: ${list.map(([column, number]) => `${column || 'whole row'} ${count(number)}`).join(', ')}`,
	row: 'Row',
	column: 'Column',
	stands: 'There stands',
	what: 'What is wrong',
	wholeRow: 'whole row',
	asDrafts: 'Import as drafts',
	asPublished: 'Import and publish',
	drafts: 'as drafts',
	published: 'published',
	discard: 'Throw this upload away',
	cancel: 'Cancel',
	cancelled: 'Cancelled. Nothing was kept.',
	tooLate: 'It can no longer be cancelled.',
	reload: 'Reload this page to see how far it is.',
	progress: (written: number, total: number) => `${count(written)} of ${count(total)} entries`,
	startFailures: {
		busy: 'Another import is being written. Try again when it is done.',
		'not ready': 'This import has been started already.',
		problems: 'There are problems left; nothing was written.',
		'nothing new': 'There is nothing new in it: the table has all of it.'
	}
};
