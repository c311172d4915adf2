/** Beginnings that spreadsheets take for a formula (or strip, and then take the next character for one), and the mark itself. */
const RISKY = /^[=+\-@\t\r']/;
const MARK = "'";

/**
 * A CSV cell no spreadsheet runs as a formula: one that begins with = + - @, a tab, a carriage return, or an apostrophe gets an apostrophe
 * in front. `originalCell` undoes exactly that, for every text there is.
 */
export function harmlessCell(text: string): string {
	return RISKY.test(text) ? MARK + text : text;
}

/** The cell as it was before `harmlessCell`; a cell that was never treated, and does not begin with an apostrophe, stays as it is. */
export function originalCell(cell: string): string {
	return cell.startsWith(MARK) && RISKY.test(cell.slice(1)) ? cell.slice(1) : cell;
}
