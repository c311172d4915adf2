import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { quantilesInPlace } from './quantile';

describe('quantilesInPlace', () => {
	it('is type 7: R, quantile(c(1, 2, 3, 4), 0.25) is 1.75', () => {
		expect(quantilesInPlace(Float64Array.of(4, 1, 3, 2), [0.25])).toEqual([1.75]);
		expect(quantilesInPlace(Float64Array.of(4, 1, 3, 2), [0])).toEqual([1]);
		expect(quantilesInPlace(Float64Array.of(4, 1, 3, 2), [1])).toEqual([4]);
		expect(quantilesInPlace(Float64Array.of(7), [0.4])).toEqual([7]);
	});

	it('agrees with sorting, ties and all', () => {
		const values = fc.array(
			fc.oneof(fc.double({ min: 0, max: 1, noNaN: true }), fc.integer({ min: 0, max: 3 })),
			{
				minLength: 1,
				maxLength: 200
			}
		);
		fc.assert(
			fc.property(values, fc.double({ min: 0, max: 1, noNaN: true }), (list, q) => {
				const sorted = [...list].sort((a, b) => a - b);
				const ps = [q / 2, q];
				const expected = ps.map((p) => {
					const h = (sorted.length - 1) * p;
					const low = sorted[Math.floor(h)];
					return low + (h - Math.floor(h)) * (sorted[Math.ceil(h)] - low);
				});
				const got = quantilesInPlace(Float64Array.from(list), ps);
				got.forEach((value, i) => expect(value).toBeCloseTo(expected[i], 12));
			}),
			{ seed: 20261201, numRuns: 500 }
		);
	});

	it('refuses nothing at all and places outside [0, 1] or out of order', () => {
		expect(() => quantilesInPlace(new Float64Array(0), [0.5])).toThrow(RangeError);
		expect(() => quantilesInPlace(Float64Array.of(1), [1.1])).toThrow(RangeError);
		expect(() => quantilesInPlace(Float64Array.of(1), [NaN])).toThrow(RangeError);
		expect(() => quantilesInPlace(Float64Array.of(1, 2), [0.5, 0.4])).toThrow(RangeError);
	});
});
