import { z } from 'zod';
import { Problem } from '../api/problem';

const cursorSchema = z.object({
	order: z.string(),
	key: z.union([z.string(), z.number()]),
	id: z.union([z.string(), z.number()])
});

/** Where the next page starts: after the row with this key and id, in this order. Opaque to the caller. */
export function encodeCursor(order: string, key: string | number, id: string | number): string {
	return Buffer.from(JSON.stringify({ order, key, id })).toString('base64url');
}

/**
 * Reads a cursor made by `encodeCursor`.
 * @throws Problem 422 if it is none, or belongs to another order
 */
export function decodeCursor(cursor: string, order: string) {
	const refused = new Problem(422, 'This cursor does not belong to this list.', [
		{ path: 'cursor', message: 'Take the cursor from the answer before, with the same order.' }
	]);
	try {
		const value = cursorSchema.parse(JSON.parse(Buffer.from(cursor, 'base64url').toString('utf8')));
		if (value.order !== order) throw refused;
		return value;
	} catch {
		throw refused;
	}
}

/** A LIKE pattern that finds the words as typed, with SQL's own wildcards taken literally. */
export function likePattern(words: string): string {
	return `%${words.replace(/[\\%_]/g, (character) => `\\${character}`)}%`;
}
