/** Between the form of a source, one field each, and its CSL-JSON. Pure. */
import type { SourceFields } from '$lib/schemas/sources';
import { yearOf } from './citable';
import type { CslSource } from './literatureFiles';

type Name = NonNullable<CslSource['author']>[number];

/** Fields of CSL-JSON and of the form that hold the same text. */
const SAME: readonly (readonly [keyof SourceFields, string])[] = [
	['title', 'title'],
	['journal', 'container-title'],
	['volume', 'volume'],
	['issue', 'issue'],
	['page', 'page'],
	['publisher', 'publisher'],
	['doi', 'DOI'],
	['pmid', 'PMID'],
	['pmcid', 'PMCID'],
	['url', 'URL'],
	['note', 'note']
];

/** Authors as the form shows them: one a line, `Family, Given`; a society by its name in braces. */
function authorLines(authors: readonly Name[] = []): string {
	return authors
		.map(({ family, given, literal }) => {
			if (literal !== undefined) return `{${literal}}`;
			return given === undefined ? (family ?? '') : `${family ?? ''}, ${given}`;
		})
		.filter((line) => line !== '')
		.join('\n');
}

/** Authors from the form's lines. A line without a comma is a family name alone; one in braces is a society. */
function authorsOf(lines: string): Name[] {
	return lines
		.split(/\r?\n/)
		.map((line) => line.trim())
		.filter((line) => line !== '' && line !== ',')
		.map((line) => {
			const literal = /^\{(.+)\}$/.exec(line)?.[1].trim();
			if (literal) return { literal };
			const comma = line.indexOf(',');
			if (comma < 0) return { family: line };
			const [family, given] = [line.slice(0, comma).trim(), line.slice(comma + 1).trim()];
			return { ...(family && { family }), ...(given && { given }) };
		});
}

/** The form's fields of a source. */
export function fieldsOf(csl: CslSource): SourceFields {
	const texts = SAME.map(([field, name]) => {
		const value = csl[name];
		return [field, typeof value === 'string' || typeof value === 'number' ? String(value) : ''];
	});
	return {
		...(Object.fromEntries(texts) as Omit<SourceFields, 'type' | 'authors' | 'year'>),
		type: csl.type ?? 'article-journal',
		authors: authorLines(csl.author),
		year: String(yearOf(csl) ?? '')
	};
}

/**
 * A source with the fields of the form put in. Fields of CSL-JSON that the form does not show stay; a month and day of issue stay as long as
 * the year does.
 */
export function withFields(before: CslSource, fields: SourceFields): CslSource {
	const csl: CslSource = { ...before, type: fields.type };
	for (const [field, name] of SAME) {
		if (fields[field] === '') delete csl[name];
		else csl[name] = fields[field];
	}
	if (fields.authors !== authorLines(before.author)) {
		const author = authorsOf(fields.authors);
		if (author.length > 0) csl.author = author;
		else delete csl.author;
	}
	if (fields.year !== String(yearOf(before) ?? '')) {
		if (fields.year === '') delete csl.issued;
		else csl.issued = { 'date-parts': [[Number(fields.year)]] };
	}
	return csl;
}
