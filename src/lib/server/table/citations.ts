/**
 * Sources as reference managers write and read them. Of @citation-js only the output half and the parsers of BibTeX and RIS are called, each
 * by name: what guesses a format from any text is the part that can ask outside hosts about an identifier.
 */
import { plugins } from '@citation-js/core';
import '@citation-js/plugin-bibtex';
import '@citation-js/plugin-csl';
import '@citation-js/plugin-ris';
import type { CitationFormat } from '$lib/schemas/table';
import { yearOf } from './citable';
import type { CslSource } from './literatureFiles';

// A source's own id is a label people can recognise, and the one the table's rows name.
Object.assign(plugins.config.get('@bibtex').format, { useIdAsLabel: true, checkLabel: false });

const RIS_LINE_END = '\r\n';

/** Media type and file ending of each format. */
export const CITATION_FILES: Record<CitationFormat, { type: string; ending: string }> = {
	vancouver: { type: 'text/plain; charset=utf-8', ending: 'txt' },
	bibtex: { type: 'application/x-bibtex; charset=utf-8', ending: 'bib' },
	ris: { type: 'application/x-research-info-systems; charset=utf-8', ending: 'ris' },
	csl: { type: 'application/vnd.citationstyles.csl+json; charset=utf-8', ending: 'json' }
};

/**
 * Writes sources in a citation format.
 * @param sources CSL-JSON as the table keeps it. The editors' notes are left out everywhere but in `csl`: they speak of our rows, not of the source
 * @returns Vancouver a line a source, unnumbered; BibTeX; RIS with a full id and both pages; CSL-JSON as it is kept, in a list
 */
export function cite(sources: readonly CslSource[], format: CitationFormat): string {
	if (format === 'csl') return `${JSON.stringify(sources, null, '\t')}\n`;
	const plain = sources.map(withoutNote);
	if (format === 'ris') return plain.map(toRis).join('');
	if (format === 'bibtex') return plugins.output.format('bibtex', plain.map(withLabel), { format: 'text' });
	// One by one: the style numbers its list, and the number of a single citation says nothing.
	const lines = plain.map((source) =>
		plugins.output
			.format('bibliography', [source], { template: 'vancouver', lang: 'en-US', format: 'text' })
			.trim()
			.replace(/^1\. /, '')
	);
	return lines.map((line) => `${line}\n`).join('');
}

function withoutNote({ note: _, ...source }: CslSource): CslSource {
	return source;
}

/** BibTeX takes no comma, brace or blank in a label; the library would take the hyphens out as well. */
function withLabel(source: CslSource): CslSource {
	return { ...source, id: source.id.replace(/[^\w.:/-]+/g, '-') };
}

/** The library breaks lines at 70 characters inside a word, cuts ids at 20, and puts both pages into SP: so its tags are written out here. */
function toRis(source: CslSource): string {
	const [{ TY, ...tags }] = plugins.output.format('ris', [source], { format: 'object' });
	const [first, last] = String(tags.SP ?? '').split('-');
	const all = { ...tags, ID: source.id, ...(first && { SP: first }), ...(last && { EP: last }) };
	const lines = Object.entries(all).flatMap(([tag, value]) =>
		[value].flat().map((text) => `${tag}  - ${String(text).replace(/\s+/g, ' ')}`)
	);
	return [`TY  - ${String(TY)}`, ...lines, 'ER  - ', '', ''].join(RIS_LINE_END);
}

/** Fields of CSL-JSON that a pasted citation may bring: what the product shows, and nothing that a format keeps for itself. */
const TEXT_FIELDS = [
	'type',
	'title',
	'container-title',
	'volume',
	'issue',
	'page',
	'publisher',
	'publisher-place',
	'edition',
	'language',
	'DOI',
	'PMID',
	'PMCID',
	'ISSN',
	'ISBN',
	'URL'
] as const;
/** A paste is one citation; a whole library is not read into memory. */
const MOST_PASTED_CHARACTERS = 200_000;

/** Why a pasted text is no citation. */
export type PasteFailure = 'empty' | 'too long' | 'unreadable' | 'several' | 'nothing';

/**
 * Reads one citation from pasted text, without asking any host: each format's own parser is called, never the library's guessing half.
 * @returns CSL-JSON with an empty id, of the fields that this product reads
 */
export function readCitation(
	text: string,
	format: 'bibtex' | 'ris' | 'csl'
): { csl: CslSource } | { failure: PasteFailure } {
	if (text.trim() === '') return { failure: 'empty' };
	if (text.length > MOST_PASTED_CHARACTERS) return { failure: 'too long' };
	let found: unknown[];
	try {
		found = [parsed(text, format)].flat();
	} catch {
		return { failure: 'unreadable' };
	}
	const records = found.filter(
		(one): one is Record<string, unknown> => typeof one === 'object' && one !== null
	);
	if (records.length === 0) return { failure: 'nothing' };
	if (records.length > 1) return { failure: 'several' };
	const csl = readable(records[0]);
	// BibTeX has no field for it, and the library drops what it does not know.
	const pmid = format === 'bibtex' && /\bpmid\s*=\s*[{"]?\s*(\d{1,9})\b/i.exec(text)?.[1];
	if (pmid && !csl.PMID) csl.PMID = pmid;
	return csl.title || csl.DOI || csl.PMID || csl.author ? { csl } : { failure: 'nothing' };
}

function parsed(text: string, format: 'bibtex' | 'ris' | 'csl'): unknown {
	if (format === 'csl') return JSON.parse(text);
	// The reader of RIS wants the first tag at the very beginning; files begin with a mark or blank lines.
	const start = text.replace(/^\uFEFF/, '').trimStart();
	if (format === 'ris' && !/^TY {2}- /.test(start)) throw new SyntaxError('no RIS');
	const forceType = format === 'ris' ? '@ris/file' : '@bibtex/text';
	return plugins.input.chain(format === 'ris' ? `${start.trimEnd()}\n` : start, {
		forceType,
		generateGraph: false
	});
}

/** The known fields of a record, each of its own kind; anything else is left out. */
function readable(record: Record<string, unknown>): CslSource {
	const csl: CslSource = { id: '' };
	for (const field of TEXT_FIELDS) {
		const value = record[field];
		const plain = typeof value === 'number' ? String(value) : value;
		if (typeof plain === 'string' && plain.trim() !== '') csl[field] = plain.replace(/\s+/g, ' ').trim();
	}
	const author = [record.author ?? []].flat().flatMap((name: unknown) => {
		if (typeof name !== 'object' || name === null) return [];
		const parts = Object.entries(name).filter(
			([key, value]) =>
				['family', 'given', 'literal'].includes(key) && typeof value === 'string' && value.trim() !== ''
		);
		return parts.length > 0 ? [Object.fromEntries(parts)] : [];
	});
	if (author.length > 0) csl.author = author;
	const year = yearOf(record);
	if (year !== null) csl.issued = { 'date-parts': [[year]] };
	return csl;
}
