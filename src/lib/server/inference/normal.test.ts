import { describe, expect, it } from 'vitest';
import { normalCdf } from './normal';

describe('the normal distribution', () => {
	it('has the handbook values', () => {
		// Abramowitz and Stegun, table 26.1: P(1) and P(2) to 15 places; table 26.5 for the 97.5 % point.
		expect(normalCdf(1)).toBeCloseTo(0.841344746068543, 15);
		expect(normalCdf(2)).toBeCloseTo(0.977249868051821, 15);
		expect(normalCdf(1.95996398454005)).toBeCloseTo(0.975, 14);
	});

	it('is symmetric, and quiet at its ends', () => {
		for (const x of [0.1, 0.7, 2, 5, 6, 9]) expect(normalCdf(x) + normalCdf(-x)).toBeCloseTo(1, 15);
		expect([normalCdf(-50), normalCdf(50), normalCdf(-Infinity), normalCdf(Infinity)]).toEqual([0, 1, 0, 1]);
		expect(normalCdf(NaN)).toBeNaN();
	});
});
