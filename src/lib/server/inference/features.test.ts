import { describe, expect, it } from 'vitest';
import { indexOf, row, rows, shippedIndex } from '../../../../tests/support/literatureTable';
import { gatherCounts } from './counts';
import { gatherFeatures } from './features';

const feature = { measure: 'feature', tooth: 'mandibular-second-molar', root: 'whole' };

describe('features', () => {
	it('pool plain prevalences of all teeth, one sample a source, halves summed', () => {
		const index = indexOf([
			row({ ...feature, category: 'c-shape', count: 10 }),
			row({ ...feature, category: 'c-shape', count: 9, total: 60, method: 'micro-ct' }),
			row({ ...feature, source: 'b', subgroup: 'male', category: 'c-shape', count: 4, total: 40 }),
			row({ ...feature, source: 'b', subgroup: 'female', category: 'c-shape', count: 6, total: 40 })
		]);
		const [found, ...others] = gatherFeatures(index, feature.tooth, null, {});
		expect(others).toEqual([]);
		expect(found.id).toBe('c-shape');
		expect(found.studies.map(({ events, total }) => [events, total])).toEqual([
			[9, 60],
			[10, 80]
		]);
	});

	it('leave out places, other bases and what is no prevalence', () => {
		const index = indexOf([
			row({ ...feature, category: 'isthmus-at-3mm' }),
			row({ ...feature, category: 'missed-canal' }),
			row({ ...feature, category: 'c-shape', scope: 'patients' }),
			row({ ...feature, category: 'second-distal' }),
			row({ ...feature, root: 'M', category: 'isthmus', scope: 'mesial roots with two canals' })
		]);
		expect(gatherFeatures(index, feature.tooth, null, {})).toEqual([]);
		expect(gatherFeatures(index, feature.tooth, 'M', {})).toEqual([]);
	});

	it('hold the C-shape of lower second molars between the lowest and highest of the literature (shipped table)', () => {
		const found = gatherFeatures(shippedIndex(), 'mandibular-second-molar', null, {}).find(
			({ id }) => id === 'c-shape'
		);
		const shares = (found?.studies ?? []).map(({ events, total }) => events / total);
		expect(shares.length).toBeGreaterThan(15);
		expect(Math.min(...shares)).toBeGreaterThan(0.01);
		expect(Math.max(...shares)).toBeLessThan(0.5);
	});
});

describe('counts of the whole tooth', () => {
	it('list samples of all teeth with their categories, the largest first', () => {
		const count = { tooth: 'maxillary-first-premolar', root: 'whole', measure: 'root-count' };
		const index = indexOf([
			...rows({ '1': 57, '2': 41, '3': 2 }, count),
			...rows({ '1': 198, '2': 221, '3': 11 }, { ...count, source: 'b', total: 430 }),
			...rows({ '1': 10 }, { ...count, source: 'c', scope: 'two-rooted' })
		]);
		const found = gatherCounts(index, 'maxillary-first-premolar', 'root-count', {});
		expect(found.map(({ source, total }) => [source, total])).toEqual([
			['b', 430],
			['source-a', 100]
		]);
		expect(found[1].counts).toEqual([
			{ category: '1', count: 57 },
			{ category: '2', count: 41 },
			{ category: '3', count: 2 }
		]);
		expect(gatherCounts(index, 'maxillary-first-premolar', 'canal-count', {})).toEqual([]);
		expect(gatherCounts(index, 'maxillary-first-premolar', 'root-count', { minTotal: 200 })).toHaveLength(1);
	});
});
