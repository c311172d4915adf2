import { secondCone, secondLength } from '$lib/geometry/joined';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { disagreementOf, highestLevel, levelPosterior, measuredLevel, type MeasuredLevel } from './level';

const WORKING = { first: 20.5, second: 19.5 };
const MARK = { level: measuredLevel({ kind: 'cone-mark', value: 3, coneShortBy: 0 }, WORKING), sd: 0.5 };
const SHORTFALL = { level: measuredLevel({ kind: 'cone-shortfall', value: 1.2 }, WORKING), sd: 0.7 };

const width = ({ interval }: { interval: [number, number] }) => interval[1] - interval[0];
const anyMeasured = fc.record({
	level: fc.double({ min: -5, max: 40, noNaN: true }),
	sd: fc.double({ min: 0.05, max: 5, noNaN: true })
});
const inside = fc.record({
	level: fc.double({ min: 4, max: 8, noNaN: true }),
	sd: fc.double({ min: 0.1, max: 0.5, noNaN: true })
});
const anyPrior = fc.option(
	fc.record({
		mean: fc.double({ min: 0.5, max: 10, noNaN: true }),
		sd: fc.double({ min: 0.2, max: 3, noNaN: true })
	})
);

describe('the worked example, by hand', () => {
	// WL 20.5 and 19.5 mm; mark 3.0 mm from the tip of a cone at full length; preparation and cone 25/.06, canal 2 shaped
	// to full length. Flat prior, one measurement: J = 3.0 ± 0.5 (the cut at 0 lies 6 sd away). Second length
	// 19.5 - 3.0 = 16.5. Diameter 0.25 + 0.06 · 3 = 0.43, cut (0.43 - 0.25) / 0.06 = 3.0.
	const alone = levelPosterior([MARK], null, highestLevel(WORKING));

	it('puts the confluence at 3.0 mm, the second cone at 16.5 mm, the cut at 3.0 mm', () => {
		expect(alone.mean).toBeCloseTo(3, 7);
		expect(alone.sd).toBeCloseTo(0.5, 7);
		expect(alone.interval[0]).toBeCloseTo(3 - 1.959964 * 0.5, 5);
		expect(alone.interval[1]).toBeCloseTo(3 + 1.959964 * 0.5, 5);
		expect(secondLength(WORKING.second, alone.mean)).toBeCloseTo(16.5, 7);
		const shape = { tip: 0.25, taper: 0.06 };
		expect(secondCone(alone.mean, 'full', shape, shape).cutFromTip).toBeCloseTo(3, 7);
		expect(disagreementOf([MARK])).toBeNull();
	});

	it('finds a shortfall of 1.2 mm inconsistent with it', () => {
		// (3.0 - 1.2)² / (0.5² + 0.7²) = 3.24 / 0.74 = 4.378; upper tail of chi-square with 1 df: 0.0364.
		const { pValue, consistent } = disagreementOf([MARK, SHORTFALL])!;
		expect(pValue).toBeCloseTo(0.0364, 4);
		expect(consistent).toBe(false);
		// Weights 4 and 1/0.49 = 2.0408: (12 + 2.449) / 6.0408 = 2.392, sd 6.0408^-½ = 0.4069.
		const both = levelPosterior([MARK, SHORTFALL], null, 12);
		expect(both.mean).toBeCloseTo(2.3919, 4);
		expect(both.sd).toBeCloseTo(0.4069, 4);
	});
});

describe('measuredLevel', () => {
	it('reads each kind of measurement as a level above the common end', () => {
		expect(measuredLevel({ kind: 'cone-mark', value: 2.5, coneShortBy: 0.5 }, WORKING)).toBe(3);
		expect(measuredLevel({ kind: 'cone-shortfall', value: 2.5 }, WORKING)).toBe(2.5);
		expect(measuredLevel({ kind: 'file-contact', value: 16.5 }, WORKING)).toBe(3);
		expect(measuredLevel({ kind: 'cbct', value: 3.4 }, WORKING)).toBe(3.4);
	});
});

describe('levelPosterior', () => {
	it('never leaves 0 to min(12, WL₂) and is never NaN, whatever was measured', () => {
		fc.assert(
			fc.property(
				fc.array(anyMeasured, { maxLength: 6 }),
				anyPrior,
				fc.double({ min: 5, max: 40, noNaN: true }),
				(measured, prior, second) => {
					const highest = highestLevel({ first: 20, second });
					const { mean, sd, interval } = levelPosterior(measured, prior, highest);
					const points = [0, interval[0], interval[1], Math.min(12, second)];
					points.slice(1).forEach((point, i) => expect(point).toBeGreaterThanOrEqual(points[i]));
					expect(mean).toBeGreaterThanOrEqual(interval[0] - 1e-9);
					expect(mean).toBeLessThanOrEqual(interval[1] + 1e-9);
					expect(sd).toBeGreaterThanOrEqual(0);
				}
			)
		);
	});

	it('does not depend on the order of measurements, to the last digit', () => {
		fc.assert(
			fc.property(fc.array(anyMeasured, { minLength: 2, maxLength: 6 }), anyPrior, (measured, prior) => {
				const turned = [...measured].reverse();
				expect(levelPosterior(turned, prior, 12)).toEqual(levelPosterior(measured, prior, 12));
				expect(disagreementOf(turned)).toEqual(disagreementOf(measured));
			})
		);
	});

	it('never widens with another measurement, the ends of the range being out of reach', () => {
		fc.assert(
			fc.property(fc.array(inside, { minLength: 1, maxLength: 6 }), inside, (measured, another) => {
				const before = levelPosterior(measured, null, 12);
				const after = levelPosterior([...measured, another], null, 12);
				expect(after.sd).toBeLessThanOrEqual(before.sd);
				expect(width(after)).toBeLessThanOrEqual(width(before));
			})
		);
	});

	it('never widens with a measurement that agrees, at the ends of the range too', () => {
		const anywhere = fc.double({ min: 0, max: 14, noNaN: true });
		fc.assert(
			fc.property(anywhere, fc.double({ min: 0.1, max: 2, noNaN: true }), (level, sd) => {
				const widths = [1, 2, 3].map((n) =>
					width(levelPosterior(Array<MeasuredLevel>(n).fill({ level, sd }), null, 12))
				);
				expect(widths[1]).toBeLessThan(widths[0]);
				expect(widths[2]).toBeLessThan(widths[1]);
			})
		);
	});

	it('is never wider than the measurements alone allow, a bound that no measurement widens', () => {
		fc.assert(
			fc.property(fc.array(anyMeasured, { minLength: 1, maxLength: 6 }), (measured) => {
				const sd = measured.reduce((sum, one) => sum + one.sd ** -2, 0) ** -0.5;
				const posterior = levelPosterior(measured, null, 12);
				expect(posterior.sd).toBeLessThanOrEqual(sd * (1 + 1e-12));
				expect(width(posterior)).toBeLessThanOrEqual(2 * 1.959964 * sd * (1 + 1e-6));
			})
		);
	});

	it('may widen only where a measurement pulls the level off an end of its range', () => {
		const atTheEnd = levelPosterior([{ level: 0, sd: 0.5 }], null, 12);
		const pulledOff = levelPosterior(
			[
				{ level: 0, sd: 0.5 },
				{ level: 3, sd: 0.5 }
			],
			null,
			12
		);
		expect(width(pulledOff)).toBeGreaterThan(width(atTheEnd));
	});

	it('takes a published prior in as one more measurement, and a flat one as none', () => {
		// Equal precision: half way between 3 and 4, sd 0.5/√2.
		const posterior = levelPosterior([MARK], { mean: 4, sd: 0.5 }, 12);
		expect(posterior.mean).toBeCloseTo(3.5, 9);
		expect(posterior.sd).toBeCloseTo(Math.SQRT1_2 / 2, 9);
		const nothing = levelPosterior([], null, 12);
		expect(nothing.mean).toBe(6);
		expect(nothing.interval[0]).toBeCloseTo(0.3, 12);
		expect(nothing.interval[1]).toBeCloseTo(11.7, 12);
	});
});

describe('disagreementOf', () => {
	it('is 1 where all measure the same, and has one degree of freedom fewer than measurements', () => {
		expect(disagreementOf([MARK, { ...MARK, sd: 0.7 }])!.pValue).toBeCloseTo(1, 12);
		// 2, 3 and 4 with sd 1: chi-square 2 with 2 df, tail e^-1.
		const three = [2, 3, 4].map((level) => ({ level, sd: 1 }));
		expect(disagreementOf(three)!.pValue).toBeCloseTo(Math.exp(-1), 12);
	});
});
