import type { SearchHit } from '$lib/schemas/search';
import { render } from 'svelte/server';
import { describe, expect, it } from 'vitest';
import LookUpResults from './LookUpResults.svelte';

const hits: SearchHit[] = [
	{ kind: 'root', title: 'Upper first molar, mesiobuccal root', detail: 'MB2', address: '/teeth/a/MB' },
	{ kind: 'source', title: 'Vertucci, 1984', detail: 'A title', address: '/sources/vertucci-1984' },
	{ kind: 'source', title: '<b>odd</b>', detail: '', address: '/sources/odd' }
];
const html = (props: { query: string; hits: SearchHit[]; near: string[] }) =>
	render(LookUpResults, { props }).body.replace(/<!--.*?-->/g, '');

describe('LookUpResults', () => {
	it('groups what was found by kind, each a link, and says how many', () => {
		const body = html({ query: 'mb2', hits, near: [] });
		expect(body).toContain('3 places answer to “mb2”');
		expect([...body.matchAll(/<h3[^>]*>([^<]*)</g)].map(([, text]) => text)).toEqual([
			'Roots and canals',
			'Sources'
		]);
		for (const { address } of hits) expect(body).toContain(`href="${address}"`);
		expect(body).toContain('&lt;b>odd&lt;/b>');
	});

	it('offers near words and phrases that work where nothing was found', () => {
		const body = html({ query: 'c & d', hits: [], near: ['vertucci'] });
		expect(body).toContain('Nothing here answers to');
		expect(body).toContain('href="/?q=vertucci"');
		expect(body).toContain('href="/?q=%233"');
		expect(body).toContain('href="#chart"');
		expect(html({ query: 'zz', hits: [], near: [] })).not.toContain('Did you mean');
	});
});
