import { describe, expect, it } from 'vitest';
import { normalCdf } from '../../src/lib/server/inference/normal';
import {
	betaCdf,
	betaPowerMoment,
	betaQuantile,
	logBeta,
	logGamma
} from '../../src/lib/server/inference/special';
import values from './special.json';

/** Relative tolerance of each function over the recorded values, in units of the last place (2^-52). */
const checks: [string, number[][], (...inputs: number[]) => number, number][] = [
	['logGamma', values.logGamma, logGamma, 4],
	['logBeta', values.logBeta, logBeta, 4],
	['betaCdf', values.betaCdf, betaCdf, 500],
	['betaQuantile', values.betaQuantile, betaQuantile, 500],
	['normalCdf', values.normalCdf, normalCdf, 4],
	['betaPowerMoment', values.betaPowerMoment, betaPowerMoment, 30]
];

describe('special functions against mpmath 1.3.0 at 60 digits (special.py)', () => {
	it.each(checks)('%s', (name, rows, f, places) => {
		for (const row of rows) {
			const inputs = row.slice(0, -1);
			const expected = row[row.length - 1];
			const error = Math.abs(f(...inputs) - expected);
			expect(
				error,
				`${name}(${inputs.join(', ')}) should be ${expected}, is ${f(...inputs)}`
			).toBeLessThanOrEqual(places * Number.EPSILON * Math.abs(expected));
		}
	});
});

describe('exact binomial limits', () => {
	it.each([
		// R. G. Newcombe, Stat. Med. 17 (1998) 857-872, table I, method 5 (Clopper-Pearson), to its four places.
		[81, 263, 0.2527, 0.3676],
		[15, 148, 0.0578, 0.1617],
		[0, 20, 0, 0.1684],
		[1, 29, 0.0009, 0.1776]
	])('%i of %i: %f to %f', (events, total, low, high) => {
		const lower = events === 0 ? 0 : betaQuantile(0.025, events, total - events + 1);
		expect(lower).toBeCloseTo(low, 4);
		expect(betaQuantile(0.975, events + 1, total - events)).toBeCloseTo(high, 4);
	});
});
