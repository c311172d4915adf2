import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { isInside, logBinomial, predictCounts } from './countPrediction';
import { fitGrid } from './fitGrid';
import { DEFAULT_PRIOR } from './pool';
import { betaCdf } from './special';

const seeded = { seed: 20261201, numRuns: 15 };
const study = fc
	.record({ total: fc.integer({ min: 1, max: 300 }), share: fc.double({ min: 0, max: 1, noNaN: true }) })
	.map(({ total, share }) => ({ total, events: Math.round(total * share) }));

describe('predictCounts', () => {
	it('gives probabilities that sum to 1 over all counts and agree with their running sum', () => {
		fc.assert(
			fc.property(fc.array(study, { maxLength: 6 }), fc.integer({ min: 1, max: 40 }), (studies, total) => {
				const predict = predictCounts(fitGrid(studies, DEFAULT_PRIOR));
				let sum = 0;
				for (let events = 0; events <= total; events++) {
					const { at, below, above } = predict({ events, total });
					expect(at).toBeGreaterThan(0);
					expect(below).toBeCloseTo(sum, 9);
					sum += at;
					expect(above).toBeCloseTo(1 - sum, 9);
				}
				expect(sum).toBeCloseTo(1, 9);
			}),
			seeded
		);
	});

	it('mirrors when events and non-events change places', () => {
		const predict = predictCounts(fitGrid([{ events: 9, total: 40 }], DEFAULT_PRIOR));
		const mirrored = predictCounts(fitGrid([{ events: 31, total: 40 }], DEFAULT_PRIOR));
		for (const events of [0, 3, 17, 25]) {
			const here = predict({ events, total: 25 });
			const there = mirrored({ events: 25 - events, total: 25 });
			expect(Math.abs(here.at - there.at)).toBeLessThan(1e-5);
			expect(Math.abs(here.below - there.above)).toBeLessThan(5e-5);
		}
	});

	it('comes to the predictive distribution itself for a sample of ten million', () => {
		const predict = predictCounts(fitGrid([{ events: 30, total: 100 }], DEFAULT_PRIOR));
		const total = 10_000_000;
		const many = predict({ events: 3_000_000, total });
		const fewer = predict({ events: 3_000, total: 10_000 });
		expect(many.below).toBeCloseTo(fewer.below, 3);
		// A density of p spread over n + 1 counts: ten thousand times as many, each a thousandth as probable.
		expect((many.at * total) / (fewer.at * 10_000)).toBeCloseTo(1, 2);
	});

	it('is the beta-binomial of a known population, as one in a million of the same shows', () => {
		// With p known to be a quarter, the count is binomial; P(Y <= y) = 1 - I_p(y + 1, n - y) (Abramowitz and Stegun 26.5.24).
		const known = Array.from({ length: 40 }, () => ({ events: 2_500_000, total: 10_000_000 }));
		const { below, at } = predictCounts(fitGrid(known, DEFAULT_PRIOR))({ events: 5, total: 20 });
		expect(Math.abs(below + at - (1 - betaCdf(0.25, 6, 15)))).toBeLessThan(0.002);
		expect(Math.abs(at - Math.exp(logBinomial(5, 20, 0.25)))).toBeLessThan(0.002);
	});
});

describe('isInside', () => {
	it('is membership of the shortest interval with at most α/2 on either side, found by enumeration', () => {
		const predict = predictCounts(fitGrid([{ events: 4, total: 30 }], DEFAULT_PRIOR));
		for (const level of [0.95, 0.8]) {
			const tail = (1 - level) / 2;
			const counts = Array.from({ length: 26 }, (_, events) => ({
				events,
				...predict({ events, total: 25 })
			}));
			const low = Math.max(...counts.filter(({ below }) => below <= tail).map(({ events }) => events));
			const high = Math.min(...counts.filter(({ above }) => above <= tail).map(({ events }) => events));
			expect(low).toBeLessThan(high);
			for (const { events, ...probabilities } of counts)
				expect(isInside(probabilities, level)).toBe(events >= low && events <= high);
		}
	});
});

describe('logBinomial', () => {
	it('is the binomial probability', () => {
		// 10 choose 3 is 120: 120 · 0.2³ · 0.8⁷.
		expect(Math.exp(logBinomial(3, 10, 0.2))).toBeCloseTo(120 * 0.008 * 0.8 ** 7, 12);
		expect(logBinomial(0, 5, 0)).toBeCloseTo(0, 12);
		expect(logBinomial(5, 5, 1)).toBeCloseTo(0, 12);
	});
});
