import { describe, expect, it } from 'vitest';
import { betaCdf, betaPowerMoment, betaQuantile, expit, logBeta, logGamma, logit } from './special';

describe('logit and expit', () => {
	it('are inverse to each other over the whole range', () => {
		for (const x of [-700, -40, -3, -1e-9, 0, 0.5, 12, 30]) {
			expect(logit(expit(x))).toBeCloseTo(x, Math.abs(x) > 20 && x > 0 ? 2 : 9);
		}
		expect(expit(-700)).toBeCloseTo(Math.exp(-700), 300);
		expect([expit(Infinity), expit(-Infinity), logit(0), logit(1)]).toEqual([1, 0, -Infinity, Infinity]);
		expect(logit(1.5)).toBeNaN();
	});
});

describe('outside their domain', () => {
	it('the gamma and beta functions return NaN', () => {
		expect([logGamma(0), logGamma(-1), logGamma(NaN), logBeta(0, 1), logBeta(1, -1)]).toEqual(
			Array(5).fill(NaN)
		);
		expect([betaCdf(0.5, 0, 1), betaQuantile(1.1, 1, 1), betaQuantile(0.5, -1, 1)]).toEqual(
			Array(3).fill(NaN)
		);
		expect(betaPowerMoment(1, 1, -2, 0)).toBeNaN();
		expect(logGamma(Infinity)).toBe(Infinity);
	});
});

describe('the beta distribution', () => {
	it('ends at 0 and 1', () => {
		expect([betaCdf(-1, 2, 3), betaCdf(0, 2, 3), betaCdf(1, 2, 3), betaCdf(2, 2, 3)]).toEqual([0, 0, 1, 1]);
		expect([betaQuantile(0, 2, 3), betaQuantile(1, 2, 3)]).toEqual([0, 1]);
		expect(betaQuantile(0.01, 1e-4, 1)).toBe(0);
	});

	it('quantile and distribution function undo each other', () => {
		for (const [a, b] of [
			[0.4, 0.7],
			[1, 1],
			[3, 60],
			[45, 5.5],
			[900, 4100],
			[2e6, 3e6]
		]) {
			for (const p of [1e-9, 0.01, 0.3, 0.5, 0.8, 0.999]) {
				expect(betaCdf(betaQuantile(p, a, b), a, b) / p).toBeCloseTo(1, 9);
			}
		}
	});

	it('moments of whole and of broken powers agree', () => {
		expect(betaPowerMoment(2, 3, 1, 0)).toBeCloseTo(0.4, 15);
		expect(betaPowerMoment(4, 5, 0, 0)).toBe(1);
		expect(betaPowerMoment(4, 5, 2, 3)).toBeCloseTo(betaPowerMoment(4, 5, 2 + 1e-9, 3), 8);
	});
});
