import { z } from 'zod';
import { QUESTIONS } from './appraisal';
import { APPRAISAL_ANSWERS } from './terms';
import { sourceSchema } from './table';

const LONG = 'This is too long.';
const line = (most: number) => z.string().trim().max(most, LONG).default('');
const DOI_MESSAGE = 'Give a DOI such as 10.1000/182, or its address.';

/** Reason of a change; what the record of a source shows beside it. */
export const reasonSchema = z.string('Say why.').trim().min(3, 'Say why, in a few words.').max(500, LONG);

/** The form of a source: one field each, as typed. */
export const sourceFieldsSchema = z
	.object({
		type: z
			.string()
			.trim()
			.regex(/^[a-z][a-z-]{1,40}$/, 'Choose a kind of source.'),
		title: line(1000),
		authors: line(20_000),
		journal: line(500),
		year: z
			.string()
			.trim()
			.regex(/^((1[5-9]|20)\d\d)?$/, 'Give a year such as 1998, or nothing.')
			.default(''),
		volume: line(50),
		issue: line(50),
		page: line(50),
		publisher: line(300),
		doi: line(300).refine((text) => text === '' || /10\.\d{4,9}\/\S+$/.test(text), DOI_MESSAGE),
		pmid: line(20).refine((text) => /^\d*$/.test(text), 'A PMID has digits only.'),
		pmcid: line(20).refine((text) => /^(PMC\d+)?$/i.test(text), 'A PMCID looks like PMC7881390.'),
		url: line(1000).refine(
			(text) => text === '' || /^https?:\/\/\S+$/.test(text),
			'Give an address that begins with https://.'
		),
		note: line(5000)
	})
	.refine(({ title, doi, pmid, authors }) => title || doi || pmid || authors, {
		path: ['title'],
		message: 'Give at least a title, an author, a DOI or a PMID: nobody could find the source otherwise.'
	});
export type SourceFields = z.infer<typeof sourceFieldsSchema>;

/** Answers of the appraisal form. */
export const appraisalSchema = z.object(
	Object.fromEntries(
		QUESTIONS.map((question) => [question, z.enum(APPRAISAL_ANSWERS, 'Choose an answer.')])
	) as Record<(typeof QUESTIONS)[number], z.ZodEnum<{ [K in (typeof APPRAISAL_ANSWERS)[number]]: K }>>
);

const name = z.strictObject({
	family: z.string().trim().min(1).max(200).optional(),
	given: z.string().trim().min(1).max(200).optional(),
	literal: z.string().trim().min(1).max(300).optional()
});
const optionalText = (most: number) =>
	z.string().trim().min(1, 'Leave the field out instead.').max(most, LONG).optional();

/** A source as the API takes it: the fields of CSL-JSON that the product reads. */
const cslSchema = z
	.strictObject({
		type: z.string().regex(/^[a-z][a-z-]{1,40}$/, 'Give a type of CSL-JSON, such as article-journal.'),
		title: optionalText(1000),
		author: z.array(name).max(500).optional(),
		issued: z
			.strictObject({ 'date-parts': z.array(z.array(z.number().int()).min(1).max(3)).length(1) })
			.optional(),
		'container-title': optionalText(500),
		volume: optionalText(50),
		issue: optionalText(50),
		page: optionalText(50),
		publisher: optionalText(300),
		edition: optionalText(50),
		DOI: optionalText(300).refine(
			(text) => text === undefined || /10\.\d{4,9}\/\S+$/.test(text),
			DOI_MESSAGE
		),
		PMID: optionalText(20),
		PMCID: optionalText(20),
		URL: optionalText(1000).refine(
			(text) => text === undefined || /^https?:\/\/\S+$/.test(text),
			'Give an address.'
		),
		note: optionalText(5000)
	})
	.describe('The source as CSL-JSON');

export const newSourceSchema = z.strictObject({
	csl: cslSchema,
	why: reasonSchema.optional(),
	evenIfDuplicate: z
		.boolean()
		.default(false)
		.describe('Save although the table seems to have this source already (409 names them otherwise)')
});

export const sourceChangeSchema = z
	.strictObject({
		csl: cslSchema.optional(),
		retraction: z
			.strictObject({ reason: reasonSchema, notice: optionalText(300) })
			.nullable()
			.optional()
			.describe('Marks the source retracted, or lifts the mark with null'),
		appraisal: z
			.strictObject({ answers: appraisalSchema, note: z.string().max(5000, LONG).default('') })
			.nullable()
			.optional(),
		why: reasonSchema
	})
	.refine(
		({ csl, retraction, appraisal }) =>
			csl !== undefined || retraction !== undefined || appraisal !== undefined,
		{ message: 'Change the citation, the retraction or the appraisal.' }
	);

export const sourceRemovalSchema = z.strictObject({ why: reasonSchema });
export const removedSourceSchema = z.object({ removed: z.string() });

/** A source with what educators keep about it. */
export const keptSourceSchema = sourceSchema.extend({
	revision: z
		.number()
		.int()
		.describe('Number of its newest revision, for If-Match; 0 if nobody has changed it'),
	retraction: z.object({ at: z.string(), reason: z.string(), notice: z.string().nullable() }).nullable(),
	appraisal: z
		.object({
			at: z.string(),
			grade: z.enum(['low', 'some', 'high']),
			profile: z.record(z.string(), z.enum(['low', 'some', 'high'])),
			answers: appraisalSchema,
			note: z.string()
		})
		.nullable()
});
export type KeptSource = z.infer<typeof keptSourceSchema>;
