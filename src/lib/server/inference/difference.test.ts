import { describe, expect, it } from 'vitest';
import { pointGrid } from '../../../../tests/support/inventedRoot';
import { differenceOf, gridOfSummary } from './difference';
import { expit, logit } from './special';

const twoPoints = { p: Float64Array.of(0.2, 0.6), mass: Float64Array.of(0.25, 0.75) };

describe('differenceOf', () => {
	it('is exact for point masses: worked by hand', () => {
		// 0.25 × (0.2 − 0.4) + 0.75 × (0.6 − 0.4) = 0.1; the first is larger in three of four.
		const { mean, interval, firstLarger } = differenceOf(twoPoints, pointGrid(0.4));
		expect(mean).toBeCloseTo(0.1, 12);
		expect(firstLarger).toBeCloseTo(0.75, 12);
		expect(interval[0]).toBeCloseTo(-0.2, 3);
		expect(interval[1]).toBeCloseTo(0.2, 3);
	});

	it('is even for two alike, and turns its sign with the sides', () => {
		const alike = differenceOf(twoPoints, twoPoints);
		expect(alike.mean).toBeCloseTo(0, 12);
		expect(alike.firstLarger).toBeCloseTo(0.5, 12);
		const one = differenceOf(twoPoints, pointGrid(0.3));
		const other = differenceOf(pointGrid(0.3), twoPoints);
		expect(other.mean).toBeCloseTo(-one.mean, 12);
		expect(other.firstLarger).toBeCloseTo(1 - one.firstLarger, 12);
	});

	it('is as wide as independent proportions make it', () => {
		// Near normals: the widths of their intervals add as the sides of a right angle.
		const narrow = (median: number, half: number) => ({
			mean: median,
			median,
			interval: [-half, half].map((step) => expit(logit(median) + step)) as [number, number]
		});
		const [first, second] = [narrow(0.6, 0.06), narrow(0.5, 0.08)];
		const wide = ({ interval }: { interval: [number, number] }) => interval[1] - interval[0];
		const apart = differenceOf(gridOfSummary(first), gridOfSummary(second));
		expect(apart.mean).toBeCloseTo(0.1, 3);
		expect(wide(apart) / Math.hypot(wide(first), wide(second))).toBeCloseTo(1, 1);
		expect(apart.firstLarger).toBeGreaterThan(0.999);
	});
});

describe('gridOfSummary', () => {
	it.each([
		[{ mean: 0.3, median: 0.29, interval: [0.2, 0.45] as [number, number] }],
		[{ mean: 0.02, median: 0.01, interval: [0.0001, 0.1] as [number, number] }]
	])('keeps median and interval of %j', (summary) => {
		const { p, mass } = gridOfSummary(summary);
		const below = (at: number) => p.reduce((sum, value, i) => sum + (value < at ? mass[i] : 0), 0);
		expect(below(summary.interval[0])).toBeCloseTo(0.025, 2);
		expect(below(summary.median)).toBeCloseTo(0.5, 2);
		expect(below(summary.interval[1])).toBeCloseTo(0.975, 2);
		expect(mass.reduce((a, b) => a + b)).toBeCloseTo(1, 12);
	});
});
