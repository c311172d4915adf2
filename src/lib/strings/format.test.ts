import { describe, expect, it } from 'vitest';
import { count, diameter, formatFor, inWords, mm, mmRange, pValue, percent, range } from './format';

/** Numbers and units are held together by a no-break space; the checks read better with a plain one. */
const plain = (text: string) => text.replaceAll('\u00a0', ' ');

describe('percent', () => {
	it.each([
		[0.6342, '63 %'],
		[0, '0 %'],
		[1, '100 %'],
		[0.004, 'under 1 %'],
		[0.01, '1 %'],
		[0.99, '99 %'],
		[0.9901, 'over 99 %'],
		[0.5, '50 %']
	])('reads %d as %s', (probability, text) => {
		expect(plain(percent(probability))).toBe(text);
	});

	it('keeps the sign on the line of its number', () => {
		expect(percent(0.63)).toBe('63\u00a0%');
		expect(range([0.35, 0.88])).toBe('35 to 88\u00a0%');
		expect(mm(3)).toBe('3\u00a0mm');
	});
});

describe('formatFor', () => {
	it.each([
		['percent', '63 %', '35 to 88 %', 'under 1 %', '63 % (35 to 88 %)', '50 %'],
		['in-100', '63 in 100', '35 to 88 in 100', 'under 1 in 100', '63 in 100 (35 to 88 in 100)', '50 in 100']
	] as const)('writes probabilities as %s', (units, one, many, rare, both, alike) => {
		const format = formatFor(() => units);
		expect(plain(format.percent(0.634))).toBe(one);
		expect(plain(format.range([0.351, 0.88]))).toBe(many);
		expect(plain(format.percent(0.001))).toBe(rare);
		expect(plain(format.figure(0.634, [0.351, 0.88]))).toBe(both);
		expect(plain(format.figure(0.5, [0.498, 0.502]))).toBe(alike);
	});

	it('follows a choice that changes, and is percent without one', () => {
		let units: 'percent' | 'in-100' = 'percent';
		const format = formatFor(() => units);
		expect(format.unit).toBe('%');
		units = 'in-100';
		expect(plain(format.unit)).toBe('in 100');
		expect(plain(format.percent(0.2))).toBe('20 in 100');
		expect(plain(formatFor().percent(0.2))).toBe('20 %');
	});

	it('holds number and words together', () => {
		expect(formatFor(() => 'in-100').percent(0.2)).toBe('20\u00a0in\u00a0100');
	});
});

describe('range', () => {
	it.each([
		[[0.35, 0.88], '35 to 88 %'],
		[[0.001, 0.05], 'under 1 to 5 %'],
		[[0.9, 0.999], '90 to over 99 %'],
		[[0, 0.16], '0 to 16 %'],
		[[0.346, 0.354], '35 %'],
		[[0.001, 0.002], 'under 1 %']
	] as const)('reads %j as %s', (interval, text) => {
		expect(plain(range(interval))).toBe(text);
	});
});

describe('inWords', () => {
	it.each([
		[0, 'none'],
		[0.004, 'fewer than 1 in 100'],
		[0.01, 'about 1 in 100'],
		[0.05, 'about 1 in 20'],
		[0.07, 'about 1 in 15'],
		[0.095, 'about 1 in 10'],
		[0.1, 'about 1 in 10'],
		[0.63, 'about 6 in 10'],
		[0.92, 'about 9 in 10'],
		[0.95, 'about 19 in 20'],
		[0.98, 'nearly all'],
		[0.999, 'nearly all'],
		[1, 'all']
	])('reads %d as %s', (probability, text) => {
		expect(inWords(probability)).toBe(text);
	});

	it('never says a fraction further than a third of the value away', () => {
		for (let p = 0.011; p < 0.975; p += 0.001) {
			const [, above, below] = /about (\d+) in (\d+)/.exec(inWords(p)) ?? [];
			const said = Number(above) / Number(below);
			expect(Math.abs(said - p)).toBeLessThanOrEqual(Math.max(0.0501, p / 3));
			expect(said / p).toBeGreaterThan(0.66);
			expect(said / p).toBeLessThan(1.5);
		}
	});
});

describe('mm and count', () => {
	it('round without false precision', () => {
		expect(plain(mm(3.7421))).toBe('3.7 mm');
		expect(plain(mm(13))).toBe('13 mm');
		expect(plain(mmRange([2.02, 3.98]))).toBe('2 to 4 mm');
		expect(plain(mmRange([2.98, 3.02]))).toBe('3 mm');
		expect(plain(diameter(0.3935))).toBe('0.39 mm');
		expect(plain(diameter(0.4))).toBe('0.40 mm');
		expect([0.0364, 0.9, 0.00001].map(pValue)).toEqual(['p = 0.036', 'p = 0.90', 'p under 0.001']);
		expect(count(6253)).toBe('6,253');
		expect(count(0)).toBe('0');
	});
});
