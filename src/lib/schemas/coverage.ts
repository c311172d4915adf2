import { z } from 'zod';
import { probabilitySchema } from './common';

/** Which of two models a question is shown by, and how well each predicted the samples left out. */
export const methodChoiceSchema = z.object({
	shown: z
		.enum(['plain', 'method'])
		.describe('method: each group of methods has its own offset, and the figures are those of CBCT'),
	logScore: z
		.object({ plain: z.number().max(0), method: z.number().max(0) })
		.nullable()
		.describe(
			'Sum of ln of the probability given to each left-out count, nearer to 0 is better; null with fewer than three ' +
				'samples or one group of methods'
		)
});

const questionCoverageSchema = z.object({
	id: z.string(),
	samples: z.number().int().describe('Left out in turn and predicted from the others'),
	level95: probabilitySchema.describe('Share inside their 95 % range'),
	level80: probabilitySchema.describe('Share inside their 80 % range'),
	flagged: z.boolean().describe('Under 0.90 of the 95 % ranges or 0.70 of the 80 % ranges')
});

/** Coverage of one root beside its expectation; the levels are null where no question has three samples. */
export const rootCoverageSchema = z.object({
	level95: probabilitySchema.nullable(),
	level80: probabilitySchema.nullable(),
	samples: z.number().int(),
	questions: z.array(questionCoverageSchema)
});
export type RootCoverageDto = z.infer<typeof rootCoverageSchema>;

export const tableCoverageSchema = z.object({
	tableRevision: z.number().int(),
	level95: probabilitySchema.nullable(),
	level80: probabilitySchema.nullable(),
	samples: z.number().int(),
	logScore: z.number().max(0),
	roots: z
		.array(
			z.object({
				tooth: z.string(),
				root: z.string(),
				questions: z.array(
					questionCoverageSchema.extend({ logScore: z.number().max(0), method: methodChoiceSchema })
				)
			})
		)
		.describe('Roots with a question of three samples or more')
});
export type TableCoverageDto = z.infer<typeof tableCoverageSchema>;
