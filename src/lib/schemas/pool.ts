import { z } from 'zod';
import { summarySchema, tauSchema } from './common';

const MOST_STUDIES = 2000;
const MOST_TOTAL = 10_000_000;

const whole = z
	.number('Give a whole number.')
	.int('Give a whole number.')
	.max(MOST_TOTAL, 'Give a number up to 10,000,000.');

export const poolRequestSchema = z.strictObject({
	studies: z
		.array(
			z
				.strictObject({
					events: whole.min(0, 'Events cannot be negative.'),
					total: whole.min(1, 'A study has at least one root.')
				})
				.refine(({ events, total }) => events <= total, {
					path: ['events'],
					message: 'Events cannot be more than the total.'
				})
		)
		.min(1, 'Give at least one study.')
		.max(MOST_STUDIES, `Give at most ${MOST_STUDIES} studies.`),
	level: z
		.number('Give a level, such as 0.95.')
		.min(0.5, 'The level must be 0.5 or more.')
		.max(0.999, 'The level must be 0.999 or less.')
		.optional()
		.describe('Level of the intervals; 0.95 by default')
});

export const poolResponseSchema = z.object({
	studies: z.number().int(),
	pooled: summarySchema,
	predictive: summarySchema,
	tau: tauSchema,
	observed: z.object({ min: z.number(), max: z.number() }).nullable()
});
