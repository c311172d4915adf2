import { readFileSync } from 'node:fs';
import path from 'node:path';
import { describe, expect, it } from 'vitest';
import { countriesNamed, countryName } from './countries';

describe('names of countries', () => {
	// ISO 3166-1, pairs where the two codes do not begin alike: the ones a slip would get wrong.
	it.each([
		['CHE', 'Switzerland'],
		['DEU', 'Germany'],
		['DZA', 'Algeria'],
		['CHN', 'China'],
		['CHL', 'Chile'],
		['KOR', 'South Korea'],
		['ZAF', 'South Africa'],
		['HRV', 'Croatia'],
		['SVN', 'Slovenia'],
		['SVK', 'Slovakia'],
		['POL', 'Poland'],
		['PRT', 'Portugal'],
		['AUT', 'Austria'],
		['AUS', 'Australia'],
		['IRN', 'Iran'],
		['IRQ', 'Iraq'],
		['XKX', 'Kosovo'],
		['multi', 'several countries'],
		['QQQ', 'QQQ'],
		['', '']
	])('%s is %s', (code, name) => {
		expect(countryName(code)).toBe(name);
	});

	it('join several', () => {
		expect(countryName('CHE+DEU')).toBe('Switzerland and Germany');
		expect(countryName('CHE+DEU+FRA')).toBe('Switzerland, Germany, and France');
	});

	it('are known for every country of the shipped table', () => {
		const file = path.resolve(import.meta.dirname, '../../../data/literature/observations.csv');
		const codes = new Set(
			[
				...readFileSync(file, 'utf8').matchAll(/,([A-Z]{3}(?:\+[A-Z]{3})*),(?:cbct|micro-ct|clearing)/g)
			].flatMap(([, code]) => code.split('+'))
		);
		expect(codes.size).toBeGreaterThan(40);
		for (const code of codes) expect(countryName(code), code).not.toBe(code);
	});

	it('are found by the beginning of a word, with accents or without', () => {
		expect(countriesNamed('saudi')).toEqual(['SAU']);
		expect(countriesNamed('Turki')).toEqual(expect.arrayContaining(['TUR']));
		expect(countriesNamed('kore').sort()).toEqual(['KOR', 'PRK']);
		expect(countriesNamed('atlantis')).toEqual([]);
	});
});
