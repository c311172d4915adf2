import fc from 'fast-check';
import { beforeAll, describe, expect, it } from 'vitest';
import type { Sequelize } from 'sequelize';
import { temporaryDatabase } from '../../../../tests/support/database';
import { cslSource, literature } from '../../../../tests/support/madeUpLiterature';
import { findDuplicates, likeness, plain, sameByTitle } from './duplicates';
import { seedLiterature } from './seed';

describe('likeness', () => {
	it('is 1 for the same text, 0 for nothing shared, the same either way round, and never beyond', () => {
		expect(likeness('night', 'night')).toBe(1);
		// Dice's own measure over pairs: ht alone of ni ig gh ht and na ac ch ht, 2·1/8.
		expect(likeness('night', 'nacht')).toBe(0.25);
		fc.assert(
			fc.property(fc.string(), fc.string(), (one, other) => {
				const value = likeness(one, other);
				expect(value).toBe(likeness(other, one));
				expect(value >= 0 && value <= 1).toBe(true);
			})
		);
	});
	it('looks at letters alone', () =>
		expect(plain('  Örsted’s — <i>Roots</i>: II ')).toBe('orsted s roots ii'));
});

describe('two sources', () => {
	const title = 'Root canal morphology of the mandibular first molar in an invented population';
	const of = (text: string, family = 'Adams') => cslSource('x', { title: text, author: [{ family }] });
	it.each([
		[true, 'with a letter wrong', of(title), of(title.replace('morphology', 'morphologi'))],
		[true, 'without an author', of(title), { id: 'y', title }],
		[false, 'of another tooth', of(title), of(title.replace('first', 'second'))],
		[false, 'by another author', of(title), of(title, 'Brown')],
		[false, 'without titles', { id: 'a' }, { id: 'b' }]
	])('are one (%s) %s', (same, _, one, other) => expect(sameByTitle(one, other)).toBe(same));
});

describe('the table', () => {
	let db: Sequelize;
	beforeAll(async () => {
		db = await temporaryDatabase();
		await seedLiterature(
			db,
			literature({ sources: [cslSource('a', { DOI: '10.5555/ABC', PMID: '77', title: 'Alone' })] })
		);
	});
	it.each([
		['doi', { id: '', DOI: 'https://doi.org/10.5555/abc' }],
		['pmid', { id: '', PMID: '77' }],
		['title', { id: '', title: 'Alone.' }]
	])('finds a duplicate by %s', async (by, csl) =>
		expect(await findDuplicates(db, csl)).toEqual([{ id: 'a', title: 'Alone', by }])
	);
	it('finds none for another source, nor for the source itself', async () => {
		expect(await findDuplicates(db, { id: '', title: 'Another' })).toEqual([]);
		expect(await findDuplicates(db, { id: 'a', PMID: '77' }, 'a')).toEqual([]);
	});
});
