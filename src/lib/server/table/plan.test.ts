import { describe, expect, it } from 'vitest';
import { csvRows, observation } from '../../../../tests/support/madeUpLiterature';
import { describeUnplaced, numberOrNull, planSamples, whyNotCited } from './plan';

const SOURCES = new Set(['adams-2001', 'baker-2002']);
const plan = (cells: Record<string, string>[]) => planSamples(csvRows(cells), SOURCES);

describe('planSamples', () => {
	it('gathers the categories of one table into one entry of one sample, in their order', () => {
		const { samples, unplaced } = plan([
			observation({ category: '2-1', count: '60', count_derived: 'yes', note: 'of a chart' }),
			observation({ category: '1', count: '40', percent: '40.0' })
		]);
		expect(unplaced).toEqual([]);
		expect(samples).toHaveLength(1);
		const { entries, key: _, ...sample } = samples[0];
		expect(sample).toEqual({
			sourceId: 'adams-2001',
			tooth: 'maxillary-first-molar',
			root: 'MB',
			scope: 'all',
			country: 'BRA',
			method: 'cbct',
			subgroup: 'all',
			total: 100
		});
		expect(entries).toHaveLength(1);
		expect(entries[0]).toMatchObject({ locator: 'table 1', measure: 'configuration', provenance: 'read' });
		expect(entries[0].figures).toEqual([
			{ category: '2-1', count: 60, percent: null, countDerived: true, note: 'of a chart' },
			{ category: '1', count: 40, percent: 40, countDerived: false, note: '' }
		]);
	});

	it.each([
		['source_id', 'baker-2002'],
		['tooth', 'maxillary-second-molar'],
		['root', 'DB'],
		['scope', 'three-rooted'],
		['country', 'CHN'],
		['method', 'clearing'],
		['subgroup', 'female'],
		['total', '120']
	])('makes another sample where the %s differs', (column, value) => {
		expect(plan([observation(), observation({ [column]: value })]).samples).toHaveLength(2);
	});

	it.each([
		['measure', 'feature'],
		['locator', 'table 2'],
		['provenance', 'secondary']
	])('makes another entry of the same sample where the %s differs', (column, value) => {
		const { samples } = plan([observation(), observation({ [column]: value })]);
		expect(samples).toHaveLength(1);
		expect(samples[0].entries).toHaveLength(2);
		expect(new Set(samples[0].entries.map(({ key }) => key)).size).toBe(2);
	});

	it.each([
		['category', '2'],
		['count', '41'],
		['percent', '40.5'],
		['count_derived', 'yes'],
		['note', 'read again']
	])('keeps the key and changes the hash of an entry whose %s changes', (column, value) => {
		const [before] = plan([observation()]).samples[0].entries;
		const [after] = plan([observation({ [column]: value })]).samples[0].entries;
		expect(after.key).toBe(before.key);
		expect(after.hash).not.toBe(before.hash);
		expect(plan([observation()]).samples[0].entries[0].hash).toBe(before.hash);
	});

	it.each([
		['names no source', { source_id: '' }],
		['source nobody-1999 is not among', { source_id: 'nobody-1999' }],
		['no locator', { locator: '' }],
		['no locator', { locator: '  ' }],
		['provenance "hearsay"', { provenance: 'hearsay' }],
		['no measure or no category', { measure: '' }],
		['no measure or no category', { category: '' }],
		['whole numbers', { count: '40.5' }],
		['whole numbers', { count: '-1' }],
		['whole numbers', { count: 'forty' }],
		['whole numbers', { total: '99.5' }],
		['neither a count nor a percentage', { count: '' }],
		['total is zero', { count: '0', total: '0' }],
		['larger than the total', { count: '101' }],
		['not from 0 to 100', { percent: '100.1' }],
		['not from 0 to 100', { percent: '-0.1' }],
		['not from 0 to 100', { percent: 'half' }]
	])('lists a row with its reason: %s %o', (reason, change) => {
		const { samples, unplaced } = plan([observation({ category: '2', ...change })]);
		expect(samples).toEqual([]);
		expect(unplaced).toHaveLength(1);
		expect(unplaced[0]).toMatchObject({ file: 'observations.csv', line: 2 });
		expect(unplaced[0].reason).toContain(reason);
	});

	it.each([
		['a count without a total', { total: '' }],
		['a percentage alone', { count: '', total: '', percent: '0' }],
		['none of the total', { count: '0' }],
		['all of the total', { count: '100', percent: '100' }]
	])('places %s', (_, change) => {
		expect(plan([observation(change)])).toMatchObject({ unplaced: [], samples: [{ entries: [{}] }] });
	});

	it('places or lists every row, whichever come between', () => {
		const { samples, unplaced } = plan([
			observation(),
			observation({ locator: '', category: '2' }),
			observation({ category: '3' })
		]);
		expect(samples[0].entries[0].figures).toHaveLength(2);
		expect(unplaced.map(({ line }) => line)).toEqual([3]);
	});
});

describe('whyNotCited', () => {
	it('asks for no locator in a file that has no such column', () => {
		expect(whyNotCited({ source_id: 'adams-2001', provenance: 'read' }, SOURCES)).toBeNull();
	});
});

describe('describeUnplaced', () => {
	it('sums the row up without its empty cells and source', () => {
		const row = { line: 7, cells: { source_id: 'adams-2001', locator: '', tooth: 'x', count: '4' } };
		expect(describeUnplaced('observations.csv', row, 'Why.')).toEqual({
			file: 'observations.csv',
			line: 7,
			sourceId: 'adams-2001',
			summary: 'tooth: x; count: 4',
			reason: 'Why.'
		});
	});
});

describe('numberOrNull', () => {
	it('is null for an empty cell and NaN for words', () => {
		expect(numberOrNull('')).toBeNull();
		expect(numberOrNull(' ')).toBeNull();
		expect(numberOrNull('0')).toBe(0);
		expect(numberOrNull(' 6.3')).toBe(6.3);
		expect(numberOrNull('6,3')).toBeNaN();
	});
});
