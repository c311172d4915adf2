import { describe, expect, it } from 'vitest';
import { normalCdf, normalQuantile } from './normal';

describe('the normal distribution', () => {
	it('has the handbook values', () => {
		// Abramowitz and Stegun, table 26.1: P(1) and P(2) to 15 places; table 26.5 for the 97.5 % point.
		expect(normalCdf(1)).toBeCloseTo(0.841344746068543, 15);
		expect(normalCdf(2)).toBeCloseTo(0.977249868051821, 15);
		expect(normalQuantile(0.975)).toBeCloseTo(1.95996398454005, 13);
		// Wichura's own check values of AS 241 (from memory): 0.25, 0.001 and 1e-20.
		expect(normalQuantile(0.25)).toBeCloseTo(-0.6744897501960817, 15);
		expect(normalQuantile(0.001)).toBeCloseTo(-3.090232306167814, 14);
		expect(normalQuantile(1e-20)).toBeCloseTo(-9.26234008979841, 13);
	});

	it('is symmetric, and quiet at its ends', () => {
		for (const x of [0.1, 0.7, 2, 5, 6, 9]) expect(normalCdf(x) + normalCdf(-x)).toBeCloseTo(1, 15);
		expect([normalCdf(-50), normalCdf(50), normalCdf(-Infinity), normalCdf(Infinity)]).toEqual([0, 1, 0, 1]);
		expect([normalQuantile(0), normalQuantile(1)]).toEqual([-Infinity, Infinity]);
		expect([normalCdf(NaN), normalQuantile(-0.1), normalQuantile(NaN)]).toEqual([NaN, NaN, NaN]);
	});
});
