import { z } from 'zod';
import { summarySchema } from './common';

const palmerSchema = z.object({ letters: z.array(z.string()), bracket: z.array(z.string()) });

const rootSummarySchema = z.object({
	id: z.string(),
	name: z.string(),
	entries: z.number().int().describe('Published entries about this root'),
	studies: z.number().int().describe('Sources of these entries')
});

/** A tooth in the list of teeth. */
const toothSummarySchema = z.object({
	id: z.string(),
	name: z.string(),
	iso: z.array(z.string()).describe('ISO 3950, right and left'),
	universal: z.array(z.string()),
	palmer: palmerSchema,
	roots: z.array(rootSummarySchema)
});

export const teethSchema = z.object({ teeth: z.array(toothSummarySchema) });
export type ToothSummary = z.infer<typeof toothSummarySchema>;

/** A study of a figure, with the place in its source. */
export const studySchema = z.object({
	source: z.string(),
	entry: z.number().int(),
	locator: z.string(),
	country: z.string(),
	method: z.string(),
	events: z.number().int(),
	total: z.number().int()
});
export type StudyDto = z.infer<typeof studySchema>;

/** A feature of a tooth or root, pooled. */
export const featureSchema = z.object({
	id: z.string(),
	name: z.string(),
	pooled: summarySchema,
	predictive: summarySchema,
	observed: z.object({ min: z.number(), max: z.number() }).nullable(),
	studies: z.array(studySchema)
});
export type FeatureDto = z.infer<typeof featureSchema>;

/** A sample's distribution of counts, e.g. of the number of roots. */
const countSampleSchema = z.object({
	source: z.string(),
	entry: z.number().int(),
	locator: z.string(),
	country: z.string(),
	method: z.string(),
	total: z.number().int(),
	counts: z.array(z.object({ category: z.string(), count: z.number().int() }))
});

/** A published mean, with its place. */
const measurementSchema = z.object({
	source: z.string(),
	locator: z.string(),
	tooth: z.string(),
	root: z.string(),
	scope: z.string(),
	country: z.string(),
	method: z.string(),
	quantity: z.string(),
	n: z.number().int().nullable(),
	mean: z.number().nullable(),
	sd: z.number().nullable(),
	min: z.number().nullable(),
	max: z.number().nullable(),
	unit: z.string(),
	provenance: z.enum(['read', 'secondary', 'memory']),
	verified: z.boolean().describe('False: recalled, not seen in the source'),
	note: z.string()
});
export type MeasurementDto = z.infer<typeof measurementSchema>;

export const toothSchema = toothSummarySchema.extend({
	tableRevision: z.number().int(),
	usualForms: z.string(),
	rootCounts: z.array(countSampleSchema),
	canalCounts: z.array(countSampleSchema),
	features: z.array(featureSchema),
	lengths: z.array(measurementSchema)
});
export type ToothDto = z.infer<typeof toothSchema>;
