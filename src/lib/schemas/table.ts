import { z } from 'zod';
import { METHODS } from './terms';

const MEASURES = [
	'configuration',
	'canal-count',
	'root-count',
	'foramen-count',
	'feature',
	'confluence',
	'extra-canal-confluence'
] as const;

const ENTRY_SORTS = ['id', 'source', 'tooth', 'year', 'total'] as const;
const DEFAULT_LIMIT = 50;

const limit = z.coerce
	.number('Give a number from 1 to 200.')
	.int('Give a number from 1 to 200.')
	.min(1, 'Give a number from 1 to 200.')
	.max(200, 'Give a number from 1 to 200.')
	.default(DEFAULT_LIMIT);
const text = z.string().trim().max(200, 'This is too long.');

export const entriesQuerySchema = z.strictObject({
	tooth: text.optional(),
	root: text.optional(),
	measure: z.enum(MEASURES, `The measure must be one of ${MEASURES.join(', ')}.`).optional(),
	method: z.enum(METHODS, `The method must be one of ${METHODS.join(', ')}.`).optional(),
	country: text.optional(),
	source: text.optional(),
	q: text.optional().describe('Words looked for in source, title, scope, locator and note'),
	sort: z
		.enum([...ENTRY_SORTS, ...ENTRY_SORTS.map((name) => `-${name}` as const)], 'This order is not known.')
		.default('id')
		.describe('A leading - reverses the order'),
	cursor: z.string().max(500, 'This cursor is not one of ours.').optional(),
	limit
});
export type EntriesQuery = z.infer<typeof entriesQuerySchema>;

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

export const entriesSchema = z.object({
	entries: z.array(entrySchema),
	total: z.number().int(),
	nextCursor: z.string().nullable()
});

const revisionSchema = z.object({
	number: z.number().int(),
	at: z.iso.datetime(),
	who: z.string(),
	why: z.string(),
	before: z.unknown(),
	after: z.unknown()
});

export const entryWithRevisionsSchema = entrySchema.extend({ revisions: z.array(revisionSchema) });

export const sourcesQuerySchema = z.strictObject({
	q: text.optional(),
	cursor: z.string().max(500, 'This cursor is not one of ours.').optional(),
	limit
});

/** The address of one source takes no parameter. */
export const sourceQuerySchema = z.strictObject({});

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

export const sourcesSchema = z.object({
	sources: z.array(sourceSummarySchema),
	total: z.number().int(),
	nextCursor: z.string().nullable()
});

export const sourceSchema = sourceSummarySchema.extend({
	csl: z.record(z.string(), z.unknown()).describe('The source as CSL-JSON')
});
export type SourceDto = z.infer<typeof sourceSchema>;

export const healthSchema = z.object({ status: z.literal('ok'), tableRevision: z.number().int() });
