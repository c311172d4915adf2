import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
	inventedGrid,
	inventedRoot,
	ordinaryGrids,
	pointGrid,
	shippedCharacteristics
} from '../../../../tests/support/inventedRoot';
import { shippedRoot } from '../../../../tests/support/shippedRoots';
import { characteristicsFor } from './characteristics';
import { answerConfluence } from './confluence';
import type { ConfluenceAnswer } from './confluence';
import { SEARCHES, TESTS } from '$lib/schemas/terms';
import type { ConfluenceQuestion, Finding, Test } from './confluenceQuestion';

const rows = shippedCharacteristics();
const characteristics = characteristicsFor(rows, 'maxillary-first-molar', 'MB');
const root = inventedRoot(ordinaryGrids(), inventedGrid(0.3, 0.8));
const ask = (question: ConfluenceQuestion, model = root) =>
	answerConfluence(model, characteristics, question);
const finding = (test: Test, result: Finding['result'] = 'positive'): Finding => ({
	test,
	result,
	pair: 'MB-ML'
});

const clearFindings = fc
	.subarray([...TESTS])
	.chain((tests) =>
		fc.tuple(
			...tests.map((test) =>
				fc.constantFrom('positive' as const, 'negative' as const).map((r) => finding(test, r))
			)
		)
	);
const questions = fc
	.record({
		canals: fc.integer({ min: 1, max: 3 }),
		orifices: fc.constantFrom(undefined, 1, 2, 3),
		search: fc.constantFrom(undefined, ...SEARCHES),
		findings: clearFindings
	})
	.map((question): ConfluenceQuestion => ({
		...question,
		findings: question.canals === 1 ? [] : question.findings
	}));
const runs = { seed: 20261201, numRuns: 60 };

const total = (estimates: { mean: number }[]) => estimates.reduce((sum, { mean }) => sum + mean, 0);
/** All that findings may change; `steps` lists them, so it does not count. */
const digits = ({ steps: _, ...rest }: ConfluenceAnswer) => JSON.stringify(rest);

describe('answerConfluence', () => {
	it('gives probabilities that sum to 1, in intervals of the right order', () => {
		fc.assert(
			fc.property(questions, (question) => {
				const { prior, posterior, steps } = ask(question);
				for (const estimates of [
					Object.values(prior.fates),
					Object.values(posterior.fates),
					posterior.exits,
					posterior.sequences
				]) {
					expect(total(estimates)).toBeCloseTo(1, 12);
					for (const { mean, interval } of estimates) {
						expect(interval[0]).toBeGreaterThanOrEqual(0);
						expect(interval[0]).toBeLessThanOrEqual(interval[1]);
						expect(interval[1]).toBeLessThanOrEqual(1);
						// A mean lies far out in a skewed distribution at times, but not in the outer tails.
						expect(mean).toBeGreaterThanOrEqual(interval[0] - 1e-9);
						expect(mean).toBeLessThanOrEqual(interval[1] + 1e-9);
					}
				}
				for (const { fates } of steps) {
					expect(Object.values(fates).reduce((sum, p) => sum + p, 0)).toBeCloseTo(1, 12);
				}
			}),
			runs
		);
	});

	it('gives the same digits whatever the order of the findings, and on asking again', () => {
		const shuffled = questions.chain((question) =>
			fc.tuple(
				fc.constant(question),
				fc.shuffledSubarray(question.findings, { minLength: question.findings.length })
			)
		);
		fc.assert(
			fc.property(shuffled, ([question, findings]) => {
				expect(digits(ask({ ...question, findings }))).toBe(digits(ask(question)));
			}),
			runs
		);
	});

	it('is not moved in any digit by an unclear finding', () => {
		const made = clearFindings.filter((findings) => findings.length < TESTS.length);
		fc.assert(
			fc.property(made, fc.nat(), (findings, at) => {
				const free = TESTS.filter((test) => !findings.some((one) => one.test === test));
				const unclear = finding(free[at % free.length], 'unclear');
				const question: ConfluenceQuestion = { canals: 2, findings };
				expect(digits(ask({ ...question, findings: [unclear, ...findings] }))).toBe(digits(ask(question)));
			}),
			runs
		);
	});

	it('finds no joining where the number of canals never steps down', () => {
		const grids = ordinaryGrids();
		for (const id of ['q4', 'q6', 'q7', 'q8'] as const) grids[id] = pointGrid(0);
		const { posterior } = ask(
			{ canals: 2, findings: [finding('cone-mark'), finding('draw')] },
			inventedRoot(grids, inventedGrid(0, 1))
		);
		for (const fate of ['shared-exit', 'meet-and-part', 'partly-shared'] as const) {
			expect(posterior.fates[fate]).toEqual({ mean: 0, interval: [0, 0] });
		}
		expect(posterior.fates.separate).toEqual({ mean: 1, interval: [1, 1] });
	});

	it('is right by hand', () => {
		// All questions known: P(2-1) = 0.4, P(2-1-2) = 0.1, P(2) = 0.5 of the two-canal roots, no others.
		const grids = ordinaryGrids();
		const known = { q1: 1, q2: 1, q3: 0, q4: 0.5, q5: 0.2, q6: 0.5, q7: 0.5, q8: 0.5, q9: 0.5 };
		for (const id of Object.keys(known) as (keyof typeof known)[]) grids[id] = pointGrid(known[id]);
		const model = inventedRoot(grids, pointGrid(0.25));
		// Cone mark: 17/20 if they meet, 1/20 if never. 0.4 * 0.85 / (0.5 * 0.85 + 0.5 * 0.05) = 0.755555…
		const marked = ask({ canals: 2, findings: [finding('cone-mark')] }, model);
		expect(marked.prior.fates['shared-exit']?.mean).toBeCloseTo(0.4, 12);
		expect(marked.posterior.fates['shared-exit']?.mean).toBeCloseTo(0.34 / 0.45, 12);
		expect(marked.posterior.fates['meet-and-part']?.mean).toBeCloseTo(0.085 / 0.45, 12);
		// Draw test: 16/20 if they meet; never: 0.25 * 10/20 + 0.75 * 2/20 = 0.2. Negative: 0.2 and 0.8.
		const drawn = ask({ canals: 2, findings: [finding('draw', 'negative')] }, model);
		expect(drawn.posterior.fates.separate?.mean).toBeCloseTo(0.4 / 0.5, 12);
		expect(drawn.assumed).toEqual(['draw']);
	});

	it('weighs a search by moments: E[1 - s] of Beta(6, 4) is 0.4, E[(1 - s)^2] is 20/110', () => {
		const grids = ordinaryGrids();
		const known = { q1: 0.6, q2: 1, q3: 0.5, q4: 0, q5: 0, q6: 0, q7: 0, q8: 0, q9: 0 };
		for (const id of Object.keys(known) as (keyof typeof known)[]) grids[id] = pointGrid(known[id]);
		const { posterior } = ask({ canals: 1, search: 'microscope', findings: [] }, inventedRoot(grids));
		const [one, two, three] = [0.4, 0.3 * 0.4, (0.3 * 20) / 110];
		expect(posterior.fates['one-canal']?.mean).toBeCloseTo(one / (one + two + three), 12);
		expect(posterior.anotherCanal?.mean).toBeCloseTo((two + three) / (one + two + three), 12);
		// Two found of three: 2 E[s (1 - s)] = 2 * 24/110; two of two: E[s] = 0.6.
		const second = ask({ canals: 2, search: 'microscope', findings: [] }, inventedRoot(grids));
		expect(second.posterior.anotherCanal?.mean).toBeCloseTo(48 / 110 / (0.6 + 48 / 110), 12);
	});

	it('lists one canal only while a width of one is possible, and no fourth canal', () => {
		expect(Object.keys(ask({ canals: 1, findings: [] }).posterior.fates)).toContain('one-canal');
		expect(Object.keys(ask({ canals: 2, findings: [] }).posterior.fates)).not.toContain('one-canal');
		expect(Object.keys(ask({ canals: 1, orifices: 2, findings: [] }).prior.fates)).not.toContain('one-canal');
		expect(ask({ canals: 1, orifices: 2, findings: [] }).posterior.anotherCanal?.mean).toBe(1);
		expect(ask({ canals: 3, findings: [] }).posterior.anotherCanal).toBeNull();
		expect(ask({ canals: 3, findings: [] }).posterior.exits.map(({ count }) => count)).toEqual([1, 2, 3]);
	});

	it('counts only the stronger of file contact and two files', () => {
		// Mean likelihood ratios: contact 0.8 / 0.05 = 16, negative 0.2 / 0.95; two files 0.7 / 0.1 = 7, negative 0.3 / 0.9.
		const contact = ask({ canals: 2, findings: [finding('file-contact')] });
		const both = ask({ canals: 2, findings: [finding('two-files'), finding('file-contact')] });
		expect(both.superseded).toEqual({ test: 'two-files', by: 'file-contact' });
		expect(both.posterior).toEqual(contact.posterior);
		expect(both.assumed).toEqual(['file-contact']);
		// ln 7 = 1.95 is more than ln (0.95 / 0.2) = 1.56.
		const mixed = ask({ canals: 2, findings: [finding('file-contact', 'negative'), finding('two-files')] });
		expect(mixed.superseded).toEqual({ test: 'file-contact', by: 'two-files' });
		expect(mixed.posterior).toEqual(ask({ canals: 2, findings: [finding('two-files')] }).posterior);
		expect(mixed.steps[1].fates).not.toEqual(mixed.steps[0].fates);
		// An unclear one is not a finding that could be superseded.
		const unclear = ask({ canals: 2, findings: [finding('file-contact'), finding('two-files', 'unclear')] });
		expect(unclear.superseded).toBeNull();
	});

	it('shows the way: fates after each finding, the last being the answer', () => {
		const findings = [finding('cone-mark'), finding('draw', 'unclear'), finding('cbct-reading', 'negative')];
		const { steps, posterior } = ask({ canals: 2, findings });
		expect(steps.map((step) => step.finding)).toEqual(findings);
		expect(steps[1].fates).toEqual(steps[0].fates);
		const means = Object.entries(posterior.fates).map(([fate, { mean }]) => [fate, mean]);
		expect(steps[2].fates).toEqual(Object.fromEntries(means));
	});

	it('names what is assumed: the isthmus, too, where no study of the root has it', () => {
		const draw: ConfluenceQuestion = { canals: 2, findings: [finding('draw'), finding('cbct-reading')] };
		expect(ask(draw).assumed).toEqual(['draw']);
		expect(ask(draw, inventedRoot(ordinaryGrids())).assumed).toEqual(['draw', 'isthmus']);
		expect(ask({ canals: 2, search: 'loupes', findings: [finding('cbct-reading')] }).assumed).toEqual([]);
	});

	it('answers without evidence, but gives no advice', () => {
		const { decision, posterior } = ask({ canals: 2, findings: [] }, { ...root, hasEvidence: false });
		expect(decision).toMatchObject({ advice: null, furtherTestingCanChangeIt: false });
		expect(total(Object.values(posterior.fates))).toBeCloseTo(1, 12);
	});

	it('refuses what the root or the table cannot answer', () => {
		const grids = { ...ordinaryGrids(), q1: pointGrid(0) };
		expect(() => ask({ canals: 2, findings: [] }, inventedRoot(grids))).toThrow(RangeError);
		const empty = characteristicsFor([], 'maxillary-first-molar', 'MB');
		expect(() => answerConfluence(root, empty, { canals: 2, findings: [finding('draw')] })).toThrow(/draw/);
		expect(() => answerConfluence(root, empty, { canals: 2, search: 'cbct', findings: [] })).toThrow(
			/search-cbct/
		);
	});
});

describe('the upper first molar, two canals in the MB root', () => {
	const model = shippedRoot('maxillary-first-molar', 'MB');
	const meet = (findings: Finding[]) =>
		1 - ask({ canals: 2, findings }, model).posterior.fates.separate!.mean;

	it('is moved a long way by a cone mark, and less by a draw test', () => {
		const before = meet([]);
		const odds = (p: number) => p / (1 - p);
		expect(before).toBeGreaterThan(0.3);
		expect(before).toBeLessThan(0.8);
		const marked = odds(meet([finding('cone-mark')])) / odds(before);
		const drawn = odds(meet([finding('draw')])) / odds(before);
		// Likelihood ratio of the mean characteristics: 0.85 / 0.05 = 17.
		expect(marked).toBeCloseTo(17, 6);
		expect(drawn).toBeGreaterThan(1);
		expect(drawn).toBeLessThan(marked / 3);
	});
});
