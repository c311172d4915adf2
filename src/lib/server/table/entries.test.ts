import {
	entriesQuerySchema,
	entriesSchema,
	type EntryDto,
	entryWithRevisionsSchema
} from '$lib/schemas/table';
import { ENTRY_SORTS } from '$lib/schemas/terms';
import type { Sequelize } from 'sequelize';
import { beforeAll, describe, expect, it } from 'vitest';
import { temporaryDatabase } from '../../../../tests/support/database';
import { cslSource, literature, observation } from '../../../../tests/support/madeUpLiterature';
import { Entry, Sample } from '../db/models/literature';
import { encodeCursor } from './paging';
import { entriesOfSource, findEntry, listEntries } from './entries';
import { seedLiterature } from './seed';

const TEETH = ['maxillary-first-molar', 'mandibular-first-molar', 'maxillary-canine'];
const SORTS = ENTRY_SORTS;

/** 30 entries with many ties in every sort key, some years and totals unknown. */
const MANY = Array.from({ length: 30 }, (_, index) =>
	observation({
		source_id: ['adams-2001', 'baker-2010', 'undated'][index % 3],
		locator: `table ${index + 1}`,
		tooth: TEETH[index % 2],
		total: ['100', '', '250'][index % 3],
		count: '7'
	})
);
const ODD = [
	observation({
		locator: 'page 9',
		tooth: 'maxillary-canine',
		note: 'a curved root; 50 % of them',
		total: '900'
	}),
	observation({
		locator: 'page 10',
		tooth: 'maxillary-canine',
		note: 'snake_case and back\\slash',
		total: '901'
	}),
	observation({
		locator: 'page 11',
		tooth: 'maxillary-canine',
		category: '2-1',
		total: '902',
		country: 'CHN'
	}),
	observation({ locator: 'page 12', tooth: 'maxillary-canine', provenance: 'memory', scope: 'three-rooted' })
];

let db: Sequelize;
beforeAll(async () => {
	db = await temporaryDatabase();
	await seedLiterature(
		db,
		literature({
			sources: [
				cslSource('adams-2001'),
				cslSource('baker-2010', { title: 'Årets kanaler', issued: { 'date-parts': [[2010]] } }),
				cslSource('undated', { issued: undefined })
			],
			observations: [...MANY, ...ODD]
		})
	);
	await Entry.update({ state: 'withdrawn' }, { where: { locator: 'page 12' } });
});

const list = (query: Record<string, unknown>) => listEntries(db, entriesQuerySchema.parse(query));
const locators = async (query: Record<string, unknown>) =>
	(await list(query)).entries.map(({ locator }) => locator);

async function walk(query: Record<string, unknown>) {
	const pages = [];
	let cursor: string | null = null;
	do {
		const page = await list({ ...query, ...(cursor !== null && { cursor }) });
		pages.push(page);
		cursor = page.nextCursor;
	} while (cursor !== null && pages.length < 100);
	return pages;
}

describe('pages of entries', () => {
	it.each(SORTS.flatMap((sort) => [sort, `-${sort}`]))(
		'walk every published entry once in the order %s',
		async (sort) => {
			const pages = await walk({ sort, limit: 7 });
			expect(pages.map(({ entries }) => entries.length)).toEqual([7, 7, 7, 7, 5]);
			expect(pages.map(({ total }) => total)).toEqual([33, 33, 33, 33, 33]);
			const entries = pages.flatMap((page) => page.entries);
			expect(new Set(entries.map(({ id }) => id)).size).toBe(33);
			// In order: by the key, then by id, an unknown year or total counting as 0.
			const name = sort.replace('-', '');
			// The three sources share their author.
			const keyOf = (entry: EntryDto) => (name === 'author' ? 'adams' : (entry[name as 'id'] ?? 0));
			const sign = sort.startsWith('-') ? -1 : 1;
			const sorted = [...entries].sort((a, b) => {
				const [x, y] = [keyOf(a), keyOf(b)];
				return sign * (x < y ? -1 : x > y ? 1 : a.id - b.id);
			});
			expect(entries.map(({ id }) => id)).toEqual(sorted.map(({ id }) => id));
		}
	);

	it.each(SORTS.flatMap((sort) => [sort, `-${sort}`]))(
		'lead back the way they came, each saying where it stands, in the order %s',
		async (sort) => {
			const there = await walk({ sort, limit: 7 });
			expect(there.map(({ position }) => position)).toEqual([1, 8, 15, 22, 29]);
			const back = [there.at(-1)!];
			while (back[0].previousCursor !== null && back.length < 100)
				back.unshift(await list({ sort, limit: 7, cursor: back[0].previousCursor }));
			expect(back.map(({ entries }) => entries)).toEqual(there.map(({ entries }) => entries));
			expect(back.map(({ position }) => position)).toEqual([1, 8, 15, 22, 29]);
			expect(await list({ sort, limit: 7, cursor: there[1].previousCursor! })).toEqual(there[0]);
		}
	);

	it('end without a cursor when the last page is exactly full', async () => {
		const pages = await walk({ limit: 11 });
		expect(pages.map(({ entries }) => entries.length)).toEqual([11, 11, 11]);
	});

	it('are not shifted by an entry that goes between two pages', async () => {
		const first = await list({ sort: '-total', limit: 2 });
		await Entry.update({ state: 'draft' }, { where: { id: first.entries[0].id } });
		const second = await list({ sort: '-total', limit: 2, cursor: first.nextCursor! });
		await Entry.update({ state: 'published' }, { where: { id: first.entries[0].id } });
		expect(first.entries.map(({ total }) => total)).toEqual([902, 901]);
		expect(second.entries.map(({ total }) => total)).toEqual([900, 250]);
	});

	it('are as the schema of the answer says', async () => {
		const page = await list({ limit: 200 });
		expect(entriesSchema.parse(page)).toEqual(page);
	});

	it('refuse the cursor of another order with 422, and survive a forged one', async () => {
		const { nextCursor } = await list({ sort: 'year', limit: 7 });
		await expect(list({ sort: '-year', cursor: nextCursor! })).rejects.toMatchObject({ status: 422 });
		expect(await locators({ cursor: encodeCursor('id', 40, 'no number') })).toEqual([]);
		expect(await locators({ cursor: encodeCursor('id', "1' OR 1=1 --", 3) })).toEqual([]);
	});
});

describe('filters of entries', () => {
	it.each([
		[{ tooth: 'maxillary-canine' }, 3],
		[{ tooth: 'mandibular-first-molar' }, 15],
		[{ root: 'MB' }, 33],
		[{ root: 'DB' }, 0],
		[{ country: 'CHN' }, 1],
		[{ method: 'cbct' }, 33],
		[{ method: 'clearing' }, 0],
		[{ measure: 'configuration' }, 33],
		[{ measure: 'feature' }, 0],
		[{ source: 'undated' }, 10],
		[{ source: 'undated', tooth: 'maxillary-canine' }, 0]
	])('%o leave %i', async (query, count) => {
		const page = await list({ ...query, limit: 200 });
		expect(page.total).toBe(count);
		expect(page.entries).toHaveLength(count);
	});

	it.each([
		['words of a note', 'curved ROOT', ['page 9']],
		['words in any order, begun only', 'roo cur', ['page 9']],
		['words that are not all there', 'curved slate', []],
		['what stands inside a word', 'urve', []],
		['a category', '2-1', ['page 11']],
		['a locator in quotes', '"page 1"', ['page 10', 'page 11']],
		['an underscore as a gap between words', 'snake_case', ['page 10']],
		['an underscore that stands for nothing else', 'p_ge', []],
		['a percent sign that stands for nothing else', 'curved%them', []],
		['a backslash as a gap', 'back\\', ['page 10']],
		['a country by its name', '"page" china', ['page 11']],
		['an upper tooth', 'upper canine curved', ['page 9']],
		['signs alone', "' % \\", []],
		['a lone quote', '"', []],
		['what looks like an operator', 'curved AND NOT zzzz', []],
		['another', 'NEAR(curved', []],
		['a column that is none', 'words:curved', []],
		['a zero', 'curved\0', ['page 9']],
		['what looks like a replacement', ':tooth $q', []]
	])('find %s: %s', async (_, q, found) => {
		expect(await locators({ q })).toEqual(found);
	});

	it('find words of a title, with its accents or without, an author, and an id', async () => {
		expect((await list({ q: 'Årets kanaler' })).total).toBe(10);
		expect((await list({ q: 'arets' })).total).toBe(10);
		expect((await list({ q: 'baker-' })).total).toBe(10);
		expect((await list({ q: 'ADAMS' })).total).toBe(33);
	});

	it('find samples of several countries by each', async () => {
		await Sample.update({ country: 'CHN+TUR' }, { where: { country: 'CHN' } });
		expect(await locators({ country: 'TUR' })).toEqual(['page 11']);
		expect(await locators({ country: 'CHN+TUR' })).toEqual(['page 11']);
		expect(await locators({ country: 'N+T' })).toEqual([]);
		await Sample.update({ country: 'CHN' }, { where: { country: 'CHN+TUR' } });
	});

	it('find nothing that is not published', async () => {
		expect(await locators({ q: 'page 12' })).toEqual([]);
	});
});

describe('one entry', () => {
	it('has its figures and revisions', async () => {
		const [{ id }] = (await list({ q: 'page 9' })).entries;
		const entry = await findEntry(db, id);
		expect(entryWithRevisionsSchema.parse(entry)).toEqual(entry);
		expect(entry).toMatchObject({
			figures: [{ category: '1', count: 40, percent: null, countDerived: false }],
			revisions: [{ number: 1, who: 'seed', before: null, after: { state: 'published', locator: 'page 9' } }],
			verified: true
		});
	});

	it('is found after it was withdrawn, but not while it is a draft or if there is none', async () => {
		const hidden = await Entry.findOne({ where: { locator: 'page 12' }, rejectOnEmpty: true });
		expect(await findEntry(db, hidden.id)).toMatchObject({ state: 'withdrawn', verified: false });
		await hidden.update({ confirmed: true });
		expect(await findEntry(db, hidden.id)).toMatchObject({ verified: true });
		await hidden.update({ state: 'draft' });
		expect(await findEntry(db, hidden.id)).toBeNull();
		expect(await findEntry(db, 999_999)).toBeNull();
	});
});

describe('entries of a source', () => {
	it('are its published ones, tooth by tooth', async () => {
		const entries = await entriesOfSource(db, 'undated');
		expect(entries.map(({ source }) => source)).toEqual(Array<string>(10).fill('undated'));
		const order = entries.map(({ tooth }) => tooth);
		expect(order).toEqual([...order].sort());
		expect(await entriesOfSource(db, 'nobody')).toEqual([]);
	});
});
