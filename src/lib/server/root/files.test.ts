import { parse } from 'csv-parse/sync';
import { describe, expect, it } from 'vitest';
import type { ExpectationData } from '$lib/drawing/expectation';
import { QUESTION_NAMES } from '$lib/schemas/terms';
import type { ExpectationDto } from '$lib/schemas/expectation';
import { citedBy } from './cited';
import { drawingSvg } from './drawingFile';
import { drawingNotes } from './drawingNotes';
import { samplesCsv } from './samplesFile';
import { wrapText } from './wrapText';

const summary = { mean: 0.6, median: 0.61, interval: [0.3, 0.9] as [number, number] };
const study = {
	source: 'a-2001',
	entry: 7,
	locator: '=HYPERLINK("http://example.org")',
	country: 'BRA',
	method: 'cbct',
	events: 30,
	total: 50,
	weight: 1
};
const expectation = {
	tooth: 'maxillary-first-molar',
	root: 'MB',
	filters: {},
	tableRevision: 3,
	evidence: { studies: 1, roots: 50, sources: ['a-2001'] },
	sequences: [
		{ sequence: '2-1', mean: 0.4, interval: [0.2, 0.6] },
		{ sequence: '1', mean: 0.597, interval: [0.3, 0.8] },
		{ sequence: '3', mean: 0.003, interval: [0, 0.01] }
	],
	features: [],
	questions: QUESTION_NAMES.map((id) => ({
		id,
		text: `Question ${id}?`,
		borrowed: id !== 'q1',
		studies: id === 'q1' ? [study] : [],
		pooled: summary,
		predictive: summary
	})),
	notPooled: [{ source: 'c-1999', entry: 9, reason: 'unverified' }],
	reviews: []
} as unknown as ExpectationDto;
const sources = {
	'a-2001': {
		...{ id: 'a-2001', title: 'Canals', authors: 'Ørum & Sons', year: 2001, journal: null, doi: null },
		...{ citable: true, retracted: false, entries: 1 }
	}
};
const shape = {
	length: { mm: 13, range: null, source: 'a-2001', locator: 'table 2', verified: false },
	confluence: null
};
const data: ExpectationData = {
	sequences: [
		{ sequence: '2-1', probability: 0.4, joinLevelMm: 3 },
		{ sequence: '1', probability: 0.6, joinLevelMm: null }
	],
	rootLengthMm: 13,
	lengthStanding: 'published'
};

describe('samplesCsv', () => {
	const csv = samplesCsv(expectation, sources, { 7: 'secondary' }, [['method', 'cbct']]);
	const rows = parse<Record<string, string>>(csv, { columns: true, bom: true });

	it('has every sample with its place and standing, and both estimates of all nine questions', () => {
		expect(rows[0]).toMatchObject({
			kind: 'sample',
			question: 'q1',
			source: 'a-2001',
			citation: 'Ørum & Sons, 2001',
			standing: 'secondary',
			events: '30',
			total: '50',
			filters: 'method=cbct',
			table_revision: '3'
		});
		const estimates = rows.filter(({ kind }) => kind.endsWith(' population') && !kind.startsWith('sequence'));
		expect(estimates).toHaveLength(18);
		expect(estimates.map(({ question }) => question)).toEqual(QUESTION_NAMES.flatMap((id) => [id, id]));
		expect(estimates[1]).toMatchObject({ kind: 'new population', mean: '0.6', lower95: '0.3', standing: '' });
		expect(estimates[2].standing).toBe('borrowed from other roots');
		expect(rows.filter(({ kind }) => kind.startsWith('sequence')).map(({ text }) => text)).toEqual([
			'2-1',
			'1',
			'3'
		]);
	});

	it('gives a spreadsheet no formula', () => {
		expect(rows[0].locator).toBe(`'${study.locator}`);
		const cells = rows.flatMap((row) => Object.values(row));
		expect(cells.filter((cell) => /^[=+\-@\t\r]/.test(cell))).toEqual([]);
	});

	it('is read as UTF-8 by a spreadsheet', () => {
		expect(csv.startsWith('\ufeff')).toBe(true);
		expect(csv).toContain('\r\n');
	});
});

describe('drawingSvg', () => {
	const file = {
		data,
		label: 'Upper <first> molar',
		description: 'Two & one.',
		show: null,
		notes: ['Made & dated']
	};
	const svg = drawingSvg(file);

	it('needs nothing beside itself', () => {
		expect(svg).toMatch(/^<svg xmlns="http:\/\/www\.w3\.org\/2000\/svg" width="372" height="\d+"/);
		expect(svg).not.toMatch(/ class=| style=|<!--|href=|url\(|var\(|undefined|NaN/);
		expect(svg).toContain("font-family=\"'Noto Sans'");
		expect(svg).toContain('fill="#fbf8f1"');
	});

	it('has a name, a description and its notes, escaped', () => {
		expect(svg).toMatch(/<title id="[^"]+">Upper &lt;first> molar<\/title>/);
		expect(svg).toContain('Two &amp; one.</desc>');
		expect(svg).toContain('>Made &amp; dated</text>');
	});

	it('draws one sequence alone on request', () => {
		expect(drawingSvg({ ...file, show: '2-1' })).toMatch(/stroke-opacity="1"/);
		expect(drawingSvg({ ...file, show: '4-1' })).toBe(svg);
	});
});

describe('drawingNotes', () => {
	it('says what is drawn, from where, under which filters and as of when', () => {
		const notes = drawingNotes(
			'The label',
			expectation,
			shape,
			sources,
			[['method', 'cbct']],
			new Date(Date.UTC(2026, 0, 31))
		);
		const text = notes.join('\n').replaceAll('\u00a0', ' ');
		expect(notes[0]).toBe('The label');
		expect(text).toContain('1: 60 % (30 to 80 %); 2-1: 40 % (20 to 60 %).');
		expect(text).toContain('length from Ørum & Sons, 2001 (table 2), unverified.');
		expect(text).toContain('method cbct');
		expect(text).toContain('table revision 3, 2026-01-31');
	});
});

describe('wrapText', () => {
	it('breaks between words, and a word only where it is too long', () => {
		expect(wrapText('one two three', 7)).toEqual(['one two', 'three']);
		expect(wrapText('abcdefghij k', 4)).toEqual(['abcd', 'efgh', 'ij k']);
		expect(wrapText('', 5)).toEqual([]);
	});
});

describe('citedBy', () => {
	it('names each source of the page once, those left out too', () => {
		expect(
			citedBy(expectation, shape, [
				['exclude', 'd-2010'],
				['method', 'cbct']
			])
		).toEqual(['a-2001', 'c-1999', 'd-2010']);
	});
});
