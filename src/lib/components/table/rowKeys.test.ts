import { describe, expect, it } from 'vitest';
import { rowAfterKey } from './rowKeys';

describe('the row a key leads to', () => {
	it.each([
		['ArrowDown', 1, 2],
		['ArrowUp', 1, 0],
		['Home', 2, 0],
		['End', 0, 3],
		['ArrowUp', 0, null],
		['ArrowDown', 3, null],
		['End', 3, null],
		['Enter', 1, null],
		['constructor', 1, null],
		['ArrowDown', -1, null]
	])('%s from %i is %j of four', (key, at, to) => {
		expect(rowAfterKey(key, at, 4)).toBe(to);
	});

	it('is none in an empty table', () => {
		expect(rowAfterKey('Home', 0, 0)).toBeNull();
	});
});
