import { render } from 'svelte/server';
import { describe, expect, it } from 'vitest';
import type { EntryDto, SourceSummary } from '$lib/schemas/table';
import EntryTable from './EntryTable.svelte';

const figure = (category: string, count: number | null, percent: number | null = null) => ({
	...{ category, count, percent, countDerived: false, note: '' }
});
const entry = (id: number, change: Partial<EntryDto> = {}): EntryDto => ({
	...{ id, source: 'adams-2001', title: 'Canals', year: 2001, locator: 'table 1' },
	...{ tooth: 'maxillary-first-molar', root: 'MB', scope: 'all', country: 'CHE+DEU', method: 'cbct' },
	...{ subgroup: 'all', total: 100, measure: 'configuration', state: 'published', provenance: 'read' },
	verified: true,
	figures: [figure('1', 40), figure('2-1', 60)],
	...change
});
const adams: SourceSummary = {
	...{ id: 'adams-2001', title: 'Canals', authors: 'Adams', year: 2001, journal: null, doi: null },
	...{ citable: true, retracted: true, entries: 2 }
};

const body = render(EntryTable, {
	props: {
		entries: [
			entry(7),
			entry(8, {
				...{ tooth: '', total: null, country: '', provenance: 'memory', verified: false },
				figures: ['1', '2', '3', '4', '5', '6'].map((category) => figure(category, null, 12.5))
			})
		],
		sources: { 'adams-2001': adams },
		fields: [
			['q', 'mb'],
			['sort', '-total'],
			['cursor', 'abc']
		],
		sort: '-total',
		columns: ['figures', 'total', 'source', 'country', 'standing']
	}
}).body.replaceAll('\u00a0', ' ');
const text = (html: string) =>
	html
		.replace(/<[^>]*>/g, ' ')
		.replace(/\s+/g, ' ')
		.trim();
const rows = (body.match(/<tr[\s\S]*?<\/tr>/g) ?? []).map(text);

describe('the table of entries', () => {
	it('leads from each row to its entry and its source, with figures, place and standing in words', () => {
		expect(body).toContain('href="/table/7"');
		expect(body).toContain('href="/sources/adams-2001"');
		expect(rows[1]).toMatch(/^Upper first molar, MB .*1 : 40 of 100 \(40 %\) 2-1 : 60 of 100 \(60 %\)/);
		expect(rows[1]).toContain('Switzerland and Germany');
		expect(rows[1]).toContain('verified');
		expect(rows[1]).toContain('Retracted');
	});

	it('says what is not known, and that there are more categories', () => {
		expect(rows[2]).toMatch(/^tooth types pooled, MB/);
		expect(rows[2]).toContain('4 : 12.5 % and 2 more');
		expect(rows[2]).toContain('unverified');
		expect(rows[2].match(/not given/g)).toHaveLength(2);
	});

	it('marks the sorted column for the eye and the ear, and links to the other way and the first page', () => {
		const header = /<th[^>]*aria-sort="descending"[\s\S]*?<\/th>/.exec(body)![0];
		expect(text(header)).toBe('Total ▼ , sorted downwards');
		expect(header).toContain('href="/table?q=mb&amp;sort=total"');
		expect(body.match(/aria-sort/g)).toHaveLength(1);
		expect(body).toContain('href="/table?q=mb&amp;sort=author"');
	});

	it('is a table to whoever hears it, also where it is laid out as cards', () => {
		for (const role of ['table', 'rowgroup', 'row', 'columnheader', 'rowheader', 'cell'])
			expect(body).toContain(`role="${role}"`);
		expect(body).toMatch(/role="region"[^>]*tabindex="0"/);
	});
});
