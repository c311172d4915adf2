import { describe, expect, it } from 'vitest';
import { canonical, remember } from './cache';
import type { Filters } from './types';

describe('canonical filters', () => {
	it('are one key for equal filters, whatever their order and repeats', () => {
		const one: Filters = {
			methods: ['cbct', 'micro-ct'],
			countries: ['BRA', 'CHN'],
			yearFrom: 1990,
			minTotal: 50,
			exclude: ['b', 'a']
		};
		const same: Filters = {
			exclude: ['a', 'b', 'a'],
			minTotal: 50,
			yearFrom: 1990,
			countries: ['CHN', 'BRA', 'CHN'],
			methods: ['micro-ct', 'cbct']
		};
		expect(JSON.stringify(canonical(same))).toBe(JSON.stringify(canonical(one)));
		expect(canonical(same)).toEqual({ ...one, exclude: ['a', 'b'] });
	});

	it('take empty lists and absent values as no filter', () => {
		const blank: Filters = { methods: [], countries: [], exclude: [], yearFrom: undefined };
		expect(JSON.stringify(canonical(blank))).toBe('{}');
	});

	it.each<[string, Filters]>([
		['methods', { methods: ['cbct'] }],
		['countries', { countries: ['BRA'] }],
		['yearFrom', { yearFrom: 2000 }],
		['yearTo', { yearTo: 2000 }],
		['minTotal', { minTotal: 1 }],
		['exclude', { exclude: ['a'] }]
	])('keep %s', (_, filters) => {
		expect(canonical(filters)).toEqual(filters);
	});

	it('leave the filters they were given as they are', () => {
		const filters: Filters = { methods: ['micro-ct', 'cbct'] };
		canonical(filters);
		expect(filters).toEqual({ methods: ['micro-ct', 'cbct'] });
	});
});

describe('remember', () => {
	it('computes once for two callers at once and for one after them', async () => {
		const kept = new Map<string, Promise<string>>();
		let computed = 0;
		const compute = () => Promise.resolve(`answer ${++computed}`);
		const answers = await Promise.all([remember(kept, 'a', compute), remember(kept, 'a', compute)]);
		expect([...answers, await remember(kept, 'a', compute)]).toEqual(['answer 1', 'answer 1', 'answer 1']);
		expect(await remember(kept, 'b', compute)).toBe('answer 2');
	});

	it('does not keep a failure', async () => {
		const kept = new Map<string, Promise<string>>();
		const failing = remember(kept, 'a', () => Promise.reject(new Error('out of threads')));
		await expect(failing).rejects.toThrow('out of threads');
		expect(kept.size).toBe(0);
		expect(await remember(kept, 'a', () => Promise.resolve('answer'))).toBe('answer');
	});

	it('leaves a newer calculation alone when an older one of the same key fails', async () => {
		const kept = new Map<string, Promise<string>>();
		let fail: (reason: Error) => void = () => undefined;
		const older = remember(kept, 'a', () => new Promise<string>((_, reject) => (fail = reject)));
		kept.delete('a');
		const newer = remember(kept, 'a', () => Promise.resolve('answer'));
		fail(new Error('late'));
		await expect(older).rejects.toThrow('late');
		expect(kept.get('a')).toBe(newer);
	});
});
