import { describe, expect, it } from 'vitest';
import { chiSquareUpper } from './chiSquare';

describe('chiSquareUpper', () => {
	// Upper 5 % and 1 % points as every printed table has them (e.g. Abramowitz and Stegun, table 26.8), from memory.
	it.each([
		[3.841, 1, 0.05],
		[5.991, 2, 0.05],
		[7.815, 3, 0.05],
		[9.488, 4, 0.05],
		[18.307, 10, 0.05],
		[6.635, 1, 0.01],
		[9.21, 2, 0.01],
		[11.345, 3, 0.01]
	])('leaves %d with %d degrees of freedom as printed tables say', (x, df, tail) => {
		expect(chiSquareUpper(x, df)).toBeCloseTo(tail, 4);
	});

	it('is e^(-x/2) with two degrees of freedom, far out too', () => {
		for (const x of [0.1, 1, 3.9, 4.1, 30, 700])
			expect(chiSquareUpper(x, 2) / Math.exp(-x / 2)).toBeCloseTo(1, 12);
	});

	it('is quiet at its ends', () => {
		expect([chiSquareUpper(0, 3), chiSquareUpper(-1, 3), chiSquareUpper(Infinity, 3)]).toEqual([1, 1, 0]);
		expect([chiSquareUpper(NaN, 3), chiSquareUpper(1, 0), chiSquareUpper(1, NaN)]).toEqual([NaN, NaN, NaN]);
	});
});
