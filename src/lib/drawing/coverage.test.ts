import { describe, expect, it } from 'vitest';
import { layoutCoverage } from './coverage';

const size = { width: 400, height: 300 };
const rule = { level: 0.95, flagBelow: 0.9 };

describe('layoutCoverage', () => {
	it('draws a share above a smaller one and more samples to the right', () => {
		const { dots, expected, flag } = layoutCoverage(
			[
				{ id: 'a', samples: 3, share: 1, flagged: false },
				{ id: 'b', samples: 30, share: 0.8, flagged: true }
			],
			rule,
			size
		);
		expect(dots[0].y).toBeLessThan(dots[1].y);
		expect(dots[0].x).toBeLessThan(dots[1].x);
		expect(dots[0].y).toBeLessThan(expected.y);
		expect(expected.y).toBeLessThan(flag.y);
		expect(flag.y).toBeLessThan(dots[1].y);
	});

	it('sets questions with the same figures side by side, each to be seen', () => {
		const same = { samples: 3, share: 1, flagged: false };
		const { dots, radius } = layoutCoverage(
			[
				{ id: 'a', ...same },
				{ id: 'b', ...same }
			],
			rule,
			size
		);
		expect(dots[1].x - dots[0].x).toBeGreaterThan(radius);
		expect(dots[1].y).toBe(dots[0].y);
	});

	it('keeps every dot inside the plot, however low a share is', () => {
		const points = [0, 0.2, 0.5, 1].map((share, i) => ({
			id: String(i),
			samples: 3 + i * 20,
			share,
			flagged: share < 0.9
		}));
		const { dots, plot } = layoutCoverage(points, rule, size);
		for (const { x, y } of dots) {
			expect(x).toBeGreaterThanOrEqual(plot.left);
			expect(x).toBeLessThanOrEqual(plot.right);
			expect(y).toBeGreaterThanOrEqual(plot.top);
			expect(y).toBeLessThanOrEqual(plot.bottom);
		}
	});

	it('draws its lines without a question', () => {
		const { dots, shares, samples } = layoutCoverage([], rule, size);
		expect(dots).toEqual([]);
		expect(shares.length).toBeGreaterThan(2);
		expect(samples.map((tick) => tick.samples)).toEqual([3, 5, 10]);
	});
});
