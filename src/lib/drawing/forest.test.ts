import { describe, expect, it } from 'vitest';
import { layoutForest } from './forest';
import { layoutInterval } from './interval';

const summaries = {
	pooled: { mean: 0.5, interval: [0.4, 0.7] },
	predictive: { mean: 0.5, interval: [0.1, 0.9] }
} as const;

describe('layoutForest', () => {
	it('keeps a whole axis from 0 to 100 % with room at its ends', () => {
		const { ticks } = layoutForest({ studies: [], ...summaries });
		expect(ticks).toEqual([
			{ value: 0, x: 4 },
			{ value: 0.25, x: 27 },
			{ value: 0.5, x: 50 },
			{ value: 0.75, x: 73 },
			{ value: 1, x: 96 }
		]);
	});

	it('places a study and its Wilson interval on that axis', () => {
		const { rows } = layoutForest({ studies: [{ events: 0, total: 20 }], ...summaries });
		expect(rows[0]).toMatchObject({ proportion: 0, x: 4, from: 4 });
		// Newcombe 1998: 0/20 reaches to 0.1611.
		expect(rows[0].to).toBeCloseTo(4 + 92 * 0.1611, 1);
	});

	it('draws squares whose area grows with the square root of the total', () => {
		const { rows } = layoutForest({
			studies: [
				{ events: 100, total: 1600 },
				{ events: 10, total: 100 }
			],
			...summaries
		});
		expect(rows[0].side ** 2 / rows[1].side ** 2).toBeCloseTo(Math.sqrt(1600 / 100), 2);
	});

	it('draws squares whose area is the weight, where weights are given', () => {
		const { rows } = layoutForest({
			studies: [
				{ events: 5, total: 10, weight: 0.6 },
				{ events: 900, total: 1000, weight: 0.3 }
			],
			...summaries
		});
		expect(rows[0].side).toBe(15);
		expect(rows[0].side ** 2 / rows[1].side ** 2).toBeCloseTo(2, 2);
	});

	it('points the diamond at the mean, which need not be in the middle', () => {
		const { pooled } = layoutForest({ studies: [], ...summaries });
		expect(pooled).toEqual({ x: 50, from: 40.8, to: 68.4, diamond: '0,50 33.333,0 100,50 33.333,100' });
	});

	it('refuses an impossible study', () => {
		expect(() => layoutForest({ studies: [{ events: 3, total: 2 }], ...summaries })).toThrow(RangeError);
	});
});

describe('layoutInterval', () => {
	it('is in percent of the bar', () => {
		expect(layoutInterval({ mean: 0.63, interval: [0.35, 0.88] })).toEqual({ mean: 63, from: 35, width: 53 });
	});

	it('never draws an interval too thin to see, nor over the end', () => {
		expect(layoutInterval({ mean: 1, interval: [0.999, 1] })).toEqual({ mean: 100, from: 99, width: 1 });
	});

	it('refuses an interval the wrong way round', () => {
		expect(() => layoutInterval({ mean: 0.5, interval: [0.6, 0.4] })).toThrow(RangeError);
	});
});
