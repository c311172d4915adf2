import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Problem } from '../api/problem';
import { decodeCursor, encodeCursor } from './paging';

// What a database may hold: any text, and numbers that JSON can write.
const part = fc.oneof(
	fc.string({ unit: 'grapheme' }),
	fc.double({ noNaN: true, noDefaultInfinity: true }).map((x) => (x === 0 ? 0 : x)),
	fc.integer()
);

describe('a cursor', () => {
	it('is read as it was written, and fits into an address as it is', () => {
		fc.assert(
			fc.property(fc.string({ unit: 'grapheme' }), part, part, (order, key, id) => {
				const cursor = encodeCursor(order, key, id);
				expect(decodeCursor(cursor, order)).toEqual({ order, key, id });
				expect(encodeURIComponent(cursor)).toBe(cursor);
			})
		);
	});

	const refusal = (cursor: string, order = 'id') => {
		try {
			decodeCursor(cursor, order);
		} catch (error) {
			return error;
		}
		return null;
	};

	it.each([
		['another order', encodeCursor('-year', 2001, 4)],
		['the same order the other way', encodeCursor('-id', 3, 3)],
		['rubbish', 'rubbish'],
		['nothing', ''],
		['JSON of another shape', Buffer.from('{"order":"id"}').toString('base64url')],
		['JSON that is no object', Buffer.from('null').toString('base64url')],
		['a number that is none', Buffer.from('{"order":"id","key":1e999,"id":1}').toString('base64url')],
		['a key that is a list', Buffer.from('{"order":"id","key":[1],"id":1}').toString('base64url')]
	])('of %s is refused with 422 at its field', (_, cursor) => {
		const error = refusal(cursor);
		expect(error).toBeInstanceOf(Problem);
		expect(error).toMatchObject({ status: 422, errors: [{ path: 'cursor' }] });
	});

	it('of arbitrary text is refused with 422, never with another error', () => {
		fc.assert(
			fc.property(fc.string({ unit: 'binary' }), (text) => {
				expect(refusal(text)).toMatchObject({ status: 422 });
			})
		);
	});
});
