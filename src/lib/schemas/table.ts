import { z } from 'zod';
import { ENTRY_SORTS, MEASURES, METHODS, SOURCE_SORTS } from './terms';

const DEFAULT_LIMIT = 50;

const limit = z.coerce
	.number('Give a number from 1 to 200.')
	.int('Give a number from 1 to 200.')
	.min(1, 'Give a number from 1 to 200.')
	.max(200, 'Give a number from 1 to 200.')
	.default(DEFAULT_LIMIT);
const text = z.string().trim().max(200, 'This is too long.');

const cursor = z.string().max(500, 'This cursor is not one of ours.').optional();
const ORDER_MESSAGE = 'This order is not known.';

const entryFilterFields = {
	tooth: text.optional(),
	root: text.optional(),
	measure: z.enum(MEASURES, `The measure must be one of ${MEASURES.join(', ')}.`).optional(),
	method: z.enum(METHODS, `The method must be one of ${METHODS.join(', ')}.`).optional(),
	country: text.optional().describe('ISO 3166-1 alpha-3; finds samples of several countries by each of them'),
	source: text.optional(),
	q: text
		.optional()
		.describe(
			'Words looked for in authors, title, journal, year, tooth, root, scope, country, method, measure, locator, category and note. ' +
				'All must be there; each may be the beginning of a word; "in quotes" they must stand together.'
		)
};

export const entriesQuerySchema = z.strictObject({
	...entryFilterFields,
	sort: z
		.enum([...ENTRY_SORTS, ...ENTRY_SORTS.map((name) => `-${name}` as const)], ORDER_MESSAGE)
		.default('id')
		.describe('A leading - reverses the order'),
	cursor,
	limit
});
export type EntriesQuery = z.infer<typeof entriesQuerySchema>;

/** Filters of a download of the table: those of a page of it. */
export const tableQuerySchema = z.strictObject(entryFilterFields);
export type EntryFilters = z.infer<typeof tableQuerySchema>;

const figureSchema = z.object({
	category: z.string(),
	count: z.number().int().nullable(),
	percent: z.number().nullable(),
	countDerived: z.boolean().describe('The count was computed from a percentage'),
	note: z.string()
});

const entrySchema = z.object({
	id: z.number().int(),
	source: z.string(),
	title: z.string().nullable(),
	year: z.number().int().nullable(),
	locator: z.string(),
	tooth: z.string(),
	root: z.string(),
	scope: z.string(),
	country: z.string(),
	method: z.string(),
	subgroup: z.string(),
	total: z.number().int().nullable(),
	measure: z.string(),
	state: z.enum(['draft', 'in-review', 'published', 'withdrawn']),
	provenance: z.enum(['read', 'secondary', 'memory']),
	verified: z.boolean(),
	figures: z.array(figureSchema)
});
export type EntryDto = z.infer<typeof entrySchema>;

const pageFields = {
	total: z.number().int().describe('How many match, over all pages'),
	position: z
		.number()
		.int()
		.describe('Number of the first one of this page among all that match; 0 where none is'),
	nextCursor: z.string().nullable(),
	previousCursor: z.string().nullable()
};

export const entriesSchema = z.object({ entries: z.array(entrySchema), ...pageFields });

const revisionSchema = z.object({
	number: z.number().int(),
	at: z.iso.datetime(),
	who: z.string(),
	why: z.string(),
	before: z.unknown(),
	after: z.unknown()
});

export const entryWithRevisionsSchema = entrySchema.extend({ revisions: z.array(revisionSchema) });

const sourceWords = text
	.optional()
	.describe('Words looked for in authors, title, journal, year, DOI, PMID and PMCID');

export const sourcesQuerySchema = z.strictObject({
	q: sourceWords,
	sort: z
		.enum([...SOURCE_SORTS, ...SOURCE_SORTS.map((name) => `-${name}` as const)], ORDER_MESSAGE)
		.default('id')
		.describe('A leading - reverses the order'),
	cursor,
	limit
});
export type SourcesQuery = z.infer<typeof sourcesQuerySchema>;

/** Which sources a bibliography holds. */
export const bibliographyQuerySchema = z.strictObject({ q: sourceWords });

export const CITATION_FORMATS = ['vancouver', 'bibtex', 'ris', 'csl'] as const;
export type CitationFormat = (typeof CITATION_FORMATS)[number];

export const sourceQuerySchema = z.strictObject({
	format: z
		.enum(CITATION_FORMATS, `The format must be one of ${CITATION_FORMATS.join(', ')}.`)
		.optional()
		.describe('A citation in this format instead of the answer described here')
});

const sourceSummarySchema = z.object({
	id: z.string(),
	title: z.string().nullable(),
	authors: z.string().describe('Family names; empty when none was seen'),
	year: z.number().int().nullable(),
	journal: z.string().nullable(),
	doi: z.string().nullable(),
	citable: z.boolean(),
	retracted: z.boolean(),
	entries: z.number().int()
});
export type SourceSummary = z.infer<typeof sourceSummarySchema>;

export const sourcesSchema = z.object({ sources: z.array(sourceSummarySchema), ...pageFields });

export const sourceSchema = sourceSummarySchema.extend({
	csl: z.record(z.string(), z.unknown()).describe('The source as CSL-JSON')
});
export type SourceDto = z.infer<typeof sourceSchema>;

export const healthSchema = z.object({ status: z.literal('ok'), tableRevision: z.number().int() });

const nullableNumber = z.number().nullable();

/** One row of the whole table, with the columns of data/literature/observations.csv. */
const observationSchema = z.object({
	source_id: z.string(),
	locator: z.string(),
	tooth: z.string(),
	root: z.string(),
	scope: z.string(),
	country: z.string(),
	method: z.string(),
	subgroup: z.string(),
	measure: z.string(),
	category: z.string(),
	count: nullableNumber,
	total: nullableNumber,
	percent: nullableNumber,
	count_derived: z.enum(['yes', 'no']),
	provenance: z.enum(['read', 'secondary', 'memory']),
	note: z.string()
});
export type Observation = z.infer<typeof observationSchema>;

/** Columns of a table that goes out, in the order of the file that comes in. */
export const OBSERVATION_COLUMNS = observationSchema.keyof().options;

export const wholeTableSchema = z.object({
	revision: z.number().int().describe('Revision of the table'),
	date: z.iso.datetime().describe('When this revision was published'),
	licence: z.string(),
	filters: tableQuerySchema.describe('What the rows were narrowed to; empty for the whole table'),
	rows: z.array(observationSchema)
});

/** Something the table took from a source besides its entries, in words. */
export interface SourceFact {
	head: string;
	figures: string;
	detail: string;
	/** Null where it was worked out rather than read. */
	provenance: 'read' | 'secondary' | 'memory' | null;
	verified: boolean;
}
