import { z } from 'zod';
import { APPRAISAL_FILTERS, POOLED_METHODS } from './terms';

export const probabilitySchema = z.number().min(0).max(1).describe('A probability, 0 to 1, unrounded');

const intervalSchema = z
	.tuple([probabilitySchema, probabilitySchema])
	.describe('[lower, upper], 95 % unless a level was asked for');

export const summarySchema = z
	.object({ mean: probabilitySchema, median: probabilitySchema, interval: intervalSchema })
	.describe('Posterior mean, median and equal-tailed interval of a proportion');

export const tauSchema = z
	.object({ mean: z.number(), median: z.number(), interval: z.tuple([z.number(), z.number()]) })
	.describe('Spread between populations, logit scale');

export const estimateSchema = z.object({ mean: probabilitySchema, interval: intervalSchema });

const YEAR_MESSAGE = 'Give a year, such as 1998.';
const TOTAL_MESSAGE = 'Give a whole number, at least 1.';

// A body writes numbers as numbers, an address as text.
const year = <Schema extends z._ZodNumber>(number: Schema) =>
	number
		.int(YEAR_MESSAGE)
		.min(1900, 'Give a year from 1900.')
		.max(2100, 'Give a year up to 2100.')
		.optional();
const total = <Schema extends z._ZodNumber>(number: Schema) =>
	number
		.int(TOTAL_MESSAGE)
		.min(1, TOTAL_MESSAGE)
		.max(10_000_000, 'Give a number up to 10,000,000.')
		.optional();

const methodSchema = z.enum(POOLED_METHODS, `The method must be one of ${POOLED_METHODS.join(', ')}.`);
const countrySchema = z
	.string()
	.regex(/^[A-Z]{3}$/, 'Give a country as its three capital letters (ISO 3166 alpha-3), such as BRA.');
const sourceIdSchema = z.string().min(1, 'Give a source id.').max(200, 'A source id is shorter.');

const appraisalSchema = z
	.enum(APPRAISAL_FILTERS, `The appraisal must be one of ${APPRAISAL_FILTERS.join(', ')}.`)
	.optional()
	.describe(
		'Only appraised sources (any), or those whose appraisal leaves at most some, or only low, concern'
	);

const yearsInOrder = (filters: { yearFrom?: number; yearTo?: number }) =>
	filters.yearFrom === undefined || filters.yearTo === undefined || filters.yearFrom <= filters.yearTo;
const YEARS_MESSAGE = { path: ['yearTo'], message: 'The last year must not lie before the first.' };

/** Filters as they stand in a request body. */
export const filtersSchema = z
	.strictObject({
		methods: z.array(methodSchema).max(20).optional(),
		countries: z.array(countrySchema).max(100).optional(),
		yearFrom: year(z.number(YEAR_MESSAGE)),
		yearTo: year(z.number(YEAR_MESSAGE)),
		minTotal: total(z.number(TOTAL_MESSAGE)),
		appraisal: appraisalSchema,
		exclude: z.array(sourceIdSchema).max(500).optional()
	})
	.refine(yearsInOrder, YEARS_MESSAGE)
	.describe('Narrow the samples that enter; an absent field narrows nothing');

/** Filters as they stand in an address: `?method=cbct&method=micro-ct&country=BRA&minTotal=100`. */
export const filtersQuerySchema = z
	.strictObject({
		method: z.array(methodSchema).max(20).optional(),
		country: z.array(countrySchema).max(100).optional(),
		yearFrom: year(z.coerce.number(YEAR_MESSAGE)),
		yearTo: year(z.coerce.number(YEAR_MESSAGE)),
		minTotal: total(z.coerce.number(TOTAL_MESSAGE)),
		appraisal: appraisalSchema,
		exclude: z.array(sourceIdSchema).max(500).optional()
	})
	.refine(yearsInOrder, YEARS_MESSAGE);

/** Names of the address that may repeat. */
export const FILTER_LISTS = ['method', 'country', 'exclude'] as const;

/** Filters in force, as the estimator takes them. */
export type FiltersInForce = z.infer<typeof filtersSchema>;

/** The filters of an address as the body writes them. */
export function filtersOfQuery(query: z.infer<typeof filtersQuerySchema>): FiltersInForce {
	const { method, country, ...rest } = query;
	return { ...rest, ...(method && { methods: method }), ...(country && { countries: country }) };
}

/** RFC 9457, as every failure under /api/v1 is answered. */
export const problemSchema = z.object({
	type: z.string(),
	title: z.string(),
	status: z.number().int(),
	detail: z.string(),
	errors: z.array(z.object({ path: z.string(), message: z.string() }))
});
