import { describe, expect, it } from 'vitest';
import { indexOf, rows } from '../../../../tests/support/literatureTable';
import { gatherLenders } from './borrowing';
import { questionCoverage, rootCoverage, sumCoverage } from './coverage';
import { fitGrid } from './fitGrid';
import type { GridFit } from './fitGrid';
import { leaveEachOut } from './leaveOut';
import type { QuestionStudy } from './types';

const prior = { mean: 0, sd: 2.5 };
const study = (events: number, total: number, method = 'cbct'): QuestionStudy => ({
	events,
	total,
	method,
	source: `source-${events}-${total}`,
	entry: events,
	locator: '',
	country: 'BRA'
});

describe('questionCoverage', () => {
	it('needs two other samples', () => {
		expect(questionCoverage('q1', [study(1, 9), study(3, 9)], prior)).toBeNull();
		expect(questionCoverage('q1', [study(1, 9), study(3, 9), study(2, 9)], prior)?.samples).toBe(3);
	});

	it('finds every sample inside where all are alike, and an outlier outside', () => {
		const alike = [38, 40, 41, 43, 39, 42].map((events) => study(events, 100));
		expect(questionCoverage('q1', alike, prior)).toMatchObject({ level95: 1, level80: 1, flagged: false });
		const odd = questionCoverage('q1', [...alike, study(97, 100)], prior)!;
		expect(odd.each.filter(({ inside95 }) => !inside95)).toEqual([
			expect.objectContaining({ source: 'source-97-100', entry: 97, inside80: false })
		]);
		expect(odd).toMatchObject({ level95: 6 / 7, flagged: true });
	});

	it('has a log score that is the sum over its samples, and never above 0', () => {
		for (const count of [3, 7]) {
			const studies = Array.from({ length: count }, (_, i) =>
				study(10 + 9 * i, 100, i % 2 === 0 ? 'cbct' : 'clearing')
			);
			for (const model of ['plain', 'method'] as const) {
				const { logScore, each, method } = questionCoverage('q1', studies, prior, model)!;
				// One is worked out from the integrals, the other from the predictive distribution of the count.
				const sum = each.reduce((all, { predictiveProbability }) => all + Math.log(predictiveProbability), 0);
				expect(Math.abs(logScore - sum)).toBeLessThan(0.005);
				expect(logScore).toBeLessThan(0);
				expect(method.logScore![model]).toBe(logScore);
			}
		}
	});
});

describe('leaveEachOut', () => {
	it('predicts equal samples equally, whether they share a row or not', () => {
		const studies = [study(5, 20), study(5, 20), study(9, 30), study(2, 15), study(5, 20, 'clearing')];
		for (const model of ['plain', 'method'] as const) {
			const [first, second] = leaveEachOut(studies, prior, model);
			expect(first.logProbability).toBe(second.logProbability);
		}
	});

	it('divides out what a refit leaves out; an offset of its own widens the population by its prior', () => {
		const others = [study(30, 60), study(45, 70), study(20, 50), study(18, 30)];
		const refit = moments(fitGrid(others, prior));
		const all = [...others, study(66, 100, 'micro-ct')];
		const plain = moments(leaveEachOut(all, prior, 'plain')[4].population());
		expect(Math.abs(plain.mean - refit.mean)).toBeLessThan(0.002);
		expect(Math.abs(plain.variance - refit.variance)).toBeLessThan(0.002);
		// The only sample of its group: nothing is known of its offset but Normal(0, 0.5²).
		const method = moments(leaveEachOut(all, prior, 'method')[4].population());
		expect(Math.abs(method.mean - refit.mean)).toBeLessThan(0.002);
		expect(Math.abs(method.variance - refit.variance - 0.25)).toBeLessThan(0.002);
	});
});

function moments({ mu, mass }: GridFit): { mean: number; variance: number } {
	const mean = mu.reduce((sum, value, i) => sum + mass[i] * value, 0);
	return { mean, variance: mu.reduce((sum, value, i) => sum + mass[i] * (value - mean) ** 2, 0) };
}

describe('rootCoverage', () => {
	const index = indexOf(
		['a', 'b', 'c', 'd'].flatMap((source, i) =>
			rows({ '1': 30 + i, '2': 70 - i }, { source, method: i === 3 ? 'clearing' : 'cbct' })
		)
	);
	const lenders = gatherLenders(index, {});

	it('lists the questions with three samples or more, and sums over them', () => {
		const { figures, questions } = rootCoverage(index, 'maxillary-first-molar', 'MB', {}, lenders);
		expect(questions.map(({ id }) => id)).toEqual(['q1', 'q2', 'q3', 'q4']);
		expect(figures!.samples).toBe(16);
		expect(figures!.logScore).toBeCloseTo(
			questions.reduce((sum, { logScore }) => sum + logScore, 0),
			12
		);
	});

	it('keeps to the filters', () => {
		const filtered = rootCoverage(index, 'maxillary-first-molar', 'MB', { methods: ['cbct'] }, lenders);
		expect(filtered.questions.every(({ samples, method }) => samples === 3 && method.logScore === null)).toBe(
			true
		);
	});

	it('has no figures without a question to count, and such a root is left out of the table', () => {
		const empty = rootCoverage(index, 'maxillary-first-molar', 'P', {}, lenders);
		expect(empty).toMatchObject({ figures: null, questions: [] });
		const full = rootCoverage(index, 'maxillary-first-molar', 'MB', {}, lenders);
		expect(sumCoverage([empty, full])).toEqual({ figures: full.figures, roots: [full] });
	});
});
