import { sourceSchema, sourcesQuerySchema, sourcesSchema } from '$lib/schemas/table';
import type { Sequelize } from 'sequelize';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { temporaryFolder } from '../../../../tests/support/database';
import { cslSource, literature, observation } from '../../../../tests/support/madeUpLiterature';
import { environment } from '../config';
import { closeDatabase } from '../db';
import { Entry, Source } from '../db/models/literature';
import { serverDatabase } from '../db/server';
import { encodeCursor } from './paging';
import { findSource, listSources, sourcesById } from './sources';
import { seedLiterature } from './seed';

let db: Sequelize;
beforeAll(async () => {
	// The room asks for the server's own connection at times.
	environment.DATA_DIR = temporaryFolder();
	db = await serverDatabase();
	const author = (family: string) => ({ family });
	await seedLiterature(
		db,
		literature({
			sources: [
				...Array.from({ length: 20 }, (_, index) => cslSource(`many-${String(index).padStart(2, '0')}`)),
				cslSource('adams-2001', { author: [author('Adams')] }),
				cslSource('two', { author: [author('Adams'), { literal: 'Society of Roots' }], DOI: '10.1000/a_b' }),
				cslSource('three', { author: [author('Ørsted'), author('Adams'), author('Curie')] }),
				{ id: 'bare' },
				cslSource('id/with slash')
			],
			observations: [observation(), observation({ locator: 'table 2' }), observation({ locator: 'table 3' })]
		})
	);
	await Entry.update({ state: 'withdrawn' }, { where: { locator: 'table 3' } });
	await Source.update({ retracted: true }, { where: { id: 'two' } });
});
afterAll(closeDatabase);

const list = (query: Record<string, unknown>) => listSources(db, sourcesQuerySchema.parse(query));
const found = async (q: string) => (await list({ q })).sources.map(({ id }) => id);

describe('sources in pages', () => {
	it('are each listed once, by id', async () => {
		const ids: string[] = [];
		let cursor: string | null = null;
		do {
			const page = await list({ limit: 7, ...(cursor !== null && { cursor }) });
			expect(sourcesSchema.parse(page)).toEqual(page);
			expect(page.total).toBe(25);
			ids.push(...page.sources.map(({ id }) => id));
			cursor = page.nextCursor;
		} while (cursor !== null && ids.length < 100);
		expect(ids).toHaveLength(25);
		expect(ids).toEqual([...new Set(ids)].sort());
	});

	it('refuse the cursor of another list', async () => {
		await expect(list({ cursor: encodeCursor('year', 2001, 3) })).rejects.toMatchObject({ status: 422 });
	});

	it('are found by author, society, DOI, title, journal and year', async () => {
		expect(await found('Ørsted')).toEqual(['three']);
		expect(await found('society of roots')).toEqual(['two']);
		expect(await found('10.1000/a_b')).toEqual(['two']);
		expect(await found('curie 2001')).toEqual(['three']);
		expect(await found('"as three saw"')).toEqual(['three']);
		expect((await list({ q: 'journal of roots', limit: 50 })).total).toBe(24);
		expect(await found('%')).toEqual([]);
	});

	it('are not found by the names of CSL keys', async () => {
		for (const key of ['container', 'family', 'given', 'issued', 'date-parts', 'article-journal'])
			expect(await found(key), key).toEqual([]);
	});

	it('stay found after they were completed', async () => {
		await Source.update({ title: 'Completed since', year: 1999 }, { where: { id: 'bare' } });
		expect(await found('completed 1999')).toEqual(['bare']);
		await Source.update({ title: null, year: null }, { where: { id: 'bare' } });
		expect(await found('completed')).toEqual([]);
	});

	it('are sorted by author as screens name them, by year, title and number of entries', async () => {
		const ids = async (sort: string) => (await list({ sort, limit: 50 })).sources.map(({ id }) => id);
		const byAuthor = await ids('author');
		// "Adams …", then the one that has no name but its id, then Ø with O.
		expect(byAuthor.slice(-2)).toEqual(['bare', 'three']);
		expect(await ids('-author')).toEqual([...byAuthor].reverse());
		expect((await ids('year'))[0]).toBe('bare');
		expect((await ids('-entries'))[0]).toBe('adams-2001');
		expect((await ids('title'))[0]).toBe('bare');
	});
});

describe('one source', () => {
	it('has its CSL-JSON and counts its published entries', async () => {
		const source = await findSource(db, 'adams-2001');
		expect(sourceSchema.parse(source)).toEqual(source);
		expect(source).toMatchObject({
			entries: 2,
			authors: 'Adams',
			year: 2001,
			citable: true,
			retracted: false
		});
		expect(source!.csl).toEqual(cslSource('adams-2001', { author: [{ family: 'Adams' }] }));
	});

	it('names its authors in short', async () => {
		expect(await findSource(db, 'two')).toMatchObject({
			authors: 'Adams and Society of Roots',
			retracted: true,
			doi: '10.1000/a_b'
		});
		expect(await findSource(db, 'three')).toMatchObject({ authors: 'Ørsted and others' });
	});

	it('may lack nearly everything', async () => {
		expect(await findSource(db, 'bare')).toEqual({
			...{ id: 'bare', title: null, authors: '', year: null, journal: null, doi: null },
			...{ citable: false, retracted: false, entries: 0, csl: { id: 'bare' } }
		});
	});

	it('may have any id; an unknown one is null', async () => {
		expect(await findSource(db, 'id/with slash')).toMatchObject({ id: 'id/with slash' });
		expect(await findSource(db, "' OR 1=1 --")).toBeNull();
	});
});

describe('sources by their ids', () => {
	it('leave out unknown ones, and need none', async () => {
		const sources = await sourcesById(['two', 'nobody', 'bare']);
		expect(Object.keys(sources).sort()).toEqual(['bare', 'two']);
		expect(sources.two.authors).toBe('Adams and Society of Roots');
		expect(await sourcesById([])).toEqual({});
	});
});
