import { z } from 'zod';
import { estimateSchema, filtersSchema, probabilitySchema } from './common';
import { fatesSchema } from './expectation';
import { RESULTS, SEARCHES, TESTS } from './terms';

const count = (name: string) =>
	z
		.number(`Give the number of ${name}.`)
		.int(`Give the number of ${name} as a whole number.`)
		.min(1, `Give at least one for the ${name}.`);

const findingSchema = z.strictObject({
	test: z.enum(TESTS, `The test must be one of ${TESTS.join(', ')}.`),
	result: z.enum(RESULTS, `The result must be one of ${RESULTS.join(', ')}.`),
	pair: z
		.string()
		.max(20, 'Name the two canals, such as MB-ML.')
		.optional()
		.describe('With three canals: which two were tested, e.g. MB-ML')
});

export const confluenceRequestSchema = z.strictObject({
	tooth: z.string('Name the tooth, such as maxillary-first-molar.'),
	root: z.string('Name the root, such as MB.'),
	canals: count('canals negotiated'),
	orifices: count('orifices seen').optional(),
	rootsSeen: z
		.enum(['one', 'two'], 'Say one or two.')
		.optional()
		.describe('Premolars: how many roots are seen'),
	search: z.enum(SEARCHES, `The search must be one of ${SEARCHES.join(', ')}.`).optional(),
	filters: filtersSchema.optional(),
	threshold: z
		.number('Give a threshold from 0.5 to 0.999.')
		.min(0.5, 'The threshold must be 0.5 or more.')
		.max(0.999, 'The threshold must be 0.999 or less.')
		.optional()
		.describe('Probability from which canals are treated as joined; 0.90 by default'),
	findings: z.array(findingSchema).max(12, 'Give each finding once.')
});
export type ConfluenceRequest = z.infer<typeof confluenceRequestSchema>;

const fate = z.enum(['one-canal', 'shared-exit', 'meet-and-part', 'partly-shared', 'separate']);
const fateMeans = z.partialRecord(fate, probabilitySchema);

const meetSchema = estimateSchema.describe('The canals come together anywhere, whatever they do afterwards');

export const confluenceResponseSchema = z.object({
	tableRevision: z.number().int(),
	prior: z.object({ fates: fatesSchema, meet: meetSchema, anotherCanal: estimateSchema.nullable() }),
	posterior: z.object({
		fates: fatesSchema,
		meet: meetSchema,
		anotherCanal: estimateSchema.nullable().describe('Null with three canals: the table cannot say'),
		exits: z.array(estimateSchema.extend({ count: z.number().int() })),
		sequences: z.array(estimateSchema.extend({ sequence: z.string() }))
	}),
	steps: z.array(
		z.object({
			finding: findingSchema,
			fates: fateMeans,
			intervals: z.partialRecord(fate, estimateSchema.shape.interval),
			expected: z
				.object({
					meet: probabilitySchema.describe('How often this result is expected where canals meet'),
					never: probabilitySchema.describe('How often it is expected where they never do'),
					assumed: z.boolean().describe('True where that was never published'),
					sources: z.array(z.string())
				})
				.nullable()
				.describe('Null for an unclear result, which says nothing'),
			note: z.string().nullable()
		})
	),
	next: z.array(
		z.object({
			test: z.enum(TESTS),
			bits: z.number().min(0),
			results: z.array(
				z.object({
					result: z.enum(['positive', 'negative']),
					probability: probabilitySchema,
					fates: fateMeans
				})
			),
			effort: z.string(),
			note: z.string()
		})
	),
	decision: z
		.object({
			threshold: probabilitySchema,
			advice: z.enum(['treat-as-joined', 'treat-as-separate', 'undecided']).nullable(),
			furtherTestingCanChangeIt: z.boolean().nullable()
		})
		.nullable(),
	evidence: z.object({
		studies: z.number().int(),
		sources: z.array(z.string()),
		borrowed: z
			.array(z.string())
			.describe('Questions no sample of this root answers: their figures are borrowed from other roots')
	}),
	assumed: z.array(z.string()).describe('Findings used whose characteristics were never published'),
	notes: z.array(z.string()),
	cautions: z.array(z.string())
});
export type ConfluenceDto = z.infer<typeof confluenceResponseSchema>;
