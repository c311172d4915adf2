import { describe, expect, it } from 'vitest';
import { forgetRecent, keepRecent, readRecent } from './recent';

function store(initial?: string) {
	let text = initial ?? null;
	return {
		getItem: () => text,
		setItem: (_key: string, value: string) => void (text = value),
		removeItem: () => void (text = null)
	};
}

/** What a browser does that blocks storage. */
const blocked = {
	getItem: () => {
		throw new Error('SecurityError');
	},
	setItem: () => {
		throw new Error('QuotaExceededError');
	},
	removeItem: () => {
		throw new Error('SecurityError');
	}
};

describe('recent look-ups', () => {
	it('are kept newest first, each address once, eight at most', () => {
		const kept = store();
		for (const number of [1, 2, 3, 4, 5, 6, 7, 8, 9, 3])
			keepRecent({ title: `Place ${number}`, address: `/teeth/${number}` }, kept);
		expect(
			readRecent(kept)
				.map(({ address }) => address.slice(7))
				.join()
		).toBe('3,9,8,7,6,5,4,2');
		forgetRecent(kept);
		expect(readRecent(kept)).toEqual([]);
	});

	it('fail in silence where storage is blocked', () => {
		expect(readRecent(blocked)).toEqual([]);
		expect(keepRecent({ title: 'Upper canine', address: '/teeth/maxillary-canine' }, blocked)).toHaveLength(
			1
		);
		expect(() => forgetRecent(blocked)).not.toThrow();
		expect(readRecent(null)).toEqual([]);
	});

	it.each([
		'{',
		'null',
		'"text"',
		'[1, null, "x"]',
		'[{"title": "a"}]',
		'[{"title": "", "address": "/"}]',
		'[{"title": "a", "address": "https://elsewhere.example"}]',
		'[{"title": "a", "address": "//elsewhere.example"}]',
		'[{"title": "a", "address": "/\\\\elsewhere.example"}]',
		'[{"title": "a", "address": "javascript:alert(1)"}]'
	])('takes nothing from storage that somebody has spoilt: %s', (text) => {
		expect(readRecent(store(text))).toEqual([]);
	});

	it('keeps nothing but the name and the address', () => {
		const kept = store();
		keepRecent({ title: 'a', address: '/', more: 'x' } as { title: string; address: string }, kept);
		expect(kept.getItem()).toBe('[{"title":"a","address":"/"}]');
	});
});
