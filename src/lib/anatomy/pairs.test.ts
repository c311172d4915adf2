import { describe, expect, it } from 'vitest';
import { relatedRoots } from './pairs';
import { teeth } from './teeth';

const named = (tooth: string, root: Parameters<typeof relatedRoots>[1]) =>
	relatedRoots(tooth, root).map((place) => `${place.tooth.id}/${place.root.id}`);

describe('relatedRoots', () => {
	it('names the other roots, the same root of the neighbours and the counterpart in the other jaw', () => {
		expect(named('maxillary-first-molar', 'MB')).toEqual([
			'maxillary-first-molar/DB',
			'maxillary-first-molar/P',
			'maxillary-second-molar/MB',
			'maxillary-third-molar/MB',
			'mandibular-first-molar/M'
		]);
		expect(named('maxillary-canine', 'single')).toEqual(['mandibular-canine/single']);
		expect(named('mandibular-first-premolar', 'L')).toEqual([
			'mandibular-first-premolar/single',
			'mandibular-first-premolar/B',
			'mandibular-second-premolar/L',
			'maxillary-first-premolar/P'
		]);
	});

	it('finds something for every root, and never the root itself', () => {
		for (const tooth of teeth)
			for (const root of tooth.roots) {
				const pairs = named(tooth.id, root);
				expect(pairs.length).toBeGreaterThan(0);
				expect(new Set(pairs).size).toBe(pairs.length);
				expect(pairs).not.toContain(`${tooth.id}/${root}`);
			}
	});

	it('has nothing for a root that is not of the tooth', () => {
		expect(relatedRoots('maxillary-canine', 'MB')).toEqual([]);
	});
});
