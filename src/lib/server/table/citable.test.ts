import { describe, expect, it } from 'vitest';
import { citable, yearOf } from './citable';

describe('citable', () => {
	it.each([
		['a DOI', { DOI: '10.1/x' }],
		['a PMID', { PMID: '1' }],
		['a PMCID', { PMCID: 'PMC1' }],
		['a title with a journal', { title: 'T', 'container-title': 'J' }],
		['a title with an author', { title: 'T', author: [{ family: 'A' }] }],
		['a title with an author in one piece', { title: 'T', author: [{ literal: 'WHO' }] }]
	])('takes %s', (_, source) => {
		expect(citable(source)).toBe(true);
	});

	it.each([
		['nothing', {}],
		['a title alone', { title: 'T' }],
		['a journal and an author without a title', { 'container-title': 'J', author: [{ family: 'A' }] }],
		['an author without a name', { title: 'T', author: [{}] }],
		['blank fields', { DOI: ' ', title: 'T', 'container-title': '' }]
	])('refuses %s', (_, source) => {
		expect(citable(source)).toBe(false);
	});
});

describe('yearOf', () => {
	it('reads the first part of the first date, as number or text', () => {
		expect(yearOf({ issued: { 'date-parts': [[1984, 5]] } })).toBe(1984);
		expect(yearOf({ issued: { 'date-parts': [['2017']] } })).toBe(2017);
	});

	it('is null without one', () => {
		expect(yearOf({})).toBeNull();
		expect(yearOf({ issued: { 'date-parts': [[]] } })).toBeNull();
		expect(yearOf({ issued: { 'date-parts': [['in press']] } })).toBeNull();
	});
});
