import type { ConfluenceDto } from '../../src/lib/schemas/confluence';

/** An invented answer to two canals and three findings, one of them unclear; its figures belong to no root. */
export function inventedAnswer(changes: Partial<ConfluenceDto> = {}): ConfluenceDto {
	return {
		tableRevision: 7,
		prior: {
			fates: {
				'shared-exit': { mean: 0.6, interval: [0.27, 0.88] },
				'meet-and-part': { mean: 0.01, interval: [0, 0.03] },
				separate: { mean: 0.39, interval: [0.12, 0.73] }
			},
			meet: { mean: 0.61, interval: [0.27, 0.88] },
			anotherCanal: { mean: 0.05, interval: [0.01, 0.14] }
		},
		posterior: {
			fates: {
				'shared-exit': { mean: 0.94, interval: [0.81, 0.99] },
				'meet-and-part': { mean: 0.02, interval: [0, 0.05] },
				separate: { mean: 0.04, interval: [0.01, 0.17] }
			},
			meet: { mean: 0.96, interval: [0.83, 0.99] },
			anotherCanal: { mean: 0.05, interval: [0.01, 0.14] },
			exits: [
				{ count: 1, mean: 0.94, interval: [0.81, 0.99] },
				{ count: 2, mean: 0.06, interval: [0.01, 0.19] }
			],
			sequences: [
				{ sequence: '2-1', mean: 0.94, interval: [0.81, 0.99] },
				{ sequence: '2', mean: 0.04, interval: [0.01, 0.17] },
				{ sequence: '2-1-2', mean: 0.02, interval: [0, 0.05] }
			]
		},
		steps: [
			{
				finding: { test: 'cone-mark', result: 'positive' },
				fates: { 'shared-exit': 0.96, 'meet-and-part': 0.01, separate: 0.03 },
				intervals: { 'shared-exit': [0.82, 0.99], 'meet-and-part': [0, 0.04], separate: [0, 0.16] },
				expected: { meet: 0.85, never: 0.05, assumed: true, sources: [] },
				note: null
			},
			{
				finding: { test: 'draw', result: 'unclear' },
				fates: { 'shared-exit': 0.96, 'meet-and-part': 0.01, separate: 0.03 },
				intervals: { 'shared-exit': [0.82, 0.99], 'meet-and-part': [0, 0.04], separate: [0, 0.16] },
				expected: null,
				note: null
			},
			{
				finding: { test: 'file-contact', result: 'negative' },
				fates: { 'shared-exit': 0.94, 'meet-and-part': 0.02, separate: 0.04 },
				intervals: { 'shared-exit': [0.81, 0.99], 'meet-and-part': [0, 0.05], separate: [0.01, 0.17] },
				expected: { meet: 0.2, never: 0.9, assumed: false, sources: ['someone-2020'] },
				note: 'A note on this step.'
			}
		],
		next: [
			{
				test: 'two-files',
				bits: 0.021,
				results: [
					{ result: 'positive', probability: 0.7, fates: { 'shared-exit': 0.97 } },
					{ result: 'negative', probability: 0.3, fates: { 'shared-exit': 0.88 } }
				],
				effort: 'low',
				note: 'no radiation'
			}
		],
		decision: { threshold: 0.9, advice: 'treat-as-joined', furtherTestingCanChangeIt: true },
		evidence: { studies: 12, sources: ['someone-2020'], borrowed: ['q6'] },
		assumed: ['cone-mark', 'search-microscope'],
		notes: ['Findings are taken as independent.'],
		cautions: ['A caution of this answer alone.'],
		...changes
	};
}
