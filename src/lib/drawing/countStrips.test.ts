import { describe, expect, it } from 'vitest';
import { layoutCountStrips } from './countStrips';

const sample = (entry: number, total: number, counts: Record<string, number>) => ({
	entry,
	total,
	counts: Object.entries(counts).map(([category, count]) => ({ category, count }))
});

describe('layoutCountStrips', () => {
	it('puts each sample at its share, with the middle one and the range', () => {
		const [one, two] = layoutCountStrips([
			sample(1, 100, { '1': 20, '2': 80 }),
			sample(2, 400, { '1': 120, '2': 280 }),
			sample(3, 25, { '1': 20, '2': 5 })
		]);
		expect(one.category).toBe('1');
		expect(one.marks.map(({ entry, x }) => [entry, x])).toEqual([
			[2, 30],
			[1, 20],
			[3, 80]
		]);
		expect(one.middle).toBeCloseTo(0.3);
		expect(one.range).toEqual([0.2, 0.8]);
		expect(two.middleX).toBe(70);
		// Area grows with the teeth: the largest has the largest radius.
		expect(one.marks[0].radius).toBe(8);
		expect(one.marks[2].radius).toBeGreaterThan(3);
	});

	it('takes a category not named as none only where all teeth were counted', () => {
		const [, two, three] = layoutCountStrips([
			sample(1, 100, { '1': 90, '2': 10 }),
			sample(2, 100, { '2': 70 }),
			sample(3, 50, { '3': 5 })
		]);
		expect(two.marks.map(({ entry }) => entry)).toEqual([1, 2]);
		expect(three.marks.map(({ entry, share }) => [entry, share])).toEqual([
			[1, 0],
			[3, 0.1]
		]);
	});

	it('says nothing of two or three from "two or more"', () => {
		const strips = layoutCountStrips([sample(1, 10, { '1': 8, '2+': 2 }), sample(2, 10, { '1': 7, '2': 3 })]);
		expect(strips.map(({ category, marks }) => [category, marks.length])).toEqual([
			['1', 2],
			['2', 1],
			['2+', 1]
		]);
	});

	it('has nothing to lay out without samples', () => {
		expect(layoutCountStrips([])).toEqual([]);
	});
});
