/**
 * What an entry says, apart from its standing: a sample, and the sample's figures for one measure from one place in one source. Pure, and
 * free of zod, because the form checks in the browser with the very module that the server, the API and the import check with.
 */
import type { MEASURES, METHODS, PROVENANCES } from '$lib/schemas/terms';

/** One category of an entry. `count` of the sample's total, or `percent` as the source prints it, or both. */
export interface FigureContent {
	category: string;
	count: number | null;
	percent: number | null;
	/** The count was worked out from the percentage. */
	countDerived: boolean;
	note: string;
}

/** A checked entry. */
export interface EntryContent {
	source: string;
	locator: string;
	/** Slug, or empty where the source pools tooth types. */
	tooth: string;
	root: string;
	scope: string;
	/** ISO 3166 alpha-3, several joined by `+`, `multi`, or empty where the source does not say. */
	country: string;
	method: (typeof METHODS)[number];
	subgroup: string;
	total: number | null;
	measure: (typeof MEASURES)[number];
	provenance: (typeof PROVENANCES)[number];
	figures: FigureContent[];
}

/** A category as typed or as a cell of a file holds it. */
export interface FigureText {
	category: string;
	count: string;
	percent: string;
	/** `yes` where a file says that the count was worked out; a form leaves it to the check. */
	countDerived?: string;
	note: string;
}

/** An entry as typed: nothing is read yet, so that nothing typed is lost. Names are those of the columns of observations.csv but for `source`. */
export interface EntryText {
	source: string;
	locator: string;
	tooth: string;
	root: string;
	scope: string;
	country: string;
	method: string;
	subgroup: string;
	total: string;
	measure: string;
	provenance: string;
	figures: FigureText[];
}

/** The fields of an entry but for its figures, in the order screens show them. */
export const ENTRY_FIELDS = [
	'source',
	'locator',
	'provenance',
	'tooth',
	'root',
	'scope',
	'country',
	'method',
	'subgroup',
	'total',
	'measure'
] as const;
export type EntryField = (typeof ENTRY_FIELDS)[number];

/** Those of them that say which sample it is. */
const SAMPLE_FIELDS = ['source', 'tooth', 'root', 'scope', 'country', 'method', 'subgroup', 'total'] as const;

const written = (number: number | null): string => (number === null ? '' : String(number));

/** A checked entry as it would have been typed. The inverse of the check: checking the text gives the entry again. */
export function entryText(content: EntryContent): EntryText {
	return {
		...content,
		total: written(content.total),
		figures: content.figures.map(({ category, count, percent, countDerived, note }) => ({
			category,
			count: written(count),
			percent: written(percent),
			countDerived: countDerived ? 'yes' : 'no',
			note
		}))
	};
}

/** An entry with nothing typed yet. */
export function emptyEntry(): EntryText {
	const blank = Object.fromEntries(ENTRY_FIELDS.map((field) => [field, ''])) as Record<EntryField, string>;
	return {
		...blank,
		scope: 'all',
		subgroup: 'all',
		measure: 'configuration',
		provenance: 'read',
		figures: []
	};
}

/** True where two entries name the same sample, whatever they say of it. */
export const sameSample = (a: EntryContent, b: EntryContent): boolean =>
	SAMPLE_FIELDS.every((field) => a[field] === b[field]);
