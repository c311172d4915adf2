import { readFileSync } from 'node:fs';
import path from 'node:path';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { cite } from './citations';
import type { CslSource } from './literatureFiles';

const shipped = JSON.parse(
	readFileSync(path.resolve(import.meta.dirname, '../../../../data/literature/sources.json'), 'utf8')
) as CslSource[];

/**
 * The example of the NLM's "Samples of Formatted References for Authors of Journal Articles" (ICMJE recommendations), 1. Standard journal
 * article: Halpern SD, Ubel PA, Caplan AL. Solid-organ transplantation in HIV-infected patients. N Engl J Med. 2002 Jul 25;347(4):284-7.
 * Recalled, not looked up while writing this. The style of the Citation Style Language leaves month and day out and sets an en dash.
 */
const halpern: CslSource = {
	id: 'halpern-2002',
	type: 'article-journal',
	title: 'Solid-organ transplantation in HIV-infected patients',
	author: [
		{ family: 'Halpern', given: 'Scott D.' },
		{ family: 'Ubel', given: 'Peter A.' },
		{ family: 'Caplan', given: 'Arthur L.' }
	],
	'container-title': 'N Engl J Med',
	issued: { 'date-parts': [[2002]] },
	volume: '347',
	issue: '4',
	page: '284-287',
	DOI: '10.1056/NEJMsb020632',
	note: 'A note of the editors.'
};

afterEach(() => vi.unstubAllGlobals());

/** The tags of a RIS record, as the format's own description has it: two characters, two spaces, a hyphen, a space. */
const tagsOf = (ris: string): [string, string][] =>
	ris
		.split('\r\n')
		.filter((line) => line !== '')
		.map((line) => {
			expect(line).toMatch(/^[A-Z][A-Z0-9] {2}- /);
			return [line.slice(0, 2), line.slice(6)];
		});

describe('a citation', () => {
	it('reads as Vancouver has it', () => {
		expect(cite([halpern], 'vancouver')).toMatch(
			/^Halpern SD, Ubel PA, Caplan AL\. Solid-organ transplantation in HIV-infected patients\. N Engl J Med\. 2002;347\(4\):284–7\./
		);
	});

	it('is a BibTeX entry under the id of the source', () => {
		const text = cite([halpern], 'bibtex');
		expect(text).toMatch(/^@article\{halpern-2002,/);
		// Fields of an article, "BibTeXing" by O. Patashnik, 1988, section 3.1 and 3.2.
		const fields = Object.fromEntries(
			[...text.matchAll(/^\t(\w+) = \{(.*)\},$/gm)].map(([, name, value]) => [
				name,
				value.replace(/[{}]/g, '')
			])
		);
		expect(fields).toMatchObject({
			author: 'Halpern, Scott D. and Ubel, Peter A. and Caplan, Arthur L.',
			title: 'Solid-organ transplantation in HIV-infected patients',
			journal: 'N Engl J Med',
			year: '2002',
			volume: '347',
			number: '4',
			pages: '284--287',
			doi: '10.1056/NEJMsb020632'
		});
		expect(text).not.toContain('note');
	});

	it('is a RIS record with the tags of its specification', () => {
		// Research Information Systems, "RIS Format Specifications": TY first, ER last, one AU an author, SP and EP the pages.
		const tags = tagsOf(cite([halpern], 'ris'));
		expect(tags[0]).toEqual(['TY', 'JOUR']);
		expect(tags.at(-1)).toEqual(['ER', '']);
		expect(tags.filter(([tag]) => tag === 'AU').map(([, name]) => name)).toEqual([
			'Halpern, Scott D.',
			'Ubel, Peter A.',
			'Caplan, Arthur L.'
		]);
		expect(Object.fromEntries(tags)).toMatchObject({
			TI: halpern.title,
			T2: 'N Engl J Med',
			PY: '2002',
			VL: '347',
			IS: '4',
			SP: '284',
			EP: '287',
			DO: '10.1056/NEJMsb020632',
			ID: 'halpern-2002'
		});
	});

	it('as CSL-JSON is what the table keeps, in a list', () => {
		expect(JSON.parse(cite([halpern], 'csl'))).toEqual([halpern]);
	});

	it('can be made of every shipped source in every format, without asking any host', () => {
		vi.stubGlobal('fetch', () => {
			throw new Error('A citation must not ask the network.');
		});
		for (const source of shipped) {
			expect(cite([source], 'bibtex')).toMatch(/^@\w+\{[^,\s]+,\n[^]*\}\n/);
			const tags = tagsOf(cite([source], 'ris'));
			expect(tags[0][0]).toBe('TY');
			expect(Object.fromEntries(tags).ID).toBe(source.id);
			if (source.title) expect(Object.fromEntries(tags).TI).toBe(source.title.replace(/\s+/g, ' '));
		}
		const labels = [...cite(shipped, 'bibtex').matchAll(/^@\w+\{([^,]+),$/gm)].map(([, label]) => label);
		expect(new Set(labels).size).toBe(shipped.length);
	});

	it('of a source that has next to nothing is still one', () => {
		const bare = { id: 'bare' };
		expect(cite([bare], 'bibtex')).toMatch(/^@misc\{bare,/);
		expect(tagsOf(cite([bare], 'ris')).map(([tag]) => tag)).toEqual(
			expect.arrayContaining(['TY', 'ID', 'ER'])
		);
		expect(typeof cite([bare], 'vancouver')).toBe('string');
	});
});
