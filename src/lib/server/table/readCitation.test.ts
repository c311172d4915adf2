import { readFileSync } from 'node:fs';
import path from 'node:path';
import fc from 'fast-check';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { cite, readCitation } from './citations';
import type { CslSource } from './literatureFiles';

afterEach(() => vi.unstubAllGlobals());

const shipped = JSON.parse(
	readFileSync(path.resolve(import.meta.dirname, '../../../../data/literature/sources.json'), 'utf8')
) as CslSource[];

describe('a pasted citation', () => {
	it('in BibTeX is read with its braces and accents', () => {
		const text = `@article{foo2020, title={The {CBCT} of r{\\"o}ots}, author={M{\\"u}ller, Anna and {Society of Roots}},
			journal={J Roots}, year=2020, volume=4, pages={1--9}, doi={10.5555/abc}, pmid={123}}`;
		expect(readCitation(text, 'bibtex')).toMatchObject({
			csl: {
				...{ type: 'article-journal', title: 'The CBCT of röots', 'container-title': 'J Roots', PMID: '123' },
				author: [{ family: 'Müller', given: 'Anna' }, { family: 'Society of Roots' }],
				issued: { 'date-parts': [[2020]] }
			}
		});
	});

	it('of the shipped table comes back as it was written, without asking any host', () => {
		vi.stubGlobal('fetch', () => {
			throw new Error('A citation must not ask the network.');
		});
		const some = shipped
			.filter(({ type, title, author }) => type === 'article-journal' && title && author)
			.slice(0, 40);
		for (const source of some)
			for (const format of ['ris', 'csl'] as const) {
				const text = format === 'csl' ? JSON.stringify(source) : cite([source], format);
				const answer = readCitation(text, format);
				expect(answer).toMatchObject({
					csl: { title: source.title!.replace(/\s+/g, ' '), type: 'article-journal' }
				});
			}
	});

	it.each([
		['', 'csl', 'empty'],
		['{"title":', 'csl', 'unreadable'],
		['[]', 'csl', 'nothing'],
		['{"type":"book"}', 'csl', 'nothing'],
		['[{"title":"a"},{"title":"b"}]', 'csl', 'several'],
		['just words', 'ris', 'unreadable'],
		['x'.repeat(200_001), 'bibtex', 'too long']
	] as const)('%j as %s is %s', (text, format, failure) =>
		expect(readCitation(text, format)).toEqual({ failure })
	);

	it('of any text is an answer and never a throw', () => {
		fc.assert(
			fc.property(fc.string(), fc.constantFrom('bibtex', 'ris', 'csl'), (text, format) => {
				const answer = readCitation(text, format);
				expect('csl' in answer || 'failure' in answer).toBe(true);
			})
		);
	});
});
