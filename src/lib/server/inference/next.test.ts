import { describe, expect, it } from 'vitest';
import {
	inventedGrid,
	inventedRoot,
	ordinaryGrids,
	pointGrid,
	shippedCharacteristics
} from '../../../../tests/support/inventedRoot';
import { characteristicsFor } from './characteristics';
import { answerConfluence } from './confluence';
import { TESTS } from '$lib/schemas/terms';
import type { ConfluenceQuestion, Finding, Test } from './confluenceQuestion';
import type { PredictiveGrid, QuestionId } from './types';

const characteristics = characteristicsFor(shippedCharacteristics(), 'maxillary-first-molar', 'MB');
const root = inventedRoot(ordinaryGrids(), inventedGrid(0.3, 0.8));
const ask = (question: ConfluenceQuestion, model = root) =>
	answerConfluence(model, characteristics, question);
const finding = (test: Test, result: Finding['result'] = 'positive'): Finding => ({ test, result });

/** Two-canal roots of which a known share ends in one exit, the others in two without meeting. */
function rootOfShare(sharedExit: number) {
	const known: Record<QuestionId, number> = {
		...{ q1: 1, q2: 1, q3: 0, q4: sharedExit, q5: 0 },
		...{ q6: 0.5, q7: 0.5, q8: 0.5, q9: 0.5 }
	};
	const grids = Object.entries(known).map(([id, p]) => [id, pointGrid(p)] as const);
	return inventedRoot(Object.fromEntries(grids) as Record<QuestionId, PredictiveGrid>, pointGrid(0.5));
}

describe('what to test next', () => {
	it('ranks every test not yet made by bits', () => {
		const { next } = ask({ canals: 2, findings: [finding('cone-mark'), finding('draw', 'unclear')] });
		expect(next.map(({ test }) => test).sort()).toEqual([
			'angled-radiograph',
			'cbct-reading',
			'draw',
			'file-contact',
			'two-files'
		]);
		const bits = next.map((test) => test.bits);
		expect(bits).toEqual([...bits].sort((a, b) => b - a));
		expect(next.every(({ effort, risk }) => effort && risk)).toBe(true);
	});

	it('gives the mutual information of fate and result', () => {
		// Even odds and a cone mark of 0.85 and 0.05: H(0.45) - (H(0.85) + H(0.05)) / 2.
		const h = (p: number) => -p * Math.log2(p) - (1 - p) * Math.log2(1 - p);
		const { next } = ask({ canals: 2, findings: [] }, rootOfShare(0.5));
		const mark = next.find(({ test }) => test === 'cone-mark')!;
		expect(mark.bits).toBeCloseTo(h(0.45) - (h(0.85) + h(0.05)) / 2, 10);
		expect(mark.results.map(({ result }) => result)).toEqual(['positive', 'negative']);
		expect(mark.results[0].probability).toBeCloseTo(0.45, 12);
		expect(mark.results[0].fates['shared-exit']).toBeCloseTo(0.425 / 0.45, 12);
		expect(mark.results[1].fates['shared-exit']).toBeCloseTo(0.075 / 0.55, 12);
	});

	it('foretells exactly what the finding will do, and expects no change on average', () => {
		const question: ConfluenceQuestion = { canals: 2, search: 'loupes', findings: [finding('draw')] };
		const { next, posterior } = ask(question);
		for (const { test, results } of next) {
			expect(results[0].probability + results[1].probability).toBeCloseTo(1, 12);
			const average = results.reduce(
				(sum, { probability, fates }) => sum + probability * fates['shared-exit']!,
				0
			);
			expect(average).toBeCloseTo(posterior.fates['shared-exit']!.mean, 12);
			const after = ask({ ...question, findings: [finding(test), ...question.findings] });
			expect(after.posterior.fates['shared-exit']?.mean).toBe(results[0].fates['shared-exit']);
		}
	});

	it('expects nothing of two files once file contact is positive, which says more either way', () => {
		const { next } = ask({ canals: 2, findings: [finding('file-contact')] });
		expect(next.at(-1)).toMatchObject({ test: 'two-files', bits: 0 });
	});

	it('has nothing to test with one canal', () => {
		expect(ask({ canals: 1, findings: [] }).next).toEqual([]);
		expect(ask({ canals: 1, orifices: 2, findings: [] }).decision.advice).toBeNull();
	});
});

describe('the advice', () => {
	const advice = (share: number, findings: Finding[], threshold?: number) =>
		ask({ canals: 2, threshold, findings }, rootOfShare(share)).decision;

	it('follows the threshold, 0.90 unless stated', () => {
		expect(advice(0.95, [])).toMatchObject({ threshold: 0.9, advice: 'treat-as-joined' });
		expect(advice(0.85, [])).toMatchObject({ advice: 'undecided' });
		expect(advice(0.85, [], 0.8)).toMatchObject({ threshold: 0.8, advice: 'treat-as-joined' });
		expect(advice(0.05, [])).toMatchObject({ advice: 'treat-as-separate' });
		expect(advice(0.15, [], 0.8)).toMatchObject({ advice: 'treat-as-separate' });
	});

	it('does not treat canals as joined on the strength of an assumption alone', () => {
		// Even odds: a cone mark gives 17 : 1 (0.944), its square root 4.12 : 1 (0.805).
		expect(advice(0.5, [finding('cone-mark')])).toMatchObject({ advice: 'undecided' });
		expect(advice(0.5, [finding('cone-mark')], 0.8)).toMatchObject({ advice: 'treat-as-joined' });
		// The CBCT reading (0.7 and 0.3) is published: its 7 : 3 is not weakened. 0.85 gives 0.9297.
		expect(advice(0.85, [finding('cbct-reading')])).toMatchObject({ advice: 'treat-as-joined' });
		// The draw test with an isthmus in half: 0.8 / 0.3 = 2.67, root 1.63. 0.8 gives 0.914, with the root 0.867.
		expect(advice(0.8, [finding('draw')])).toMatchObject({ advice: 'undecided' });
	});

	it('says whether the remaining tests could change it', () => {
		expect(advice(0.5, []).furtherTestingCanChangeIt).toBe(true);
		expect(advice(1, [])).toMatchObject({ advice: 'treat-as-joined', furtherTestingCanChangeIt: false });
		expect(advice(1e-9, [])).toMatchObject({ advice: 'treat-as-separate', furtherTestingCanChangeIt: false });
		const all = TESTS.map((test) => finding(test, 'negative'));
		expect(advice(0.5, all)).toMatchObject({ advice: 'treat-as-separate', furtherTestingCanChangeIt: false });
	});
});
