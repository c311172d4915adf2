/** What a CSL-JSON source says of itself that the estimator needs. Pure. */

/** The fields of CSL-JSON read here; a full source of the table fits. */
export interface CitationFields {
	title?: string;
	author?: readonly { family?: string; given?: string; literal?: string }[];
	issued?: { 'date-parts'?: readonly (readonly (number | string)[])[] };
	'container-title'?: string;
	DOI?: string;
	PMID?: string;
	PMCID?: string;
}

const filled = (text: unknown): boolean => typeof text === 'string' && text.trim() !== '';

/**
 * Whether a reader could find the source again: it has a DOI, PMID or PMCID, or a title with a journal or an author
 * (data/literature/README.md). An author without a name in it does not count.
 */
export function citable(source: CitationFields): boolean {
	if (filled(source.DOI) || filled(source.PMID) || filled(source.PMCID)) return true;
	const named = (source.author ?? []).some(
		(author) => filled(author.family) || filled(author.literal) || filled(author.given)
	);
	return filled(source.title) && (filled(source['container-title']) || named);
}

/** Year of issue (CSL-JSON `issued.date-parts`, year first, number or text), or null where none is given. */
export function yearOf(source: CitationFields): number | null {
	const year = Number(source.issued?.['date-parts']?.[0]?.[0]);
	return Number.isInteger(year) && year > 0 ? year : null;
}
