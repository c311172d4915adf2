import { describe, expect, it } from 'vitest';
import { indexOf, row } from '../../../../tests/support/literatureTable';
import { borrowedPriors, gatherLenders } from './borrowing';
import type { Filters, ObservationRow } from './types';

/** Two samples of q1 on a root, 100 roots each; `yes` roots in all have more than one canal. */
function lend(tooth: string, root: string, yes: number, method = 'cbct'): ObservationRow[] {
	return ['a', 'b'].map((source, i) =>
		row({ tooth, root, source, method, count: 100 - (i === 0 ? Math.min(yes, 100) : Math.max(yes - 100, 0)) })
	);
}
const q1Of = (table: ObservationRow[], tooth: string, root: string, filters: Filters = {}) =>
	borrowedPriors(gatherLenders(indexOf(table), filters), tooth, root).q1;
const logit = (yes: number, total: number) => Math.log((yes + 0.5) / (total - yes + 0.5));

const TABLE = [
	...lend('maxillary-first-molar', 'MB', 120),
	...lend('maxillary-first-molar', 'P', 2),
	...lend('mandibular-first-molar', 'D', 60)
];

describe('priors borrowed from the other roots (inference, section 2, Borrowing)', () => {
	it('are the median and the standard deviation with n − 1 of the lenders’ logits', () => {
		const [high, low, middle] = [logit(120, 200), logit(2, 200), logit(60, 200)];
		const mean = (high + low + middle) / 3;
		const sd = Math.sqrt(((high - mean) ** 2 + (low - mean) ** 2 + (middle - mean) ** 2) / 2);
		const prior = q1Of(TABLE, 'maxillary-canine', 'single');
		expect(prior.mean).toBeCloseTo(middle, 12);
		expect(prior.sd).toBeCloseTo(sd, 12);
	});

	it('leave the root itself out, and are never narrower than 1.5', () => {
		const prior = q1Of(TABLE, 'maxillary-first-molar', 'P');
		expect(prior.mean).toBeCloseTo((logit(120, 200) + logit(60, 200)) / 2, 12);
		expect(prior.sd).toBe(1.5);
	});

	it('are Normal(0, 2.5²) with fewer than two lenders', () => {
		expect(q1Of(TABLE.slice(0, 4), 'maxillary-first-molar', 'MB')).toEqual({ mean: 0, sd: 2.5 });
		expect(q1Of([], 'maxillary-first-molar', 'MB')).toEqual({ mean: 0, sd: 2.5 });
	});

	it('take no root with a single sample for a lender', () => {
		const table = [...TABLE, row({ tooth: 'maxillary-second-molar', root: 'MB', count: 1 })];
		expect(q1Of(table, 'maxillary-canine', 'single')).toEqual(q1Of(TABLE, 'maxillary-canine', 'single'));
	});

	it('let whole and single of a premolar lend to each other', () => {
		const tooth = 'maxillary-first-premolar';
		const table = [...lend(tooth, 'whole', 180), ...lend('maxillary-first-molar', 'MB', 120)];
		expect(q1Of(table, tooth, 'single').mean).toBeCloseTo((logit(180, 200) + logit(120, 200)) / 2, 12);
	});

	it('are filtered too', () => {
		const table = [...TABLE, ...lend('maxillary-second-molar', 'MB', 80, 'micro-ct')];
		const filtered = q1Of(table, 'maxillary-canine', 'single', { methods: ['cbct'] });
		expect(filtered).toEqual(q1Of(TABLE, 'maxillary-canine', 'single'));
	});
});
