import { describe, expect, it } from 'vitest';
import {
	TABLE,
	TABLE_COLUMNS,
	USUAL_COLUMNS,
	changed,
	columnsOf,
	downloadAddress,
	isLonger,
	readTableFields
} from './tableQuery';

const read = (query: string) => readTableFields(new URLSearchParams(query));
const usual = USUAL_COLUMNS.map((column) => `column=${column}`).join('&');

describe('the address of the table', () => {
	it('keeps what is asked for in a fixed order, and nothing blank, usual or unknown', () => {
		expect(read('limit=50&sort=-year&q=+mb2+&tooth=&utm=x&column=total&column=year')).toEqual([
			['q', 'mb2'],
			['sort', '-year'],
			['column', 'total'],
			['column', 'year']
		]);
		expect(read(`sort=author&limit=50&${usual}`)).toEqual([]);
	});

	it('is called longer only while there is something to leave out, so that a redirect ends', () => {
		for (const query of ['tooth=&q=a', `${usual}&q=a`, 'sort=author', 'q=%20', 'limit=50']) {
			expect(isLonger(new URLSearchParams(query)), query).toBe(true);
			expect(isLonger(new URLSearchParams(read(query))), query).toBe(false);
		}
		for (const query of ['', 'q=a&q=b', 'utm=x', 'sort=-year&column=total', 'tooth=16&cursor=x'])
			expect(isLonger(new URLSearchParams(query)), query).toBe(false);
	});

	it('names the chosen columns in their own order, and the usual ones where none is', () => {
		expect(columnsOf(read('column=year&column=measure&column=hue'))).toEqual(['measure', 'year']);
		expect(columnsOf(read('column=hue'))).toEqual(USUAL_COLUMNS);
		expect(columnsOf(read(TABLE_COLUMNS.map((one) => `column=${one}`).join('&')))).toEqual(TABLE_COLUMNS);
	});

	it('starts at the first page again whatever changes but the page', () => {
		const fields = read('q=a&sort=-year&cursor=abc');
		expect(changed(TABLE, fields, { sort: 'total' })).toBe('/table?q=a&sort=total');
		expect(changed(TABLE, fields, { q: null })).toBe('/table?sort=-year');
		expect(changed(TABLE, fields, { cursor: 'def' })).toBe('/table?q=a&sort=-year&cursor=def');
		expect(changed(TABLE, [], {})).toBe('/table');
	});

	it('gives a download the filters and nothing else', () => {
		expect(downloadAddress('/x.csv', read('q=a+b&country=BRA&sort=-year&limit=25&cursor=abc'))).toBe(
			'/x.csv?country=BRA&q=a+b'
		);
		expect(downloadAddress('/x.csv', read('sort=-year'))).toBe('/x.csv');
	});
});
