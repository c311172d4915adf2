import { describe, expect, it } from 'vitest';
import { groupRows, sortRows, toForestStudies } from './forestStudies';

const study = (entry: number, source: string, more: object = {}) => ({
	entry,
	source,
	locator: 'table 1',
	country: 'BRA',
	method: 'cbct',
	events: 10,
	total: 100,
	weight: 0.25,
	...more
});
const summary = (id: string, authors: string, year: number | null) => ({
	id,
	authors,
	year,
	title: id,
	journal: null,
	doi: null,
	citable: true,
	retracted: false,
	entries: 1
});
const sources = {
	a: summary('a', 'Zell', 2001),
	b: summary('b', 'Abel', null),
	c: summary('c', 'Ørum', 2020),
	d: summary('d', 'Miller', 2010)
};
const rows = toForestStudies(
	[
		study(1, 'a', { country: '', total: 50, weight: 0.1 }),
		study(2, 'b', { method: 'micro-ct', country: 'USA', weight: 0.4 }),
		study(3, 'c', { country: 'CHN', total: 400 }),
		study(4, 'd', { method: 'micro-ct', country: 'CHN' })
	],
	sources,
	{ 1: 'read', 2: 'secondary', 3: 'unverified' }
);
const ids = (sorted: { id: number }[]) => sorted.map(({ id }) => id);

describe('sortRows', () => {
	it.each([
		['share', [1, 2, 4, 3]],
		['year', [3, 4, 1, 2]],
		['size', [3, 2, 4, 1]],
		['weight', [2, 4, 3, 1]],
		['source', [2, 4, 3, 1]],
		['country', [4, 3, 2, 1]]
	] as const)('by %s, ties by source, unknown last', (sort, order) => {
		const sorted = ids(sortRows(rows, sort));
		expect(sorted).toEqual(order);
		expect(ids(sortRows([...rows].reverse(), sort))).toEqual(sorted);
	});
});

describe('groupRows', () => {
	it('puts methods together in the order they are named everywhere, rows in their own', () => {
		const groups = groupRows(sortRows(rows, 'size'), true);
		expect(groups.map(({ name, rows: of }) => [name, ids(of)])).toEqual([
			['micro-CT', [2, 4]],
			['CBCT', [3, 1]]
		]);
	});

	it('is one group without a name otherwise', () => {
		expect(groupRows(rows, false).map(({ name, rows: of }) => [name, of.length])).toEqual([[null, 4]]);
	});
});

describe('toForestStudies', () => {
	it('marks what was not seen in its source, and nothing else', () => {
		expect(rows.map(({ mark }) => mark)).toEqual([undefined, 'secondary', 'unverified', undefined]);
	});
});
