import { describe, expect, it } from 'vitest';
import { indexOf, row, rows, shippedTable, source } from '../../../../tests/support/literatureTable';
import { gatherEvidence } from './evidence';
import { askedRoot } from './scope';
import { indexTable } from './tableIndex';
import { QUESTION_IDS } from './types';
import type { Filters, ObservationRow, SourceFacts } from './types';

const MB = ['maxillary-first-molar', 'MB'] as const;

function evidence(
	table: ObservationRow[],
	[tooth, root]: readonly [string, string] = MB,
	filters: Filters = {},
	sources: SourceFacts[] = []
) {
	return gatherEvidence(indexOf(table, sources), tooth, root, filters);
}
const counts = (found: { events: number; total: number }[]) =>
	found.map(({ events, total }) => [events, total]);

describe('subgroups', () => {
	const half = (subgroup: string, count: number, total: number) => row({ subgroup, count, total });

	it('sums male and female, or left and right, where there is no whole', () => {
		expect(counts(evidence([half('male', 10, 40), half('female', 30, 60)]).questions.q1)).toEqual([
			[60, 100]
		]);
		expect(counts(evidence([half('left', 10, 40), half('right', 30, 60)]).questions.q1)).toEqual([[60, 100]]);
	});

	it('uses the whole where it is given, and says so of its parts', () => {
		const found = evidence([half('all', 50, 100), half('male', 10, 40), half('female', 30, 60)]);
		expect(counts(found.questions.q1)).toEqual([[50, 100]]);
		expect(found.notPooled.map(({ reason }) => reason)).toEqual([
			expect.stringContaining('male'),
			expect.stringContaining('female')
		]);
	});

	it('pools no half by itself and no other subgroup', () => {
		const found = evidence([half('male', 10, 40), row({ source: 'b', subgroup: 'age 9-12' })]);
		expect(found.questions.q1).toEqual([]);
		expect(found.notPooled).toHaveLength(2);
	});

	it('takes a class one complete half does not mention as none, and drops one an incomplete half leaves open', () => {
		const halves = (male: Record<string, number>) => [
			...rows(male, { subgroup: 'male' }),
			...rows({ '1': 40, '2': 59, '3': 1 }, { subgroup: 'female' })
		];
		expect(counts(evidence(halves({ '1': 40, '2': 60 })).questions.q3)).toEqual([[1, 120]]);
		expect(evidence(halves({ '1': 40, '2': 40 })).questions.q3).toEqual([]);
	});
});

describe('combined countries', () => {
	const one = (country: string, count: number, total: number) => row({ country, count, total });

	it('replace their parts', () => {
		const found = evidence([one('BRA', 40, 136), one('TUR', 60, 122), one('BRA+TUR', 100, 258)]);
		expect(counts(found.questions.q1)).toEqual([[158, 258]]);
		expect(found.notPooled.map(({ reason }) => reason)).toEqual(
			Array(2).fill(expect.stringContaining('several countries'))
		);
	});

	it('replace the single countries of a multi sample, also where only its count is missing', () => {
		const overall = row({ country: 'multi', count: null, total: null, percent: 30 });
		const found = evidence([one('VEN', 1, 2), overall]);
		expect(found.questions.q1).toEqual([]);
		expect(found.notPooled).toHaveLength(2);
	});

	it('do not replace the part a country filter asks for', () => {
		const table = [one('BRA', 40, 136), one('TUR', 60, 122), one('BRA+TUR', 100, 258)];
		expect(counts(evidence(table, MB, { countries: ['BRA'] }).questions.q1)).toEqual([[96, 136]]);
		expect(counts(evidence(table, MB, { countries: ['BRA', 'TUR'] }).questions.q1)).toEqual([[158, 258]]);
	});
});

describe('the same teeth once', () => {
	it('prefers the method, then the measure, then the larger total', () => {
		const byMethod = evidence([row({ method: 'cbct' }), row({ method: 'micro-ct', count: 30, total: 50 })]);
		expect(counts(byMethod.questions.q1)).toEqual([[20, 50]]);
		expect(byMethod.notPooled[0].reason).toMatch(/same teeth/);
		const byMeasure = evidence([row({ measure: 'feature', category: 'mb2', count: 70, total: 200 }), row()]);
		expect(counts(byMeasure.questions.q1)).toEqual([[60, 100]]);
		const byTotal = evidence([row({ total: 50 }), row({ total: 300 })]);
		expect(counts(byTotal.questions.q1)).toEqual([[260, 300]]);
	});

	it('keeps other sources, and chooses for each question apart', () => {
		const table = [
			row({ method: 'micro-ct', count: 30, total: 50 }),
			...rows({ '1': 40, '2': 30, '2-1': 30 }, { method: 'cbct' }),
			row({ source: 'source-b' })
		];
		const { questions } = evidence(table);
		expect(counts(questions.q1)).toEqual([
			[20, 50],
			[60, 100]
		]);
		expect(counts(questions.q4)).toEqual([[30, 60]]);
	});

	it('makes whole and single one root of incisors and canines, whole first, but not of premolars', () => {
		const pair = (tooth: string) => [
			row({ tooth, root: 'single', method: 'micro-ct', count: 80 }),
			row({ tooth, root: 'whole', count: 90 })
		];
		const canine = evidence(pair('mandibular-canine'), ['mandibular-canine', 'single']);
		expect(counts(canine.questions.q1)).toEqual([[10, 100]]);
		const premolar = pair('mandibular-first-premolar');
		expect(counts(evidence(premolar, ['mandibular-first-premolar', 'single']).questions.q1)).toEqual([
			[20, 100]
		]);
		expect(counts(evidence(premolar, ['mandibular-first-premolar', 'whole']).questions.q1)).toEqual([
			[10, 100]
		]);
	});
});

describe('M roots', () => {
	const M = ['mandibular-first-molar', 'M'] as const;
	const at = { tooth: M[0], root: M[1] };
	const table = rows({ '1': 5, '2': 60, '3': 20, '3-1': 15 }, { ...at, source: 'tables' });

	it('read q3 only from middle-mesial where there is any, else from configurations', () => {
		expect(counts(evidence(table, M).questions.q3)).toEqual([[35, 95]]);
		const mesial = row({ ...at, measure: 'feature', category: 'middle-mesial', count: 9 });
		expect(counts(evidence([...table, mesial], M).questions.q3)).toEqual([[9, 100]]);
	});

	it('read q8 likewise from extra-canal-confluence', () => {
		expect(counts(evidence(table, M).questions.q8)).toEqual([[15, 35]]);
		const extra = row({
			...at,
			measure: 'extra-canal-confluence',
			scope: 'negotiated accessory mesial canals',
			category: 'joined',
			count: 7,
			total: 7
		});
		expect(counts(evidence([...table, extra], M).questions.q8)).toEqual([[7, 7]]);
	});
});

describe('filters recompute from what is left', () => {
	const table = [
		row({ source: 'old' }),
		row({ source: 'new', method: 'micro-ct', country: 'TUR', count: 20, total: 50 })
	];
	const sources = [
		source('old', { year: 1984 }),
		source('new', { year: 2020 }),
		source('undated', { year: null })
	];
	const left = (filters: Filters) =>
		evidence(table, MB, filters, sources).questions.q1.map((study) => study.source);

	it('by method, country, year, size and source', () => {
		expect(left({})).toEqual(['old', 'new']);
		expect(left({ methods: ['micro-ct'] })).toEqual(['new']);
		expect(left({ countries: ['BRA'] })).toEqual(['old']);
		expect(left({ yearFrom: 2000 })).toEqual(['new']);
		expect(left({ yearTo: 2000 })).toEqual(['old']);
		expect(left({ minTotal: 51 })).toEqual(['old']);
		expect(left({ exclude: ['old'] })).toEqual(['new']);
		expect(left({ methods: [], countries: [], exclude: [] })).toEqual(['old', 'new']);
	});

	it('says which filter left a sample out', () => {
		const { notPooled } = evidence(table, MB, { methods: ['cbct'] }, sources);
		expect(notPooled).toEqual([
			expect.objectContaining({ source: 'new', reason: 'Left out by your filter (method).' })
		]);
	});

	it('passes no sample of unknown year or country', () => {
		const unknown = [row({ source: 'undated', country: '' })];
		expect(evidence(unknown, MB, { yearTo: 2020 }, sources).questions.q1).toEqual([]);
		expect(evidence(unknown, MB, { countries: ['BRA'] }, sources).questions.q1).toEqual([]);
	});

	it('uses another sample of a source when the filter leaves out the preferred one', () => {
		const two = [row({ method: 'micro-ct', count: 30, total: 50 }), row({ method: 'cbct' })];
		expect(counts(evidence(two, MB, { methods: ['cbct'] }).questions.q1)).toEqual([[60, 100]]);
	});
});

describe('reviews', () => {
	it('stand beside the studies, as the percentage that says yes', () => {
		const review = { method: 'review', count: null, total: null };
		const found = evidence([
			row({ source: 'r1', ...review, percent: 30 }),
			row({ source: 'r2', ...review, measure: 'feature', category: 'mb2', percent: 69.6 })
		]);
		expect(found.questions.q1).toEqual([]);
		expect(found.reviews.map(({ source: id, question, percent }) => [id, question, percent])).toEqual([
			['r1', 'q1', 70],
			['r2', 'q1', 69.6]
		]);
		expect(found.notPooled).toHaveLength(2);
	});
});

describe('isthmus', () => {
	it('keeps roots with two canals apart from all roots, one sample a source', () => {
		const isthmus = { measure: 'feature', category: 'isthmus' };
		const found = evidence([
			row({ ...isthmus, scope: 'teeth with MB2', count: 17, total: 24 }),
			row({ ...isthmus, count: 50 }),
			row({ ...isthmus, source: 'b', count: 70 })
		]);
		expect(counts(found.isthmus.twoCanalRoots)).toEqual([[17, 24]]);
		expect(counts(found.isthmus.allRoots)).toEqual([[70, 100]]);
	});
});

describe('nothing is silently dropped', () => {
	it('every entry of the shipped table that names a tooth is listed with a reason, or its source is used', () => {
		const { rows: table, sources } = shippedTable();
		const index = indexTable(table, sources);
		const keys = [...index.roots.keys()].map((key) => key.split('|')).filter(([tooth]) => tooth !== '');
		expect(keys.length).toBeGreaterThan(30);
		for (const [tooth, root] of keys) {
			const found = gatherEvidence(index, tooth, root, {});
			const isthmus = [...found.isthmus.twoCanalRoots, ...found.isthmus.allRoots];
			const used = [...QUESTION_IDS.flatMap((id) => found.questions[id]), ...isthmus].map(
				(study) => study.source
			);
			const listed = found.notPooled.map(({ entry }) => entry);
			const unseen = table
				.filter((each) => each.tooth === tooth && askedRoot(tooth, each.root) === root)
				.filter((each) => !used.includes(each.source) && !listed.includes(each.entry));
			expect(unseen, `${tooth} ${root}`).toEqual([]);
			expect(new Set(listed).size).toBe(listed.length);
			for (const { reason } of found.notPooled) expect(reason).toMatch(/^[A-Z].*\.$/);
		}
	});
});
