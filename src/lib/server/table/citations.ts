/**
 * Sources as reference managers read them. Only the output half of @citation-js is called, with CSL-JSON: its input half is the one that
 * can ask outside hosts about an identifier.
 */
import { plugins } from '@citation-js/core';
import '@citation-js/plugin-bibtex';
import '@citation-js/plugin-csl';
import '@citation-js/plugin-ris';
import type { CitationFormat } from '$lib/schemas/table';
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
