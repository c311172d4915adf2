import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { fitGrid } from './fitGrid';
import { DEFAULT_PRIOR, pool } from './pool';
import { expit } from './special';
import type { Pooled, Study } from './types';

const study = (largest: number): fc.Arbitrary<Study> =>
	fc
		.record({
			total: fc.integer({ min: 1, max: largest }),
			share: fc.double({ min: 0, max: 1, noNaN: true })
		})
		.map(({ total, share }) => ({ total, events: Math.round(total * share) }));
const studies = fc.array(study(400), { minLength: 1, maxLength: 12 });
const seeded = { seed: 20261201, numRuns: 40 };

/** Twice the largest numerical error measured for any proportion (fitGrid.ts), rounded up. */
const SLACK = 1e-4;

const width = ([low, high]: [number, number]) => high - low;
const mirrored = (list: Study[]) => list.map(({ events, total }) => ({ events: total - events, total }));

function expectSound(result: Pooled): void {
	for (const { mean, median, interval } of [result.pooled, result.predictive]) {
		expect(interval[0]).toBeGreaterThan(0);
		expect(interval[0]).toBeLessThan(median);
		expect(median).toBeLessThan(interval[1]);
		expect(interval[1]).toBeLessThan(1);
		expect(mean).toBeGreaterThan(0);
		expect(mean).toBeLessThan(1);
	}
	expect(result.tau.interval[0]).toBeGreaterThanOrEqual(0);
	expect(result.tau.interval[0]).toBeLessThan(result.tau.median);
	expect(result.tau.median).toBeLessThan(result.tau.interval[1]);
	const { p, mass } = result.grid;
	let total = 0;
	let mean = 0;
	p.forEach((x, i) => {
		expect(mass[i]).toBeGreaterThanOrEqual(0);
		if (i > 0) expect(x).toBeGreaterThan(p[i - 1]);
		total += mass[i];
		mean += x * mass[i];
	});
	expect(p[0]).toBeGreaterThan(0);
	expect(p[p.length - 1]).toBeLessThan(1);
	expect(total).toBeCloseTo(1, 12);
	expect(mean).toBeCloseTo(result.predictive.mean, 12);
}

describe('pool', () => {
	it('gives ordered intervals inside (0, 1) and a grid with the predictive mean', () => {
		fc.assert(
			fc.property(studies, (list) => expectSound(pool(list))),
			seeded
		);
	});

	it('does not depend on the order of the studies, to the last digit', () => {
		fc.assert(
			fc.property(
				studies.chain((list) =>
					fc.tuple(
						fc.constant(list),
						fc.shuffledSubarray(list, { minLength: list.length, maxLength: list.length })
					)
				),
				([list, shuffled]) => {
					expect(pool(shuffled)).toEqual(pool(list));
				}
			),
			seeded
		);
	});

	it('mirrors when events and non-events change places', () => {
		fc.assert(
			fc.property(studies, (list) => {
				const here = pool(list);
				const there = pool(mirrored(list));
				for (const key of ['pooled', 'predictive'] as const) {
					expect(Math.abs(here[key].mean + there[key].mean - 1)).toBeLessThan(SLACK);
					expect(Math.abs(here[key].interval[0] + there[key].interval[1] - 1)).toBeLessThan(SLACK);
				}
				expect(here.tau.mean).toBeCloseTo(there.tau.mean, 3);
			}),
			seeded
		);
	});

	it('is never less certain of the middle population after seeing the same samples again', () => {
		// The slack is for the quadrature, whose grid moves when the data do.
		fc.assert(
			fc.property(study(300), fc.integer({ min: 1, max: 8 }), (one, copies) => {
				const fewer = pool(Array<Study>(copies).fill(one));
				const more = pool(Array<Study>(2 * copies).fill(one));
				expect(width(more.pooled.interval)).toBeLessThan(width(fewer.pooled.interval) + SLACK);
			}),
			seeded
		);
	});

	it('gives the prior where there is no study', () => {
		const { pooled, tau, observed, studies: count } = pool([]);
		expect(count).toBe(0);
		expect(observed).toBeNull();
		expect(pooled.mean).toBeCloseTo(0.5, 9);
		// 1.959964 sd of the logit, and the quantiles of |N(0, 1)|: Φ^-1(0.75), mean √(2/π).
		expect(pooled.interval[1]).toBeCloseTo(expit(1.959963984540054 * 2.5), 5);
		expect(tau.median).toBeCloseTo(0.6744897501960817, 3);
		expect(tau.mean).toBeCloseTo(Math.sqrt(2 / Math.PI), 3);
		const shifted = pool([], { prior: { mean: -2, sd: 1.5 } });
		expect(shifted.pooled.median).toBeCloseTo(expit(-2), 6);
	});

	it('keeps to the level asked for', () => {
		const list = [{ events: 7, total: 20 }];
		expect(width(pool(list, { level: 0.8 }).predictive.interval)).toBeLessThan(
			width(pool(list).predictive.interval)
		);
		expect(pool(list).observed).toEqual({ min: 0.35, max: 0.35 });
	});

	it('takes the extremes that the interface allows', () => {
		const million = 1_000_000;
		expectSound(pool([{ events: 0, total: 10 * million }]));
		expectSound(pool([{ events: 10 * million, total: 10 * million }]));
		const list = Array.from({ length: 2000 }, (_, i) => ({
			total: 1 + ((i * 7919) % (10 * million)),
			events: i % 3 === 0 ? 0 : Math.floor((1 + ((i * 7919) % (10 * million))) / (1 + (i % 3)))
		}));
		expectSound(pool(list));
	});

	it('treats n = 5,000,000 as it treats n = 5: more of the same proportion homes in on it', () => {
		const { pooled } = pool(Array<Study>(5).fill({ events: 1_250_000, total: 5_000_000 }));
		expect(pooled.median).toBeCloseTo(0.25, 3);
	});

	it('refuses what is not a proportion', () => {
		for (const bad of [
			{ events: 3, total: 2 },
			{ events: -1, total: 2 },
			{ events: 0, total: 0 },
			{ events: NaN, total: 5 }
		]) {
			expect(() => pool([bad])).toThrow(RangeError);
		}
		expect(() => pool([], { level: 1 })).toThrow(RangeError);
		expect(() => pool([], { prior: { mean: 0, sd: 0 } })).toThrow(RangeError);
	});
});

describe('fitGrid', () => {
	it('keeps what leaving a study out needs: dividing its likelihood out approximates the refit', () => {
		const list = [
			{ events: 30, total: 60 },
			{ events: 45, total: 70 },
			{ events: 20, total: 50 },
			{ events: 66, total: 100 },
			{ events: 18, total: 30 }
		];
		const fit = fitGrid(list, DEFAULT_PRIOR, { keepStudies: true });
		const left = 2;
		let total = 0;
		let mean = 0;
		fit.mass.forEach((mass, i) => {
			const without = mass / Math.exp(fit.logMarginal![i * fit.rows + fit.rowOf[left]]);
			total += without;
			mean += without * expit(fit.mu[i]);
		});
		const refit = pool(list.filter((_, i) => i !== left));
		// The design (section 6) measured about 0.002 for this shortcut.
		expect(Math.abs(mean / total - refit.pooled.mean)).toBeLessThan(0.002);
	});
});
