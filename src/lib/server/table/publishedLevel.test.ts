import type { MeasurementDto } from '$lib/schemas/teeth';
import { describe, expect, it } from 'vitest';
import { publishedLevel } from './publishedLevel';

const measured = (changes: Partial<MeasurementDto>): MeasurementDto => ({
	source: 'a',
	locator: 'table 1',
	tooth: 'maxillary-first-molar',
	root: 'MB',
	scope: '',
	country: '',
	method: 'micro-ct',
	quantity: 'confluence-distance-from-apex',
	n: 40,
	mean: 3.2,
	sd: 1.1,
	min: null,
	max: null,
	unit: 'mm',
	provenance: 'read',
	verified: true,
	note: '',
	...changes
});

describe('publishedLevel', () => {
	it('takes the row with mean and standard deviation over the most roots', () => {
		const rows = [
			measured({}),
			measured({ source: 'b', n: 90, mean: 2.8 }),
			measured({ source: 'c', n: 90 })
		];
		expect(publishedLevel(rows, 'MB')).toEqual({ mean: 2.8, sd: 1.1, source: 'b', locator: 'table 1' });
	});

	it.each([
		['a range without a mean', { mean: null, sd: null, min: 1, max: 4 }],
		['a mean without its spread', { sd: null }],
		['a figure that was recalled, not seen', { verified: false }],
		['another root', { root: 'DB' }],
		['another quantity', { quantity: 'root-length' }]
	])('takes %s for no prior', (_, changes) => {
		expect(publishedLevel([measured(changes)], 'MB')).toBeNull();
	});
});
