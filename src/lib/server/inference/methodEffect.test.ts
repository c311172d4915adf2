import { describe, expect, it } from 'vitest';
import { chooseModel, poolByMethod } from './methodEffect';
import { groupOfMethod } from './methodLikelihood';
import { pool } from './pool';

const prior = { mean: 0, sd: 2.5 };
const of = (method: string, ...counts: [number, number][]) =>
	counts.map(([events, total]) => ({ events, total, method }));

/** Laboratory samples near 80 %, CBCT near 40 %, each group of one mind. */
const DIVIDED = [
	...of('cbct', [40, 100], [82, 200], [59, 150], [44, 110]),
	...of('micro-ct', [80, 100], [62, 80], [97, 120]),
	...of('clearing', [49, 60])
];

describe('poolByMethod', () => {
	it('is the plain model where all samples are CBCT', () => {
		const studies = of('cbct', [12, 40], [30, 70], [9, 50], [160, 400]);
		const { offsets, ...pooled } = poolByMethod(studies, { prior });
		expect(offsets).toEqual([]);
		expect(pooled).toEqual(pool(studies, { prior }));
	});

	it('takes mixed methods with the reference', () => {
		const counts: [number, number][] = [
			[12, 40],
			[30, 70],
			[9, 50]
		];
		expect(poolByMethod(of('mixed', ...counts), { prior })).toEqual(
			poolByMethod(of('cbct', ...counts), { prior })
		);
		expect(groupOfMethod('mixed')).toBe('cbct');
	});

	it('speaks of a population examined by CBCT, and of how far the others are from it', () => {
		const { pooled, tau, offsets } = poolByMethod(DIVIDED, { prior });
		const plain = pool(DIVIDED, { prior });
		expect(pooled.mean).toBeLessThan(plain.pooled.mean);
		expect(tau.mean).toBeLessThan(plain.tau.mean);
		expect(offsets).toHaveLength(1);
		expect(offsets[0]).toMatchObject({ group: 'laboratory', studies: 4 });
		expect(offsets[0].interval[0]).toBeGreaterThan(0);
		expect(offsets[0].mean).toBeLessThan(offsets[0].interval[1]);
	});

	it('does not depend on the order of the samples', () => {
		expect(poolByMethod([...DIVIDED].reverse(), { prior })).toEqual(poolByMethod(DIVIDED, { prior }));
	});

	it('keeps to the level asked for', () => {
		const [at95, at80] = [0.95, 0.8].map(
			(level) => poolByMethod(DIVIDED, { prior, level }).offsets[0].interval
		);
		expect(at80[1] - at80[0]).toBeLessThan(at95[1] - at95[0]);
	});

	it('knows of an offset no more than its prior where the group says nothing', () => {
		// One root of a radiograph: the offset stays Normal(0, 0.5²), 0.98 at its 97.5 % quantile.
		const { offsets } = poolByMethod([...of('cbct', [40, 100], [45, 100]), ...of('radiograph', [1, 1])], {
			prior
		});
		expect(Math.abs(offsets[0].mean)).toBeLessThan(0.15);
		expect(offsets[0].interval[1]).toBeGreaterThan(0.9);
		expect(offsets[0].interval[0]).toBeLessThan(-0.8);
	});
});

describe('chooseModel', () => {
	it('shows the method model where methods differ and their samples agree', () => {
		const { shown, logScore } = chooseModel(DIVIDED, prior);
		expect(shown).toBe('method');
		expect(logScore!.method).toBeGreaterThan(logScore!.plain);
		expect(logScore!.method).toBeLessThan(0);
	});

	it('shows the plain model where methods make no difference', () => {
		const alike = [...of('cbct', [40, 100], [21, 50], [60, 140]), ...of('micro-ct', [33, 80], [26, 60])];
		expect(chooseModel(alike, prior).shown).toBe('plain');
	});

	it('compares nothing with two samples or one group', () => {
		const two = [...of('cbct', [1, 9]), ...of('clearing', [5, 9])];
		for (const studies of [two, of('cbct', [1, 9], [5, 9], [6, 9])])
			expect(chooseModel(studies, prior)).toEqual({ shown: 'plain', logScore: null, leftOut: null });
	});
});
