import { fileURLToPath } from 'node:url';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { temporaryFolder } from '../../../../tests/support/database';
import { searchHitSchema } from '$lib/schemas/search';
import { environment } from '../config';
import { closeDatabase } from '../db';
import { serverDatabase } from '../db/server';
import { readLiteratureFiles } from '../table/literatureFiles';
import { seedLiterature } from '../table/seed';
import { nearWords, search } from './search';

const literature = fileURLToPath(new URL('../../../../data/literature/', import.meta.url));

beforeAll(async () => {
	environment.DATA_DIR = temporaryFolder();
	await seedLiterature(await serverDatabase(), await readLiteratureFiles(literature));
	// The whole shipped table is read: seconds, and more on a busy machine.
}, 60_000);
afterAll(closeDatabase);

const hits = async (query: string, limit = 8) => (await search(query, 'iso', limit)).hits;
const addresses = async (query: string, limit?: number) =>
	(await hits(query, limit)).map(({ address }) => address);

const FIRST_MOLAR = '/teeth/maxillary-first-molar';

describe('search over the shipped table puts first', () => {
	it.each([
		['16', FIRST_MOLAR],
		['#3', FIRST_MOLAR],
		['UR6', FIRST_MOLAR],
		['molar upper first left', FIRST_MOLAR],
		['uper frist molar', FIRST_MOLAR],
		['mésiobuccal 16', `${FIRST_MOLAR}/MB`],
		['mb2', `${FIRST_MOLAR}/MB`],
		['MB 2', `${FIRST_MOLAR}/MB`],
		['middle mesial', '/teeth/mandibular-first-molar/M'],
		['radix', '/teeth/mandibular-first-molar/DL'],
		['c shaped', '/teeth/mandibular-second-molar#feature-c-shape'],
		['C-shape', '/teeth/mandibular-second-molar#feature-c-shape'],
		['cshape 36', '/teeth/mandibular-first-molar#feature-c-shape'],
		['extra root', '/teeth/mandibular-first-molar#feature-radix-entomolaris'],
		['isthmus', '/teeth/mandibular-first-molar/M#feature-isthmus'],
		['istmus', '/teeth/mandibular-first-molar/M#feature-isthmus'],
		['vertucci 84', '/sources/vertucci-1984'],
		['Vertucci 1984', '/sources/vertucci-1984'],
		['1984 vertuci', '/sources/vertucci-1984'],
		['(Vertucci, 1984)', '/sources/vertucci-1984'],
		['weine', '/sources/weine-1969'],
		['teixido', '/sources/abella-2015'],
		['brasil', '/table?country=BRA'],
		['Brazil', '/table?country=BRA'],
		['braz', '/table?country=BRA'],
		['türkiye', '/table?country=TUR'],
		['Turkey', '/table?country=TUR'],
		['germnay', '/table?country=DEU'],
		['saudi arabia', '/table?country=SAU'],
		['UK', '/table?country=GBR']
	])('%j: %s', async (query, address) => {
		expect((await addresses(query))[0]).toBe(address);
	});
});

describe('search', () => {
	it.each(['', '   ', '?', 'xyzzy', 'zzzz', '99', '☃'])('finds nothing for %j', async (query) => {
		expect(await search(query, 'iso', 8)).toEqual({ hits: [], exact: null });
	});

	it('goes straight only where the phrase can mean one thing', async () => {
		expect((await search('16', 'iso', 8)).exact).toBe(FIRST_MOLAR);
		expect((await search('37 c-shape', 'iso', 8)).exact).toBe(
			'/teeth/mandibular-second-molar#feature-c-shape'
		);
		for (const query of ['mb2', 'molar', 'brazil', 'vertucci 84', 'uper frist molar'])
			expect((await search(query, 'iso', 8)).exact, query).toBeNull();
	});

	it('writes tooth numbers in the system picked', async () => {
		const [hit] = (await search('#3', 'universal', 8)).hits;
		expect(hit.title).toBe('Upper right first molar (#3)');
	});

	it('finds a source by a word of its title and by a later author, not by a year alone with two digits', async () => {
		expect(await addresses('Spanish population premolars', 20)).toContain('/sources/abella-2015');
		expect(await addresses('1984', 50)).toContain('/sources/vertucci-1984');
		expect((await hits('16')).every(({ kind }) => kind === 'tooth')).toBe(true);
	});

	it('still finds an author whose year was mistaken', async () => {
		expect(await addresses('vertucci 1913')).toContain('/sources/vertucci-1984');
	});

	it('keeps hits of one kind together, different from each other, and within the limit', async () => {
		for (const query of ['molar', 'premolar china', 'mesial', 'a', 'chi', 'root canal', 'isthmus'])
			for (const limit of [1, 3, 8, 20]) {
				const found = await hits(query, limit);
				expect(found.length).toBeLessThanOrEqual(limit);
				const kinds = found.map(({ kind }) => kind);
				const changes = kinds.filter((kind, at) => at > 0 && kind !== kinds[at - 1]).length;
				expect(changes, `${query}: ${kinds.join()}`).toBeLessThanOrEqual(
					Math.max(0, new Set(kinds).size - 1)
				);
				expect(new Set(found.map(({ address, title }) => `${address} ${title}`)).size).toBe(found.length);
				for (const hit of found) expect(searchHitSchema.safeParse(hit).success).toBe(true);
			}
	});

	it('shows teeth and papers for a word that is in both', async () => {
		expect(new Set((await hits('premolar')).map(({ kind }) => kind))).toEqual(new Set(['tooth', 'source']));
	});

	it('names near words where nothing was found', async () => {
		expect(await nearWords('vertuchhi')).toContain('vertucci');
		expect(await nearWords('')).toEqual([]);
	});
});
