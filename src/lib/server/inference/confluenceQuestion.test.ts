import { describe, expect, it } from 'vitest';
import { possibleLeaves, validateQuestion } from './confluenceQuestion';
import type { ConfluenceQuestion, Finding } from './confluenceQuestion';

const finding = (test: Finding['test'], pair?: string): Finding => ({ test, result: 'positive', pair });
const paths = (question: ConfluenceQuestion) => validateQuestion(question).map(({ path }) => path);

describe('validateQuestion', () => {
	it('lets sound questions pass', () => {
		expect(paths({ canals: 1, search: 'cbct', findings: [] })).toEqual([]);
		expect(paths({ canals: 2, orifices: 1, findings: [finding('cone-mark'), finding('draw')] })).toEqual([]);
		expect(paths({ canals: 1, orifices: 3, findings: [] })).toEqual([]);
		expect(paths({ canals: 3, orifices: 1, threshold: 0.8, findings: [finding('draw', 'MB-ML')] })).toEqual(
			[]
		);
	});

	it.each([0, 4, 1.5, NaN])('refuses %d canals', (canals) => {
		expect(paths({ canals, findings: [] })).toEqual(['canals']);
	});

	it('refuses orifices that leave no sequence, and counts that are none', () => {
		expect(paths({ canals: 2, orifices: 4, findings: [] })).toEqual(['orifices']);
		expect(paths({ canals: 2, orifices: 0, findings: [] })).toEqual(['orifices']);
		expect(paths({ canals: 2, orifices: 1.5, findings: [] })).toEqual(['orifices']);
	});

	it('refuses a test entered twice, naming the second', () => {
		expect(paths({ canals: 2, findings: [finding('draw'), finding('draw')] })).toEqual(['findings.1.test']);
	});

	it('refuses every joining test with one canal, unclear ones too', () => {
		const unclear: Finding = { test: 'cbct-reading', result: 'unclear' };
		expect(paths({ canals: 1, findings: [finding('draw'), unclear] })).toEqual([
			'findings.0.test',
			'findings.1.test'
		]);
	});

	it.each([undefined, '', 'MB', 'MB-', 'MB-MB', 'A-B-C'])(
		'asks which two of three canals: not %o',
		(pair) => {
			expect(paths({ canals: 3, findings: [finding('draw', 'MB-ML'), finding('cone-mark', pair)] })).toEqual([
				'findings.1.pair'
			]);
		}
	);

	it.each([0.49, 1.01, NaN])('refuses a threshold of %d', (threshold) => {
		expect(paths({ canals: 2, threshold, findings: [] })).toEqual(['threshold']);
	});

	it('tells everything at once', () => {
		const all = paths({ canals: 1, orifices: 9, threshold: 0, findings: [finding('draw')] });
		expect(all).toEqual(['orifices', 'threshold', 'findings.0.test']);
	});
});

describe('possibleLeaves', () => {
	// By hand from the design: width w ≥ f = max(k, o), and o ≤ start ≤ o + (w - f) unless f ≥ 3.
	it.each([
		[1, undefined, '1 2 2-1 2-1-2 1-2-1 1-2-1-2 1-2 3 3-1 3-2'],
		[1, 1, '1 2 2-1 2-1-2 1-2-1 1-2-1-2 1-2 3 3-1 3-2'],
		[1, 2, '2 2-1 2-1-2 3 3-1 3-2'],
		[2, undefined, '2 2-1 2-1-2 1-2-1 1-2-1-2 1-2 3 3-1 3-2'],
		[2, 1, '1-2-1 1-2-1-2 1-2'],
		[2, 2, '2 2-1 2-1-2 3 3-1 3-2'],
		[2, 3, '3 3-1 3-2'],
		[3, 1, '3 3-1 3-2'],
		[3, undefined, '3 3-1 3-2'],
		[2, 4, '']
	])('after %d canals and %o orifices', (canals, orifices, expected) => {
		expect(possibleLeaves({ canals, orifices }).join(' ')).toBe(expected);
	});
});
