import { describe, expect, it } from 'vitest';
import { compareAddress, readSide, rootAt, SIDES } from './compareState';
import { verdictOf } from './verdict';

const difference = (mean: number, interval: [number, number], firstLarger: number) => ({
	mean,
	interval,
	firstLarger
});
const wide = { a: [0.3, 0.9] as const, b: [0.1, 0.7] as const };

describe('the address of a comparison', () => {
	it('holds both sides with their filters, each apart', () => {
		const a = {
			place: 'maxillary-first-molar/MB',
			filters: [
				['method', 'cbct'],
				['method', 'micro-ct'],
				['yearFrom', '2010']
			] as [string, string][]
		};
		const b = { place: 'mandibular-first-molar/M', filters: [['country', 'BRA']] as [string, string][] };
		const { searchParams } = new URL(compareAddress(a, b), 'http://localhost');
		expect(SIDES.map((side) => readSide(searchParams, side))).toEqual([a, b]);
	});

	it('starts with a pair that can be compared, and keeps what it does not know', () => {
		for (const side of SIDES) expect(rootAt(readSide(new URLSearchParams(), side).place)).toBeDefined();
		const { place } = readSide(new URLSearchParams('a=third-eye/MB'), 'a');
		expect(place).toBe('third-eye/MB');
		expect(rootAt(place)).toBeUndefined();
	});
});

describe('verdictOf', () => {
	it('claims a difference only where its range leaves out 0', () => {
		const claimed = verdictOf(
			{
				id: 'q1',
				middle: difference(0.2, [0.05, 0.34], 0.99),
				next: difference(0.2, [-0.3, 0.6], 0.8),
				shared: 0
			},
			wide
		);
		expect(claimed[0]).toContain('more often yes on the first side: by 20 points (range +5 to +34)');
		expect(claimed[1]).toContain(
			'the first side is the higher one in about 8 in 10 pairs; the two ranges overlap'
		);
		const open = verdictOf(
			{
				id: 'q1',
				middle: difference(0.2, [-0.01, 0.4], 0.97),
				next: difference(0.2, [-0.3, 0.6], 0.8),
				shared: 0
			},
			wide
		);
		expect(open[0]).toContain('No difference shown on average');
		expect(open[0]).toContain('−1 to +40');
	});

	it('names the second side where that is the higher one', () => {
		const [onAverage, next] = verdictOf(
			{
				id: 'q1',
				middle: difference(-0.2, [-0.34, -0.05], 0.01),
				next: difference(-0.2, [-0.6, 0.3], 0.2),
				shared: 0
			},
			{ a: [0.1, 0.2], b: [0.3, 0.4] }
		);
		expect(onAverage).toContain('more often yes on the second side: by 20 points (range +5 to +34)');
		expect(next).toContain(
			'the second side is the higher one in about 8 in 10 pairs; the two ranges do not overlap'
		);
	});

	it('says when sources stand on both sides, and calls nothing higher that is about even', () => {
		const sentences = verdictOf(
			{
				id: 'q1',
				middle: difference(0, [-0.1, 0.1], 0.5),
				next: difference(0, [-0.5, 0.5], 0.52),
				shared: 3
			},
			wide
		);
		expect(sentences[1]).toContain('either side may be the higher one');
		expect(sentences[2]).toContain('3 sources answer on both sides');
	});

	it('says nothing of borrowed figures', () => {
		const [only, ...more] = verdictOf({ id: 'q7', middle: null, next: null, shared: 0 }, wide);
		expect(only).toContain('borrowed figures are no evidence');
		expect(more).toEqual([]);
	});
});
