import type { SourceSummary } from '$lib/schemas/table';

const LONGEST_TITLE = 60;

/** Words of the page of a source. */
export const source = {
	noYear: 'year not known',
	noTitle: 'Title not known',
	authorsUnknown: 'authors not seen',
	work: 'This citation wants completing by an editor.',
	notCitable:
		'Not citable as it stands: no DOI, PMID or PMCID, and no title with a journal or an author. Its figures are shown and never pooled.',
	retracted: 'Retracted: its figures are not pooled.',
	citation: 'Citation',
	authors: 'Authors',
	journal: 'Published in',
	identifiers: 'Identifiers',
	note: 'Note of the editors',
	entries: 'What the table took from it',
	entriesEmpty: 'The table has no entry from this source.',
	place: 'Place',
	toothRoot: 'Tooth and root',
	sample: 'Sample',
	measure: 'Measure',
	figures: 'Figures',
	state: 'Standing',
	verified: 'verified',
	secondary: 'verified, quoted in another source',
	unverified: 'unverified: recalled, not yet checked against the source',
	unverifiedShort: 'unverified',
	pooledTeeth: 'tooth types pooled',
	totalUnknown: 'total not given',
	derived: 'count worked out from the percentage',
	measurements: 'Measurements',
	formats: { vancouver: 'Vancouver', bibtex: 'BibTeX', ris: 'RIS', csl: 'CSL-JSON' },
	formatsTitle: 'Cite this source',
	copy: (format: string) => `Copy as ${format}`,
	copied: 'Copied',
	copyFailed: 'Could not copy: select the text above instead',
	download: (format: string) => `Download ${format}`,
	showText: 'Show the text',
	inTable: 'These entries in the table',
	allSources: 'All sources',
	diagnostics: 'How good tests and images were',
	standards: 'From the standard',
	characteristics: 'Starting values of findings that rest on it',
	derivedFrom: 'worked out from this source and others named with it',
	betaShape: (a: number, b: number) => `Beta(${a}, ${b})`
};

/** A source as running text names it: `Vertucci 1984`; without authors by its title, so that nobody takes an id for a name. */
export function sourceName(id: string, summary?: SourceSummary): string {
	if (!summary) return id;
	const who = summary.authors || shorten(summary.title ?? id);
	return `${who}, ${summary.year ?? source.noYear}`;
}

function shorten(title: string): string {
	return title.length <= LONGEST_TITLE ? `“${title}”` : `“${title.slice(0, LONGEST_TITLE).trimEnd()}…”`;
}

/** Measures of the evidence files in words. */
export const measureNames: Record<string, string> = {
	configuration: 'Canal sequences',
	'canal-count': 'Number of canals',
	'root-count': 'Number of roots',
	'foramen-count': 'Number of foramina',
	feature: 'Feature',
	confluence: 'Two canals: joined or separate',
	'extra-canal-confluence': 'Middle mesial canal: joins a main one or not'
};
