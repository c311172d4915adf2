import { describe, expect, it } from 'vitest';
import { LEAVES, leafFacts } from '$lib/anatomy/sequence';
import { answersFromLeaves, leafMeans, PATHS } from './distribution';
import { QUESTION_IDS } from './types';
import type { QuestionId } from './types';

const YES: Record<QuestionId, number> = {
	q1: 0.62,
	q2: 0.9,
	q3: 0.07,
	q4: 0.55,
	q5: 0.1,
	q6: 0.8,
	q7: 0.25,
	q8: 0.6,
	q9: 0.7
};

describe('the tree of questions (inference, section 2)', () => {
	it('gives each leaf the product along its path', () => {
		const leaves = leafMeans(YES);
		expect(leaves['1']).toBeCloseTo(0.38, 12);
		expect(leaves['2']).toBeCloseTo(0.62 * 0.9 * 0.93 * 0.45, 12);
		expect(leaves['2-1-2']).toBeCloseTo(0.62 * 0.9 * 0.93 * 0.55 * 0.1, 12);
		expect(leaves['1-2-1-2']).toBeCloseTo(0.62 * 0.1 * 0.2 * 0.25, 12);
		expect(leaves['3-2']).toBeCloseTo(0.62 * 0.9 * 0.07 * 0.6 * 0.3, 12);
	});

	it('sums to 1', () => {
		const leaves = leafMeans(YES);
		expect(LEAVES.reduce((sum, leaf) => sum + leaves[leaf], 0)).toBeCloseTo(1, 12);
	});

	it('has paths that say of each leaf what its sequence is', () => {
		for (const leaf of LEAVES) {
			const answer = (id: QuestionId) => PATHS[leaf].find(({ question }) => question === id)?.answer;
			const { orifices, exits, width, stepsDown } = leafFacts(leaf);
			expect(answer('q1')).toBe(width > 1);
			if (width > 1) expect(answer('q2')).toBe(orifices >= 2);
			if (orifices >= 2) expect(answer('q3')).toBe(orifices >= 3);
			for (const id of ['q4', 'q7', 'q8'] as const)
				if (answer(id) !== undefined) expect(answer(id)).toBe(stepsDown);
			if (answer('q5') !== undefined) expect(answer('q5')).toBe(exits >= 2);
			for (const id of ['q6', 'q9'] as const)
				if (answer(id) !== undefined) expect(answer(id)).toBe(exits === 1);
		}
	});

	it('counts who was asked and who said yes', () => {
		const counts = new Map([
			['1', 5],
			['2', 3],
			['2-1', 4],
			['3', 1]
		] as const);
		const asked = QUESTION_IDS.map((id) => answersFromLeaves(counts, id)).map(({ events, total }) => [
			events,
			total
		]);
		expect(asked).toEqual([
			[8, 13],
			[8, 8],
			[1, 8],
			[4, 7],
			[0, 4],
			[0, 0],
			[0, 0],
			[0, 1],
			[0, 0]
		]);
	});
});
