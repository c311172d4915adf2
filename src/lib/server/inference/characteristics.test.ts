import { describe, expect, it } from 'vitest';
import { shippedCharacteristics } from '../../../../tests/support/inventedRoot';
import { characteristicsFor } from './characteristics';

const rows = shippedCharacteristics();
const cbct = (tooth: string, root: string) => {
	const beta = characteristicsFor(rows, tooth, root).beta('search-cbct', 'each-further-canal-found');
	return beta && [beta.a, beta.b];
};

describe('characteristicsFor', () => {
	// The five rows of data/literature/finding-characteristics.csv for the search by CBCT.
	it.each([
		['maxillary-first-molar', 'MB', [29, 1]],
		['maxillary-third-molar', 'MB', [29, 1]],
		['maxillary-first-molar', 'DB', [31, 2]],
		['maxillary-second-premolar', 'whole', [16, 2]],
		['mandibular-first-premolar', 'single', [16, 2]],
		['mandibular-first-molar', 'M', [13, 3]],
		['mandibular-second-molar', 'D', [13, 3]],
		['mandibular-canine', 'single', [8, 4]],
		['mandibular-lateral-incisor', 'single', [8, 4]],
		['maxillary-canine', 'single', [31, 2]],
		['maxillary-central-incisor', 'single', [31, 2]]
	])('takes the most specific group for %s %s', (tooth, root, expected) => {
		expect(cbct(tooth, root)).toEqual(expected);
	});

	it('does not depend on the order of the rows', () => {
		const reversed = characteristicsFor([...rows].reverse(), 'maxillary-first-molar', 'MB');
		expect(reversed.beta('search-cbct', 'each-further-canal-found')).toMatchObject({ a: 29, b: 1 });
	});

	it('says what is assumed, and where the rest comes from', () => {
		const table = characteristicsFor(rows, 'maxillary-first-molar', 'MB');
		expect(table.beta('cone-mark', 'positive-if-meet')).toMatchObject({ a: 17, b: 3, assumed: true });
		const reading = table.beta('cbct-reading', 'positive-if-meet');
		expect(reading?.assumed).toBe(false);
		expect(reading?.sourceIds).toContain('pang-2022');
	});

	it('has no Beta for what the table does not hold, or holds as a length', () => {
		const table = characteristicsFor(rows, 'maxillary-first-molar', 'MB');
		expect(table.beta('reading-tea-leaves', 'positive-if-meet')).toBeNull();
		expect(table.beta('level-cone-mark', 'sd')).toBeNull();
	});

	it('gives the spread of a measurement in mm', () => {
		const table = characteristicsFor(rows, 'mandibular-first-molar', 'M');
		expect(table.sdMm('level-cone-shortfall')).toMatchObject({ value: 0.7, assumed: true });
		expect(table.sdMm('cone-mark')).toBeNull();
	});
});
