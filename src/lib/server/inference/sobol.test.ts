import { describe, expect, it } from 'vitest';
import { SOBOL_POINTS, sobolCoordinate } from './sobol';

describe('sobolCoordinate', () => {
	it('starts as the published sequence does', () => {
		// Joe and Kuo's page prints the first points of new-joe-kuo-6 (0, 0.5, 0.75, 0.25, 0.375, 0.875 …).
		const first = (dimension: number) => Array.from(sobolCoordinate(dimension).slice(0, 6), (n) => n / 4096);
		expect(first(0)).toEqual([0, 0.5, 0.75, 0.25, 0.375, 0.875]);
		expect(first(1)).toEqual([0, 0.5, 0.25, 0.75, 0.375, 0.875]);
		expect(first(2)).toEqual([0, 0.5, 0.25, 0.75, 0.625, 0.125]);
	});

	it('visits each of the 4,096 levels once in each dimension', () => {
		for (let dimension = 0; dimension < 24; dimension++) {
			expect(new Set(sobolCoordinate(dimension)).size).toBe(SOBOL_POINTS);
		}
	});

	it('integrates products over the unit cube far better than chance would', () => {
		// E[prod (0.5 + x_d)] = 1 over any number of independent uniforms; chance would err by about 0.017 in
		// ten dimensions with 4,096 points.
		let sum = 0;
		for (let i = 0; i < SOBOL_POINTS; i++) {
			let product = 1;
			for (let d = 0; d < 10; d++) product *= 0.5 + (sobolCoordinate(d)[i] + 0.5) / SOBOL_POINTS;
			sum += product;
		}
		expect(Math.abs(sum / SOBOL_POINTS - 1)).toBeLessThan(0.002);
	});

	it('spreads every pair of dimensions in use evenly', () => {
		// E[cos 2πx cos 2πy] = 0, a pair that shares its directions would give 0.5.
		for (let d = 0; d < 23; d++) {
			for (let e = d + 1; e < 23; e++) {
				const [x, y] = [sobolCoordinate(d), sobolCoordinate(e)];
				let sum = 0;
				for (let i = 0; i < SOBOL_POINTS; i++) {
					const angle = (n: number) => Math.cos((2 * Math.PI * (n + 0.5)) / SOBOL_POINTS);
					sum += angle(x[i]) * angle(y[i]);
				}
				expect(Math.abs(sum / SOBOL_POINTS)).toBeLessThan(0.02);
			}
		}
	});

	it('refuses a dimension it has no directions for', () => {
		expect(() => sobolCoordinate(24)).toThrow(RangeError);
		expect(() => sobolCoordinate(-1)).toThrow(RangeError);
	});
});
