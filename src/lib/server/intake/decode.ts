/** From the bytes of a text file to rows of cells, whatever program wrote it. Pure. */
import { CsvError, parse } from 'csv-parse/sync';
import { intake as words } from '$lib/strings/intake';
import { MOST_COLUMNS, MOST_ROWS, UnreadableFile } from './limits';

export type Encoding = 'UTF-8' | 'UTF-16' | 'Windows-1252';
export type Delimiter = ',' | ';' | '\t';

/** Rows of a file as it has them; `rows[0]` is what a spreadsheet numbers 1. A blank row is an empty list. */
export interface Sheet {
	rows: string[][];
	encoding: Encoding | null;
	delimiter: Delimiter | null;
}

/**
 * The text of bytes: by their byte order mark, else as UTF-8 if they are that without a fault, else as Windows-1252, which is what older
 * spreadsheet programs of Western Europe write.
 * @throws UnreadableFile for bytes that are no text
 * @internal for its test
 */
export function decodeText(bytes: Uint8Array): { text: string; encoding: Encoding } {
	const [first, second] = bytes;
	const little = first === 0xff && second === 0xfe;
	if (little || (first === 0xfe && second === 0xff))
		return { text: new TextDecoder(little ? 'utf-16le' : 'utf-16be').decode(bytes), encoding: 'UTF-16' };
	const head = bytes.subarray(0, 65_536);
	// Text has tabs and line ends, and no other control characters.
	if (head.some((byte) => byte < 32 && byte !== 9 && byte !== 10 && byte !== 13 && byte !== 12))
		throw new UnreadableFile(words.unreadable.binary);
	try {
		return { text: new TextDecoder('utf-8', { fatal: true }).decode(bytes), encoding: 'UTF-8' };
	} catch {
		return { text: fromWindows1252(bytes), encoding: 'Windows-1252' };
	}
}

/**
 * What 0x80 to 0x9f stand for (WHATWG Encoding Standard, index windows-1252). Node 20 decodes them as control characters, which
 * was seen in 20.20.
 */
const ABOVE_ASCII =
	'\u20ac\u0081\u201a\u0192\u201e\u2026\u2020\u2021\u02c6\u2030\u0160\u2039\u0152\u008d\u017d\u008f' +
	'\u0090\u2018\u2019\u201c\u201d\u2022\u2013\u2014\u02dc\u2122\u0161\u203a\u0153\u009d\u017e\u0178';

function fromWindows1252(bytes: Uint8Array): string {
	const text = Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength).toString('latin1');
	return [...text]
		.map((letter) =>
			letter >= '\u0080' && letter <= '\u009f' ? ABOVE_ASCII[letter.charCodeAt(0) - 0x80] : letter
		)
		.join('');
}

/**
 * What stands between cells: whichever of comma, semicolon and tab the first line has most of, outside quotes.
 * @internal for its test
 */
export function delimiterOf(text: string): Delimiter {
	const counts: Record<Delimiter, number> = { ',': 0, ';': 0, '\t': 0 };
	let quoted = false;
	for (const letter of text.slice(0, 10_000)) {
		if (letter === '"') quoted = !quoted;
		else if (!quoted && (letter === '\n' || letter === '\r')) break;
		else if (!quoted && letter in counts) counts[letter as Delimiter] += 1;
	}
	return (Object.keys(counts) as Delimiter[]).reduce((best, one) =>
		counts[one] > counts[best] ? one : best
	);
}

/**
 * Reads a CSV file (RFC 4180, with the delimiter it uses), quoted line ends and all.
 * @throws UnreadableFile where the quotes do not close, or the file is too long or too wide
 */
export function readCsv(bytes: Uint8Array): Sheet {
	const { text, encoding } = decodeText(bytes);
	const delimiter = delimiterOf(text);
	let rows: string[][];
	try {
		rows = parse(text, {
			delimiter,
			relax_column_count: true,
			skip_empty_lines: false,
			max_record_size: 200_000,
			to: MOST_ROWS + 2
		});
	} catch (error) {
		if (!(error instanceof CsvError)) throw error;
		const line = typeof error.lines === 'number' ? error.lines : 0;
		throw new UnreadableFile(
			error.code === 'CSV_MAX_RECORD_SIZE' ? words.unreadable.hugeRow(line) : words.unreadable.quotes(line)
		);
	}
	return checkSize({
		rows: rows.map((row) => (row.every((cell) => cell === '') ? [] : row)),
		encoding,
		delimiter
	});
}

/** @throws UnreadableFile for a sheet with too much in it */
export function checkSize(sheet: Sheet): Sheet {
	if (sheet.rows.length > MOST_ROWS + 1) throw new UnreadableFile(words.unreadable.rows(MOST_ROWS));
	if (sheet.rows.some((row) => row.length > MOST_COLUMNS))
		throw new UnreadableFile(words.unreadable.columns(MOST_COLUMNS));
	return sheet;
}
