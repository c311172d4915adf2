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
	audit: (entries: number, publish: boolean) => `${entries} entries, ${publish ? 'published' : 'as drafts'}`
};
