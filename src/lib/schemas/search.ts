import { z } from 'zod';
import { SEARCH_KINDS } from './terms';

const LIMIT_MESSAGE = 'Give a number from 1 to 50.';
/** What a person may mean by one phrase is short. */
const MOST_CHARACTERS = 100;

export const searchQuerySchema = z.strictObject({
	q: z
		.string()
		.trim()
		.max(MOST_CHARACTERS, `A search has up to ${MOST_CHARACTERS} characters.`)
		.default('')
		.describe(
			'What was typed: a tooth number, words for a tooth or root, a feature, an author and year, a country'
		),
	limit: z.coerce
		.number(LIMIT_MESSAGE)
		.int(LIMIT_MESSAGE)
		.min(1, LIMIT_MESSAGE)
		.max(50, LIMIT_MESSAGE)
		.default(8),
	numbers: z
		.enum(['iso', 'universal', 'palmer'], 'The numbers must be iso, universal or palmer.')
		.default('iso')
		.describe('The system in which a bare number is read first and tooth numbers are written')
});

/** @internal for its test */
export const searchHitSchema = z.object({
	kind: z.enum(SEARCH_KINDS),
	title: z.string(),
	detail: z.string().describe('How the words were read, or what more there is to say; may be empty'),
	address: z.string().describe('Path of the page on this server')
});
export type SearchHit = z.infer<typeof searchHitSchema>;

export const searchSchema = z.object({
	query: z.string(),
	hits: z.array(searchHitSchema).describe('The likeliest kind first, those of one kind together')
});
