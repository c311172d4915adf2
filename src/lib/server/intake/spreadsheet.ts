/** From the bytes of an .xlsx file to rows of cells; runs in a thread of limited memory. */
import { readSheet } from 'read-excel-file/node';
import { fromBufferPromise, type Entry, type ZipFile } from 'yauzl';
import { intake as words } from '$lib/strings/intake';
import { checkSize, type Sheet } from './decode';
import { MOST_PARTS, MOST_UNPACKED_BYTES, UnreadableFile } from './limits';

/** Marks a cell that the spreadsheet program has turned into a date; the check of the rows says so at the cell. */
export const DATE_MARK = '\u0000date:';

/**
 * Counts what an archive unpacks to while unpacking it, and stops at the limit: what its directory says of its size is the archive's own
 * word. The reader below sees the file only after this.
 * @throws UnreadableFile for too much, or no archive
 * @internal for its test
 */
export async function checkArchive(bytes: Buffer, most = MOST_UNPACKED_BYTES): Promise<number> {
	let unpacked = 0;
	let zip: ZipFile;
	try {
		zip = await fromBufferPromise(bytes, { lazyEntries: true, validateEntrySizes: false });
	} catch {
		throw new UnreadableFile(words.unreadable.brokenSheet);
	}
	if (zip.entryCount > MOST_PARTS) throw new UnreadableFile(words.unreadable.parts);
	try {
		for await (const entry of zip.eachEntry() as AsyncIterable<Entry>) {
			if (entry.isEncrypted()) throw new UnreadableFile(words.unreadable.encrypted);
			const stream = await zip.openReadStreamPromise(entry);
			for await (const chunk of stream as AsyncIterable<Buffer>) {
				unpacked += chunk.length;
				if (unpacked > most) {
					stream.destroy();
					throw new UnreadableFile(words.unreadable.bomb);
				}
			}
		}
	} catch (error) {
		if (error instanceof UnreadableFile) throw error;
		throw new UnreadableFile(words.unreadable.brokenSheet);
	} finally {
		zip.close();
	}
	return unpacked;
}

/**
 * Reads the first sheet of an .xlsx file, each cell as text.
 * @throws UnreadableFile for what is none, or is too much
 */
export async function readXlsx(bytes: Buffer): Promise<Sheet> {
	await checkArchive(bytes);
	let data: unknown[][];
	try {
		// Numbers come as the file writes them, and are read by us: nothing is rounded on the way.
		data = await readSheet(bytes, 1, { trim: false, parseNumber: (text) => text });
	} catch {
		throw new UnreadableFile(words.unreadable.brokenSheet);
	}
	const rows = data.map((row) => {
		const cells = row.map(cellText);
		while (cells.length > 0 && cells[cells.length - 1] === '') cells.pop();
		return cells;
	});
	return checkSize({ rows, encoding: null, delimiter: null });
}

function cellText(value: unknown): string {
	if (value === null || value === undefined) return '';
	if (value instanceof Date) return DATE_MARK + value.toISOString().slice(0, 10);
	if (typeof value === 'boolean') return value ? 'yes' : 'no';
	if (typeof value === 'number') return String(value);
	if (typeof value !== 'string') return '';
	// Binary fractions are written with seventeen digits: 0.1 as 0.10000000000000001.
	return /^-?\d+\.\d{15,}$/.test(value) ? String(Number(Number(value).toPrecision(15))) : value;
}
