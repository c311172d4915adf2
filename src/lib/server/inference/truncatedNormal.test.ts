import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { normalCdf } from './normal';
import { truncatedNormal } from './truncatedNormal';

const between = (min: number, max: number) => fc.double({ min, max, noNaN: true });

// Quantiles of the standard normal at 0.75 and 0.975 (Abramowitz and Stegun, table 26.5).
const QUARTILE = 0.6744897501960817;
const UPPER_POINT = 1.959963984540054;

describe('truncatedNormal', () => {
	it('is the half normal when cut at its middle', () => {
		const half = truncatedNormal(0, 1, 100);
		expect(half.mean).toBeCloseTo(Math.sqrt(2 / Math.PI), 13);
		expect(half.sd ** 2).toBeCloseTo(1 - 2 / Math.PI, 13);
		expect(half.quantile(0.5)).toBeCloseTo(QUARTILE, 12);
	});

	it('agrees with the distribution function where that keeps its digits', () => {
		fc.assert(
			fc.property(between(-1, 13), between(0.5, 4), between(0.01, 0.99), (m, s, p) => {
				const x = truncatedNormal(m, s, 12).quantile(p);
				const at = (z: number) => normalCdf((z - m) / s);
				expect((at(x) - at(0)) / (at(12) - at(0))).toBeCloseTo(p, 8);
			})
		);
	});

	it('stays inside its range, in order and finite, wherever the normal lies', () => {
		fc.assert(
			fc.property(between(-1e4, 1e4), between(1e-3, 1e4), between(0.1, 12), (m, s, upper) => {
				const { mean, sd, quantile } = truncatedNormal(m, s, upper);
				const points = [0, quantile(0), quantile(0.025), quantile(0.5), quantile(0.975), quantile(1), upper];
				points.slice(1).forEach((point, i) => expect(point).toBeGreaterThanOrEqual(points[i]));
				expect(mean).toBeGreaterThanOrEqual(0);
				expect(mean).toBeLessThanOrEqual(upper);
				expect(Number.isFinite(sd)).toBe(true);
			})
		);
	});

	it('is narrower than the normal it was cut from', () => {
		fc.assert(
			fc.property(between(-20, 30), between(0.05, 5), (m, s) => {
				const { sd, quantile } = truncatedNormal(m, s, 12);
				expect(sd).toBeLessThanOrEqual(s * (1 + 1e-12));
				const whole = 2 * UPPER_POINT * s;
				expect(quantile(0.975) - quantile(0.025)).toBeLessThanOrEqual(whole * (1 + 1e-12));
			})
		);
	});

	it('collapses to the end of its range rather than fail', () => {
		const { mean, sd, quantile } = truncatedNormal(1e9, 1e-9, 12);
		expect([mean, quantile(0.025), quantile(0.975)]).toEqual([12, 12, 12]);
		expect(sd).toBeLessThan(1e-12);
	});

	it.each([
		[NaN, 1, 12],
		[3, 0, 12],
		[3, Infinity, 12],
		[3, 1, 0]
	])('refuses Normal(%d, %d²) to %d', (m, s, upper) => {
		expect(() => truncatedNormal(m, s, upper)).toThrow(RangeError);
	});
});
