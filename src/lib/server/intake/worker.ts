/** Entry of the thread that reads files which people upload: what goes wrong in here, memory included, ends this thread and nothing else. */
import { readCsv } from './decode';
import { checkRows, type CheckedRows } from './checkRows';
import { UnreadableFile } from './limits';
import { readXlsx } from './spreadsheet';

export interface ReadTask {
	bytes: Uint8Array;
	kind: 'csv' | 'xlsx';
	mapping: Record<string, string>;
	sources: string[];
	shown: [string, string[]][];
}

export type ReadAnswer = { unreadable: string } | { checked: CheckedRows };

/** Reads and checks a file. Piscina calls this; tests do too. */
export default async function read(task: ReadTask): Promise<ReadAnswer> {
	try {
		const sheet = task.kind === 'csv' ? readCsv(task.bytes) : await readXlsx(Buffer.from(task.bytes));
		const checked = checkRows(sheet, task.mapping, {
			sources: new Set(task.sources),
			shown: new Map(task.shown.map(([place, sequences]) => [place, new Set(sequences)]))
		});
		return { checked };
	} catch (error) {
		if (error instanceof UnreadableFile) return { unreadable: error.message };
		throw error;
	}
}
