import { describe, expect, it } from 'vitest';
import { wilsonInterval } from './wilson';

describe('wilsonInterval', () => {
	// Newcombe 1998, Statistics in Medicine 17:857-872, Table I, method 3 (score, no continuity correction), as given to four places.
	it.each([
		[81, 263, 0.2553, 0.3662],
		[15, 148, 0.0624, 0.1605],
		[0, 20, 0, 0.1611],
		[1, 29, 0.0061, 0.1718]
	])('gives the published interval of %d/%d', (events, total, lower, upper) => {
		const interval = wilsonInterval(events, total);
		expect(Math.abs(interval[0] - lower)).toBeLessThanOrEqual(0.00005);
		expect(Math.abs(interval[1] - upper)).toBeLessThanOrEqual(0.00005);
	});

	it('mirrors: the interval of no is one minus the interval of yes', () => {
		const [lower, upper] = wilsonInterval(28, 29);
		const [lowerNo, upperNo] = wilsonInterval(1, 29);
		expect(lower).toBeCloseTo(1 - upperNo, 14);
		expect(upper).toBeCloseTo(1 - lowerNo, 14);
		expect(wilsonInterval(20, 20)[1]).toBe(1);
	});

	it.each([
		[1, 0],
		[-1, 5],
		[6, 5],
		[Number.NaN, 5]
	])('refuses %d of %d', (events, total) => {
		expect(() => wilsonInterval(events, total)).toThrow(RangeError);
	});
});
