import { z } from 'zod';
import { entrySchema, revisionSchema } from './table';
import { ENTRY_ROOTS, MEASURES, METHODS, PROVENANCES } from './terms';

const text = (most: number) => z.string('Give a text.').max(most, `At most ${most} characters.`);
const optionalNumber = z.number('Give a number.').nullable().optional();

const figureBodySchema = z.strictObject({
	category: text(100).describe(
		'A canal sequence such as 2-1 or other; a number such as 2+; joined or separate; a feature'
	),
	count: optionalNumber.describe('Worked out from the percentage and the total where it is missing'),
	percent: optionalNumber.describe('As the source prints it, 0 to 100'),
	note: text(1000).optional()
});

const fields = {
	source: text(200).describe('Id of a source of the table'),
	locator: text(300).describe('Where in the source the figures stand'),
	provenance: z.enum(PROVENANCES, `One of ${PROVENANCES.join(', ')}.`),
	tooth: text(100).describe('Slug of a tooth; empty where the source pools kinds of teeth'),
	root: z.enum(ENTRY_ROOTS, `One of ${ENTRY_ROOTS.join(', ')}.`),
	scope: text(200).describe('Which teeth or roots the total counts, e.g. all'),
	country: text(100).describe('ISO 3166-1 alpha-3, several joined by +, multi, or empty'),
	method: z.enum(METHODS, `One of ${METHODS.join(', ')}.`),
	subgroup: text(100).describe('all for the whole sample'),
	total: z.number('Give a number.').nullable(),
	measure: z.enum(MEASURES, `One of ${MEASURES.join(', ')}.`),
	figures: z.array(figureBodySchema).max(60)
};

/** An entry as POST takes it. */
export const entryBodySchema = z.strictObject(fields);
export type EntryBody = z.infer<typeof entryBodySchema>;

/** What PATCH may do. `save` is meant where only `changes` is given. */
const PATCH_ACTIONS = [
	'save',
	'ask-review',
	'take-back',
	'return',
	'publish',
	'restore',
	'confirm',
	'mark-poolable'
] as const;

export const entryPatchSchema = z.strictObject({
	action: z.enum(PATCH_ACTIONS, `One of ${PATCH_ACTIONS.join(', ')}.`).optional(),
	changes: z
		.strictObject(fields)
		.partial()
		.optional()
		.describe('save: the fields that change, figures as a whole'),
	note: text(1000).optional().describe('ask-review: for the reviewer; publish: for the revision'),
	reasons: z.array(text(500)).max(20).optional().describe('return: why, one or more'),
	reason: text(1000).optional().describe('mark-poolable: why'),
	revision: z.number().int().optional().describe('restore: which revision becomes the draft'),
	locator: text(300).optional().describe('confirm: where in the source the figures stand'),
	poolable: z.boolean().nullable().optional().describe('mark-poolable: null leaves it to the scope')
});

export const entryDeleteSchema = z.strictObject({
	reason: z.string().trim().max(1000).optional().describe('Why it is withdrawn; needed for a published entry')
});

const remarkSchema = z.object({
	level: z.enum(['error', 'warning', 'note']),
	path: z.string(),
	message: z.string()
});

/** An entry as the desk sees it. */
export const deskEntrySchema = z.object({
	id: z.number().int(),
	revision: z.number().int().describe('Number of the newest revision: send it as If-Match'),
	standing: z.enum(['never', 'published', 'withdrawn']),
	draft: z
		.object({
			state: z.enum(['draft', 'in-review']),
			author: z.string(),
			reviewer: z.string().nullable(),
			reasons: z.array(z.string())
		})
		.nullable(),
	content: entrySchema
		.pick({ source: true, locator: true, tooth: true, root: true, scope: true, country: true, method: true })
		.extend(
			entrySchema.pick({ subgroup: true, total: true, measure: true, provenance: true, figures: true }).shape
		)
		.describe('The draft; without one what is published'),
	remarks: z.array(remarkSchema).describe('What the checks say of it'),
	tableRevision: z
		.number()
		.int()
		.nullable()
		.describe('The revision of the table this made, if it changed it'),
	revisions: z.array(revisionSchema)
});

const estimate = z.object({ mean: z.number(), interval: z.tuple([z.number(), z.number()]) });
const figuresSchema = z.object({
	studies: z.number().int(),
	orifices: z.array(estimate.extend({ count: z.number().int() })),
	fates: z.array(estimate.extend({ fate: z.string() })),
	questions: z.array(
		z.object({
			id: z.string(),
			studies: z.number().int(),
			borrowed: z.boolean(),
			pooled: estimate,
			predictive: z.tuple([z.number(), z.number()])
		})
	)
});

export const tableRevisionsQuerySchema = z.strictObject({
	before: z.coerce
		.number('Give a number.')
		.int('Give a whole number.')
		.optional()
		.describe('Only earlier ones than this'),
	limit: z.coerce
		.number('Give a number from 1 to 100.')
		.int('Give a number from 1 to 100.')
		.min(1, 'Give a number from 1 to 100.')
		.max(100, 'Give a number from 1 to 100.')
		.default(20)
});

export const tableRevisionsSchema = z.object({
	revisions: z.array(
		z.object({
			revision: z.number().int(),
			at: z.iso.datetime(),
			why: z.string(),
			who: z.string().nullable().describe('Who published it; null for the shipped literature'),
			author: z.string().nullable().describe('Who wrote it, where another checked it'),
			changed: z.number().int().describe('Entries changed'),
			entries: z
				.array(
					z.object({
						entry: z.number().int(),
						change: z.enum(['published', 'withdrawn']),
						tooth: z.string(),
						root: z.string(),
						measure: z.string(),
						source: z.string()
					})
				)
				.describe('Empty where more than twenty changed'),
			effects: z
				.array(
					z.object({
						tooth: z.string(),
						root: z.string(),
						before: figuresSchema,
						after: figuresSchema.nullable()
					})
				)
				.describe(
					'Main figures of the roots concerned, before and after; after is null while it is worked out'
				)
		})
	),
	next: z.number().int().nullable().describe('Send it as before for earlier ones')
});
