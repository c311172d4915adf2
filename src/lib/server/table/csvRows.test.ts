import { describe, expect, it } from 'vitest';
import { readObservationRows } from './csvRows';

const HEADER =
	'source_id,locator,tooth,root,scope,country,method,subgroup,measure,category,count,total,percent,count_derived,provenance,note';
const line = (category: string, count: string, provenance = 'read') =>
	`s,table 2,maxillary-first-molar,MB,all,BRA,cbct,all,configuration,${category},${count},80,12.5,no,${provenance},"a, b"`;

describe('readObservationRows', () => {
	it('reads numbers, empty cells as null, and quoted notes', () => {
		const [first, second] = readObservationRows([HEADER, line('1', '10'), line('2', '')].join('\n'));
		expect(first).toMatchObject({
			source: 's',
			category: '1',
			count: 10,
			total: 80,
			percent: 12.5,
			note: 'a, b'
		});
		expect(first).toMatchObject({ verified: false, poolable: null, provenance: 'read' });
		expect(second.count).toBeNull();
	});

	it('gives rows of one sample, measure, locator and provenance one entry', () => {
		const table = readObservationRows(
			[HEADER, line('1', '1'), line('2', '2'), line('3', '3', 'memory')].join('\n')
		);
		expect(table.map(({ entry }) => entry)).toEqual([1, 1, 2]);
	});

	it('names the line of a number or a provenance that is none', () => {
		expect(() => readObservationRows([HEADER, line('1', 'ten')].join('\n'))).toThrow(
			"Line 2: 'ten' is not a number"
		);
		expect(() => readObservationRows([HEADER, line('1', '1', 'rumour')].join('\n'))).toThrow('provenance');
	});
});
