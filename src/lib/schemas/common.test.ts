import { describe, expect, it } from 'vitest';
import { FILTER_LISTS, filtersOfQuery, filtersQuerySchema, filtersSchema } from './common';
import { METHODS, POOLED_METHODS } from './terms';

/** Dotted paths at which the schema refuses filters. */
const refusedAt = (schema: typeof filtersSchema | typeof filtersQuerySchema, value: unknown) =>
	(schema.safeParse(value).error?.issues ?? []).map(({ path }) => path.join('.'));

describe('filters of a body', () => {
	it('may all be absent', () => {
		expect(filtersSchema.parse({})).toEqual({});
	});

	it('are taken as they stand', () => {
		const filters = {
			...{ methods: ['cbct', 'micro-ct'], countries: ['BRA'], yearFrom: 1990, yearTo: 1990 },
			...{ minTotal: 100, exclude: ['weine-1969'] }
		};
		expect(filtersSchema.parse(filters)).toEqual(filters);
	});

	it.each([
		['a method that is none', { methods: ['cbct', 'telescope'] }, 'methods.1'],
		['reviews, which are never pooled', { methods: ['review'] }, 'methods.0'],
		['a country in small letters', { countries: ['bra'] }, 'countries.0'],
		['a country of two letters', { countries: ['CHN', 'BR'] }, 'countries.1'],
		['several countries in one', { countries: ['BRA+CHN'] }, 'countries.0'],
		['years out of order', { yearFrom: 2001, yearTo: 2000 }, 'yearTo'],
		['a year before all', { yearFrom: 1899 }, 'yearFrom'],
		['a year after all', { yearTo: 2101 }, 'yearTo'],
		['half a year', { yearTo: 2000.5 }, 'yearTo'],
		['a year in words', { yearFrom: 'lately' }, 'yearFrom'],
		['a year as text', { yearFrom: '1990' }, 'yearFrom'],
		['a total as text', { minTotal: '100' }, 'minTotal'],
		['a total of nothing', { minTotal: 0 }, 'minTotal'],
		['an empty source', { exclude: [''] }, 'exclude.0'],
		['a list that is none', { methods: 'cbct' }, 'methods'],
		['a name that is none', { country: ['BRA'] }, '']
	])('refuse %s', (_, filters, path) => {
		expect(refusedAt(filtersSchema, filters)).toEqual([path]);
	});

	it.each(POOLED_METHODS)('take the method %s', (method) => {
		expect(filtersSchema.parse({ methods: [method] })).toEqual({ methods: [method] });
	});
});

describe('filters of an address', () => {
	it('are read from text and become those of a body', () => {
		const filters = filtersOfQuery(
			filtersQuerySchema.parse({
				...{ method: ['cbct'], country: ['BRA', 'CHN'], exclude: ['a'] },
				...{ yearFrom: '1990', yearTo: '2020', minTotal: '100' }
			})
		);
		expect(filters).toEqual({
			...{ methods: ['cbct'], countries: ['BRA', 'CHN'], exclude: ['a'] },
			...{ yearFrom: 1990, yearTo: 2020, minTotal: 100 }
		});
		expect(filtersSchema.parse(filters)).toEqual(filters);
		expect(filtersOfQuery({})).toEqual({});
	});

	it.each([
		['a method that is none', { method: ['telescope'] }, 'method.0'],
		['years out of order', { yearFrom: '2001', yearTo: '2000' }, 'yearTo'],
		['a year in words', { yearFrom: 'lately' }, 'yearFrom'],
		['an empty year', { yearFrom: '' }, 'yearFrom'],
		['a year given twice', { yearFrom: ['1990', '1991'] }, 'yearFrom'],
		['the name of the body', { methods: ['cbct'] }, '']
	])('refuse %s', (_, filters, path) => {
		expect(refusedAt(filtersQuerySchema, filters)).toEqual([path]);
	});

	it('that are lists are all named as such', () => {
		const lists = Object.entries(filtersQuerySchema.shape)
			.filter(([, schema]) => schema.unwrap().type === 'array')
			.map(([name]) => name);
		expect(lists.sort()).toEqual([...FILTER_LISTS].sort());
	});
});

describe('methods', () => {
	it('that are pooled are all but reviews', () => {
		expect([...POOLED_METHODS, 'review'].sort()).toEqual([...METHODS].sort());
	});
});
