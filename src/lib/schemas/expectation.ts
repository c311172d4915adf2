import { z } from 'zod';
import { estimateSchema, filtersSchema, probabilitySchema, summarySchema, tauSchema } from './common';
import { methodChoiceSchema, rootCoverageSchema } from './coverage';
import { featureSchema, studySchema } from './teeth';

const observedSchema = z.object({ min: probabilitySchema, max: probabilitySchema }).nullable();

const fateSchema = z.enum(['one-canal', 'shared-exit', 'meet-and-part', 'partly-shared', 'separate']);
const labelsSchema = z.object({
	vertucci: z.string().nullable(),
	weine: z.string().nullable(),
	sertBayirli: z.string().nullable(),
	ahmed: z.string()
});
const seenSchema = z.object({ min: probabilitySchema, max: probabilitySchema, studies: z.number().int() });

/** One canal sequence of a root with its probability in a new population. */
const sequenceSchema = estimateSchema.extend({
	sequence: z.string(),
	labels: labelsSchema,
	fate: fateSchema,
	observed: seenSchema
		.nullable()
		.describe('Range over the samples that name this sequence; null if none does')
});

/** A sequence of the samples that has no probability of its own. */
const rareSequenceSchema = z.object({
	sequence: z.string(),
	countedWith: z.string().describe('The sequence whose probability includes it'),
	labels: labelsSchema,
	fate: fateSchema,
	observed: seenSchema
});

const questionMethodSchema = methodChoiceSchema.extend({
	offsets: z
		.array(
			z.object({
				group: z.enum(['laboratory', 'clinical', 'radiograph']),
				mean: z.number(),
				interval: z.tuple([z.number(), z.number()]),
				studies: z.number().int()
			})
		)
		.describe(
			'How far each group of methods differs from CBCT, logit scale, if the method model is shown: laboratory is ' +
				'micro-CT, clearing and sectioning; clinical is clinical and microscope'
		)
});

const questionSchema = z.object({
	id: z.string(),
	text: z.string(),
	borrowed: z.boolean().describe('No sample of this root answers: the figures are the other roots’'),
	studies: z.array(
		studySchema.extend({
			weight: probabilitySchema.describe(
				'Share of the information the samples give about the middle population'
			)
		})
	),
	borrowedShare: probabilitySchema.describe(
		'Share of all the information about the middle population that is lent by other roots'
	),
	pooled: summarySchema.describe('The middle population'),
	predictive: summarySchema.describe('A new population, from which the next patient comes'),
	tau: tauSchema,
	observed: observedSchema,
	method: questionMethodSchema
});
export type QuestionDto = z.infer<typeof questionSchema>;

const countSchema = estimateSchema.extend({ count: z.number().int() });

export const fatesSchema = z.partialRecord(fateSchema, estimateSchema);

export const expectationSchema = z.object({
	tooth: z.string(),
	root: z.string(),
	filters: filtersSchema,
	tableRevision: z.number().int(),
	evidence: z.object({
		studies: z.number().int(),
		roots: z.number().int().describe('Roots counted by the largest sample of each source'),
		sources: z.array(z.string())
	}),
	sequences: z.array(sequenceSchema),
	rareSequences: z.array(rareSequenceSchema).describe('Other sequences that samples of this root name'),
	orifices: z.array(countSchema),
	exits: z.array(countSchema),
	fates: fatesSchema,
	features: z.array(featureSchema),
	questions: z.array(questionSchema).length(9),
	reviews: z.array(
		z.object({ source: z.string(), entry: z.number().int(), question: z.string(), percent: z.number() })
	),
	notPooled: z.array(z.object({ source: z.string(), entry: z.number().int(), reason: z.string() })),
	coverage: rootCoverageSchema
		.nullable()
		.describe('Null while it is being worked out; the next request a moment later has it')
});
export type ExpectationDto = z.infer<typeof expectationSchema>;
