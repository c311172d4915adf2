import type { Sequelize } from 'sequelize';
import { beforeAll, describe, expect, it } from 'vitest';
import { entriesQuerySchema } from '$lib/schemas/table';
import { temporaryDatabase } from '../../../../tests/support/database';
import { cslSource, literature, observation } from '../../../../tests/support/madeUpLiterature';
import { checkEntryFilters } from './entryFilters';
import { seedLiterature } from './seed';

let db: Sequelize;
beforeAll(async () => {
	db = await temporaryDatabase();
	const observations = [observation({ tooth: 'maxillary-canine', root: 'fused', country: 'CHE+DEU' })];
	await seedLiterature(
		db,
		literature({ sources: [cslSource('adams-2001'), cslSource('baker-2010')], observations })
	);
});

const check = (query: Record<string, string>) => checkEntryFilters(db, entriesQuerySchema.parse(query));

describe('filters of the entries', () => {
	it.each([
		['nothing', {}],
		['a tooth of the table', { tooth: 'maxillary-canine' }],
		['a tooth that has no entry yet', { tooth: 'mandibular-canine' }],
		['a root of the table that the product does not answer for', { root: 'fused' }],
		['a root that has no entry yet', { root: 'DL' }],
		['several countries in one sample', { country: 'CHE+DEU' }],
		['one of them', { country: 'CHE' }],
		['a source without entries', { source: 'baker-2010' }],
		['words that nothing has', { q: 'zzzz' }]
	])('take %s', async (_, query) => {
		await expect(check(query as Record<string, string>)).resolves.toBeUndefined();
	});

	it.each([
		['tooth', '16'],
		['tooth', 'constructor'],
		['root', 'maxillary-canine'],
		['country', 'FRA'],
		['country', 'E+D'],
		['country', ''.padEnd(2, '+')],
		['source', 'nobody-1900'],
		['source', '\u0000'],
		['source', "' OR 1=1 --"]
	])('refuse the %s %j with 422 at its field', async (name, value) => {
		await expect(check({ [name]: value })).rejects.toMatchObject({
			status: 422,
			errors: [{ path: name }]
		});
	});

	it('name every mistake at once', async () => {
		await expect(check({ tooth: 'x', root: 'y', country: 'z' })).rejects.toMatchObject({
			errors: [{ path: 'tooth' }, { path: 'root' }, { path: 'country' }]
		});
	});
});
