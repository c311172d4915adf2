import { describe, expect, it } from 'vitest';
import { expit } from './special';
import { studyWeights } from './weights';

const cbct = (total: number) => ({ total, method: 'cbct' });
const plain = { middle: 0.5, tau: 0.2, priorSd: 2.5, model: 'plain' as const };

describe('studyWeights', () => {
	it('is the share of 1 / (tau² + 1 / (n p q)): worked by hand', () => {
		// n = 100, p = 0.5: v = 0.04, 1 / 0.08 = 12.5; n = 400: v = 0.01, 1 / 0.05 = 20; 12.5 / 32.5 = 0.384615…
		const { studies, borrowed } = studyWeights([cbct(100), cbct(400)], plain);
		expect(studies[0]).toBeCloseTo(12.5 / 32.5, 12);
		expect(studies[1]).toBeCloseTo(20 / 32.5, 12);
		// The prior's sd of 2.5 is worth 0.16.
		expect(borrowed).toBeCloseTo(0.16 / 32.66, 12);
	});

	it('goes by the size alone where populations do not differ, and hardly at all where they differ much', () => {
		const alike = studyWeights([cbct(100), cbct(400)], { ...plain, tau: 0 }).studies;
		expect(alike[1] / alike[0]).toBeCloseTo(4, 12);
		const apart = studyWeights([cbct(100), cbct(400)], { ...plain, tau: 3 }).studies;
		expect(apart[1] / apart[0]).toBeLessThan(1.01);
	});

	it('lets the samples of one group of methods share their offset: worked by hand', () => {
		// tau 0, p 0.5: n / 4. CBCT 25; two clearings of 25 together 50: 50 / (1 + 50 / 4) = 3.7037…, half of it each.
		const { studies } = studyWeights(
			[cbct(100), { total: 100, method: 'clearing' }, { total: 100, method: 'micro-ct' }],
			{ ...plain, tau: 0, model: 'method' }
		);
		const group = 50 / 13.5;
		expect(studies[0]).toBeCloseTo(25 / (25 + group), 12);
		expect(studies[1]).toBeCloseTo(group / 2 / (25 + group), 12);
		expect(studies[2]).toBe(studies[1]);
	});

	it('is close to the expected information of the exact model', () => {
		// Brute force, independent of the product's quadrature: E over y of the squared score of ln p(y | mu, tau), p(y) by 4,001 points of the normal.
		const [mu, tau] = [0.4, 0.6];
		const informationOf = (n: number) => {
			const likelihood = (y: number, at: number) => {
				let sum = 0;
				for (let i = 0; i <= 4000; i++) {
					const z = -6 + (12 * i) / 4000;
					const p = expit(at + tau * z);
					sum += Math.exp(y * Math.log(p) + (n - y) * Math.log(1 - p) - (z * z) / 2);
				}
				return sum;
			};
			const h = 1e-3;
			let total = 0;
			let mass = 0;
			let ways = 1;
			for (let y = 0; y <= n; y++) {
				const weight = ways * likelihood(y, mu);
				const score = (Math.log(likelihood(y, mu + h)) - Math.log(likelihood(y, mu - h))) / (2 * h);
				mass += weight;
				total += weight * score * score;
				ways = (ways * (n - y)) / (y + 1);
			}
			return total / mass;
		};
		const sizes = [5, 20, 60];
		const exact = sizes.map(informationOf);
		const sum = exact.reduce((a, b) => a + b);
		const { studies } = studyWeights(sizes.map(cbct), {
			middle: expit(mu),
			tau,
			priorSd: 2.5,
			model: 'plain'
		});
		studies.forEach((weight, i) => expect(Math.abs(weight - exact[i] / sum)).toBeLessThan(0.02));
	});

	it('has nothing but the prior without a study', () => {
		expect(studyWeights([], plain)).toEqual({ studies: [], borrowed: 1 });
	});

	it.each([{ middle: 0 }, { middle: 1 }, { tau: -1 }, { priorSd: 0 }])('refuses %j', (change) => {
		expect(() => studyWeights([cbct(10)], { ...plain, ...change })).toThrow(RangeError);
	});
});
