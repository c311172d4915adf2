import type { z } from 'zod';
import { Problem } from './api/problem';

/**
 * The query of a page's list. What it does not know or cannot read is left out rather than refused: a page that somebody opens from an old
 * link shows its list all the same.
 */
export function pageQuery<Schema extends z.ZodObject>(
	query: URLSearchParams,
	schema: Schema
): z.infer<Schema> {
	const values: Record<string, string> = {};
	for (const [name, field] of Object.entries(schema.shape)) {
		const value = query.get(name);
		if (value !== null && value !== '' && (field as z.ZodType).safeParse(value).success) values[name] = value;
	}
	return schema.parse(values);
}

/** A list, from its beginning if the address holds a cursor that is not of this list. */
export async function fromCursor<Query extends { cursor?: string }, Page>(
	query: Query,
	list: (query: Query) => Promise<Page>
): Promise<Page> {
	try {
		return await list(query);
	} catch (error) {
		if (!(error instanceof Problem) || query.cursor === undefined) throw error;
		return list({ ...query, cursor: undefined });
	}
}
