import type { z } from 'zod';
import type { FilterFields } from '$lib/filterQuery';
import { readQuery } from '../api/endpoint';
import { Problem, type FieldError } from '../api/problem';

/**
 * Reads a list from the fields of an address. A field that cannot be used is left out and reported, so that a page still answers and says
 * at which field it went wrong.
 * @param fields names and values as typed
 * @param read does the reading; its 422 names the fields
 */
export async function readLeavingOut<Schema extends z.ZodType, Result>(
	fields: FilterFields,
	schema: Schema,
	read: (query: z.infer<Schema>) => Promise<Result>
): Promise<{ result: Result; query: z.infer<Schema>; errors: FieldError[] }> {
	const errors: FieldError[] = [];
	for (let left = fields; ;) {
		try {
			const query = readQuery(new URLSearchParams(left), schema);
			return { result: await read(query), query, errors };
		} catch (problem) {
			if (!(problem instanceof Problem) || problem.status !== 422) throw problem;
			const wrong = new Set(problem.errors.map(({ path }) => path.split('.')[0]));
			const kept = left.filter(([name]) => !wrong.has(name));
			if (kept.length === left.length) throw problem;
			errors.push(...problem.errors);
			left = kept;
		}
	}
}
