import type { EntryFilters } from '$lib/schemas/table';
import { serverDatabase } from '../db/server';
import { numberOfPath } from './ifMatch';
import { Problem } from './problem';
import { checkEntryFilters } from '../table/entryFilters';
import { CITATION_FILES, cite } from '../table/citations';
import { citationsOf } from '../table/sources';
import { findTableRevision, pastCsv, pastJson } from '../table/pastTables';
import { LICENCE_NOTE, publishedRevision, tableCsv, tableJson, tableSpreadsheet } from '../table/wholeTable';

/** Sources cited between two looks at what else waits: a bibliography of thousands must hold nobody up. */
const CHUNK_SOURCES = 50;

const TABLE_TYPES = {
	csv: 'text/csv; charset=utf-8; header=present',
	json: 'application/json',
	xlsx: 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet'
};

/** Text that is made while it is sent: the next piece when the reader has room for it. */
function streamed(pieces: AsyncGenerator<string, void>, headers: Record<string, string>): Response {
	const encoder = new TextEncoder();
	const body = new ReadableStream<Uint8Array>({
		async pull(controller) {
			const piece = await pieces.next();
			if (piece.done) controller.close();
			else controller.enqueue(encoder.encode(piece.value));
		},
		async cancel() {
			await pieces.return();
		}
	});
	return new Response(body, { headers });
}

/** A name for a saved file, of letters, digits, dots and hyphens alone. */
export const fileName = (name: string, ending: string) => `${name.replace(/[^\w.-]+/g, '-')}.${ending}`;

/**
 * The published table, or what filters leave of it, as a file to keep. Its name, and headers, say of which revision and day it is.
 * @throws Problem 422 for a filter that names something the table does not have
 */
export async function downloadTable(
	filters: EntryFilters,
	ending: 'csv' | 'json' | 'xlsx'
): Promise<Response> {
	const db = await serverDatabase();
	await checkEntryFilters(db, filters);
	const published = await publishedRevision();
	const part = Object.keys(filters).length > 0 ? '-part' : '';
	if (ending === 'xlsx') {
		const bytes = new Uint8Array(await tableSpreadsheet(db, filters, published.revision));
		return new Response(bytes, { headers: tableHeaders(published, part, ending) });
	}
	const pieces =
		ending === 'csv' ? tableCsv(db, filters, published.revision) : tableJson(db, filters, published);
	return streamed(pieces, tableHeaders(published, part, ending));
}

/**
 * The table as it stood at one of its revisions.
 * @throws Problem 404 for a number it never had
 */
export async function downloadPastTable(number: string, ending: 'csv' | 'json'): Promise<Response> {
	const revision = numberOfPath(number);
	const then = revision === null ? null : await findTableRevision(revision);
	if (!then) throw new Problem(404, 'The table never had this revision.');
	const db = await serverDatabase();
	return streamed(ending === 'csv' ? pastCsv(db, then) : pastJson(db, then), tableHeaders(then, '', ending));
}

function tableHeaders(
	{ revision, date }: { revision: number; date: string },
	part: string,
	ending: keyof typeof TABLE_TYPES
): Record<string, string> {
	const name = `watersmeet-table${part}-revision-${revision}-${date.slice(0, 10)}`;
	return {
		'content-disposition': `attachment; filename="${fileName(name, ending)}"`,
		'last-modified': new Date(date).toUTCString(),
		'x-table-revision': String(revision),
		'x-table-licence': LICENCE_NOTE,
		'content-type': TABLE_TYPES[ending]
	};
}

/** The citations of all sources, or of those that words leave, as a file to keep. */
export async function downloadSources(
	q: string | undefined,
	format: 'bibtex' | 'ris' | 'csl'
): Promise<Response> {
	const sources = await citationsOf(await serverDatabase(), q);
	const { type, ending } = CITATION_FILES[format];
	async function* pieces(): AsyncGenerator<string, void> {
		// One list, not several.
		if (format === 'csl') {
			yield cite(sources, format);
			return;
		}
		for (let start = 0; start < sources.length; start += CHUNK_SOURCES) {
			yield cite(sources.slice(start, start + CHUNK_SOURCES), format);
			await new Promise(setImmediate);
		}
	}
	return streamed(pieces(), {
		'content-type': type,
		'content-disposition': `attachment; filename="watersmeet-sources.${ending}"`
	});
}
