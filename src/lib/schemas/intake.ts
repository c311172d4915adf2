/** Something wrong, or to look at, in one cell of a file. */
export interface Problem {
	/** As a spreadsheet numbers it: the headings are row 1. */
	row: number;
	/** The heading as the file has it; empty for the row as a whole. */
	column: string;
	value: string;
	message: string;
}

/** Problems one by one up to a limit, and how many there are. */
export interface ProblemList {
	total: number;
	rows: number;
	first: Problem[];
	/** How many by heading, the most first. */
	byColumn: [string, number][];
}
