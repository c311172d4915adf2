import { describe, expect, it } from 'vitest';
import { pointGrid, inventedGrid } from '../../../../tests/support/inventedRoot';
import { betaTable, gridTable } from './inverseTables';
import { betaQuantile } from './special';

const at = (n: number) => (n + 0.5) / 4096;

describe('betaTable', () => {
	it.each([
		[4, 5],
		[29, 1],
		[31, 2],
		[1, 19],
		[1, 1],
		[0.5, 0.5],
		[300, 20],
		[2000, 3000]
	])('holds the quantiles of Beta(%d, %d) within 1e-6', (a, b) => {
		const table = betaTable({ a, b });
		for (const n of [0, 1, 2, 5, 17, 100, 102, 103, 999, 2047, 2048, 3000, 3992, 3993, 4090, 4094, 4095]) {
			expect(Math.abs(table[n] - betaQuantile(at(n), a, b))).toBeLessThan(1e-6);
		}
	});

	it('rises, also for shapes that crowd the ends', () => {
		for (const shape of [
			{ a: 0.05, b: 0.05 },
			{ a: 0.1, b: 3 },
			{ a: 14, b: 2 }
		]) {
			const table = betaTable(shape);
			expect(table.every((value, n) => n === 0 || value >= table[n - 1])).toBe(true);
			expect(table[0]).toBeGreaterThanOrEqual(0);
			expect(table[4095]).toBeLessThanOrEqual(1);
		}
	});

	it('has a closed form to agree with: Beta(1, b) has quantile 1 - (1 - u)^(1/b)', () => {
		const table = betaTable({ a: 1, b: 7 });
		for (let n = 0; n < 4096; n += 37) expect(table[n]).toBeCloseTo(1 - (1 - at(n)) ** (1 / 7), 6);
	});
});

describe('gridTable', () => {
	const grid = inventedGrid(0.4, 0.9);
	const mean = (table: Float64Array) => table.reduce((sum, value) => sum + value, 0) / table.length;
	const moment = (power: number) => grid.p.reduce((sum, p, i) => sum + grid.mass[i] * p ** power, 0);

	it('keeps the mean of the distribution, plain and weighted', () => {
		expect(mean(gridTable(grid, 'plain'))).toBeCloseTo(moment(1), 4);
		expect(mean(gridTable(grid, 'yes'))).toBeCloseTo(moment(2) / moment(1), 4);
		expect(mean(gridTable(grid, 'no'))).toBeCloseTo((moment(1) - moment(2)) / (1 - moment(1)), 4);
	});

	it('stays inside the grid and rises', () => {
		const table = gridTable(grid, 'plain');
		expect(table[0]).toBeGreaterThanOrEqual(grid.p[0]);
		expect(table[4095]).toBeLessThanOrEqual(grid.p[399]);
		expect(table.every((value, n) => n === 0 || value >= table[n - 1])).toBe(true);
	});

	it('is constant for a single mass', () => {
		expect([...new Set(gridTable(pointGrid(0.3), 'yes'))]).toEqual([0.3]);
	});
});
