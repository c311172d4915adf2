import { render } from 'svelte/server';
import { describe, expect, it } from 'vitest';
import ForestPlot from './ForestPlot.svelte';

const study = {
	id: 7,
	label: 'Weine and others 1969',
	href: '/sources/weine-1969',
	locator: 'Table 2',
	country: 'USA',
	method: 'sectioning',
	events: 81,
	total: 263,
	year: 1969
};
const props = {
	caption: 'More than one canal?',
	studies: [study],
	pooled: { mean: 0.58, interval: [0.5, 0.66] as const },
	predictive: { mean: 0.57, interval: [0.22, 0.88] as const }
};
const html = (change: object = {}) =>
	render(ForestPlot, { props: { ...props, ...change } }).body.replaceAll('\u00a0', ' ');
const cells = (row: string) =>
	[...row.matchAll(/<t[hd][^>]*>([\s\S]*?)<\/t[hd]>/g)].map(([, cell]) =>
		cell.replace(/<[^>]*>/g, '').trim()
	);

describe('ForestPlot', () => {
	it('says everything of a study in words, the source as a link', () => {
		const row = /<tbody[\s\S]*?(<tr[\s\S]*?<\/tr>)/.exec(html())![1];
		// Newcombe 1998: 81/263 is 0.308 (0.2553 to 0.3662).
		expect(cells(row)).toEqual([
			'Weine and others 1969',
			'Table 2',
			'USA',
			'sectioning',
			'81 of 263',
			'31 % (26 to 37 %)',
			''
		]);
		expect(row).toContain('href="/sources/weine-1969"');
	});

	it('has rows for the pooled and the predicted proportion', () => {
		const foot = /<tfoot[\s\S]*<\/tfoot>/.exec(html())![0];
		expect(foot).toContain('58 % (50 to 66 %)');
		expect(foot).toContain('57 % (22 to 88 %)');
		expect(foot).toContain('<polygon');
	});

	it('stays a table where its rows are stacked', () => {
		const roles = ['table', 'rowgroup', 'row', 'columnheader', 'rowheader', 'cell'];
		for (const role of roles) expect(html()).toContain(`role="${role}"`);
		expect(html()).toContain('More than one canal?</caption>');
	});

	it('gives weights, marks what was only quoted, and puts methods together on request', () => {
		const two = [
			{ ...study, weight: 0.75, mark: 'secondary' as const },
			{ ...study, id: 8, method: 'CBCT', weight: 0.25, events: 100, total: 200 }
		];
		const plot = html({ studies: two, grouped: true });
		expect(plot).toContain('>Weight</th>');
		expect(plot.replace(/<[^>]*>/g, ' ')).toMatch(/Weine and others 1969\s+\? quoted in another source/);
		const names = [...plot.matchAll(/scope="rowgroup"[^>]*>([^<]*)</g)].map(([, name]) => name.trim());
		expect(names).toEqual(['sectioning: 1 sample, 31 %, weight 75 %', 'CBCT: 1 sample, 50 %, weight 25 %']);
		expect(html()).not.toContain('>Weight</th>');
	});

	it('says where no country is given and where there is no study', () => {
		expect(html({ studies: [{ ...study, country: '' }] })).toContain('country not given');
		expect(html({ studies: [] })).toContain('No study answers this question');
	});

	it('needs no style attribute', () => {
		expect(html()).not.toMatch(/ style=/);
	});
});
