import { readFileSync } from 'node:fs';
import { parse } from 'csv-parse/sync';
import { describe, expect, it } from 'vitest';
import { rootOf, teeth, teethById, toothGroupOf, toothOf } from './teeth';

function rowsOf(name: string): Record<string, string>[] {
	const file = new URL(`../../../data/literature/${name}`, import.meta.url);
	return parse(readFileSync(file), { columns: true });
}

describe('teeth', () => {
	it('are sixteen, upper before lower, each from the midline backwards', () => {
		expect(teeth).toHaveLength(16);
		expect(teethById.size).toBe(16);
		expect(teeth.map((tooth) => tooth.iso[0])).toEqual(
			'11 12 13 14 15 16 17 18 41 42 43 44 45 46 47 48'.split(' ')
		);
		expect(teeth.map((tooth) => tooth.iso[1])).toEqual(
			'21 22 23 24 25 26 27 28 31 32 33 34 35 36 37 38'.split(' ')
		);
	});

	it('are the teeth of the shipped table', () => {
		const inTable = new Set(rowsOf('observations.csv').map((row) => row.tooth));
		inTable.delete('');
		expect([...inTable].sort()).toEqual(teeth.map((tooth) => tooth.id).sort());
	});

	it('have plain names, and prose that says it is common practice', () => {
		expect(toothOf('maxillary-first-molar')).toMatchObject({
			name: 'Upper first molar',
			arch: 'maxillary',
			kind: 'molar',
			place: 6,
			iso: ['16', '26'],
			roots: ['MB', 'DB', 'P']
		});
		expect(toothOf('mandibular-canine')).toMatchObject({
			name: 'Lower canine',
			kind: 'canine',
			roots: ['single']
		});
		expect(teeth.filter((tooth) => !tooth.usualForms.endsWith(' (common practice).'))).toEqual([]);
	});

	it('give one or two roots, rarely three, to the upper first premolar', () => {
		expect(toothOf('maxillary-first-premolar')?.rootForms).toEqual([
			{ roots: ['B', 'P'], frequency: 'usual' },
			{ roots: ['single'], frequency: 'common' },
			{ roots: ['MB', 'DB', 'P'], frequency: 'rare' }
		]);
	});

	it('do not know another id', () => {
		expect(toothOf('maxillary-fourth-molar')).toBeUndefined();
		expect(toothOf('constructor')).toBeUndefined();
	});
});

describe('rootOf', () => {
	it('answers for every root of the shipped table but those that no estimate is made for', () => {
		const unanswered = new Set(
			rowsOf('observations.csv')
				.filter((row) => row.tooth !== '' && !rootOf(row.tooth, row.root))
				.map((row) => `${toothOf(row.tooth)?.kind} ${row.root}`)
		);
		// `whole` of incisors and canines is their single root by another name; `whole` of molars holds counts of roots
		// and features; fused and single roots of molars have too few figures.
		expect([...unanswered].sort()).toEqual([
			'canine whole',
			'incisor whole',
			'molar fused',
			'molar single',
			'molar whole'
		]);
	});

	it('finds each root that a tooth lists, and no other', () => {
		for (const tooth of teeth) {
			expect(tooth.roots.map((id) => rootOf(tooth.id, id)?.id)).toEqual(tooth.roots);
		}
		expect(rootOf('maxillary-first-molar', 'M')).toBeUndefined();
		expect(rootOf('mandibular-first-premolar', 'P')).toBeUndefined();
		expect(rootOf('nothing', 'single')).toBeUndefined();
	});

	it('names roots and their canals as the trade does', () => {
		expect(rootOf('mandibular-first-molar', 'DL')?.name).toBe('Distolingual root (radix entomolaris)');
		expect(rootOf('maxillary-first-premolar', 'whole')?.name).toBe('Whole tooth, roots unknown');
		const mesial = rootOf('mandibular-first-molar', 'M');
		expect(mesial?.canals[2].map((canal) => canal.id)).toEqual(['MB', 'ML']);
		expect(mesial?.canals[3][1]).toEqual({ id: 'MM', name: 'middle mesial canal' });
		expect(rootOf('maxillary-second-molar', 'MB')?.canals[2].map((canal) => canal.id)).toEqual([
			'MB1',
			'MB2'
		]);
		expect(rootOf('mandibular-canine', 'single')?.canals[2].map((canal) => canal.id)).toEqual(['B', 'L']);
		expect(rootOf('maxillary-second-premolar', 'single')?.canals[2].map((canal) => canal.id)).toEqual([
			'B',
			'P'
		]);
	});

	it('gives every root as many differently named canals as were found', () => {
		for (const tooth of teeth) {
			for (const id of tooth.roots) {
				for (const count of [1, 2, 3] as const) {
					const canals = rootOf(tooth.id, id)?.canals[count] ?? [];
					expect(new Set(canals.map((canal) => canal.id)).size).toBe(count);
					expect(canals.every((canal) => canal.name?.endsWith('canal'))).toBe(true);
				}
			}
		}
	});
});

describe('toothGroupOf', () => {
	it.each([
		['maxillary-first-molar', 'MB', ['maxillary-molar-MB', 'any']],
		['maxillary-first-molar', 'P', ['any']],
		['maxillary-canine', 'single', ['any']],
		['maxillary-first-premolar', 'B', ['premolar', 'any']],
		['mandibular-second-premolar', 'whole', ['premolar', 'any']],
		['mandibular-third-molar', 'DL', ['mandibular-molar', 'any']],
		['mandibular-lateral-incisor', 'single', ['mandibular-canine-incisor', 'any']],
		['mandibular-canine', 'single', ['mandibular-canine-incisor', 'any']],
		['nothing', 'MB', ['any']]
	])('of %s %s is %j', (tooth, root, groups) => {
		expect(toothGroupOf(tooth, root)).toEqual(groups);
	});

	it('names the groups of the shipped characteristics and no other', () => {
		const inTable = new Set(rowsOf('finding-characteristics.csv').map((row) => row.tooth_group));
		const named = new Set(
			teeth.flatMap((tooth) => tooth.roots.flatMap((root) => toothGroupOf(tooth.id, root)))
		);
		expect([...named].sort()).toEqual([...inTable].sort());
	});
});
