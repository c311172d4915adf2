import { describe, expect, it } from 'vitest';
import {
	formatToothNumber,
	positionOfIso,
	positionOfPalmer,
	positionOfUniversal,
	positions
} from './numbers';
import { toothOf } from './teeth';

// ISO 3950 numbers in the order of Universal 1 to 32: from the upper right third molar along the upper arch to the
// upper left one (16), then from the lower left third molar (17) back to the lower right one (32). Written out by
// hand from the definitions of ISO 3950 and of the Universal system, from memory.
const ISO_BY_UNIVERSAL = (
	'18 17 16 15 14 13 12 11 21 22 23 24 25 26 27 28 ' + '38 37 36 35 34 33 32 31 41 42 43 44 45 46 47 48'
).split(' ');

describe('ISO 3950, Universal and Palmer numbers', () => {
	it('cover the 32 permanent teeth in the order of ISO 3950', () => {
		expect(positions.map((position) => position.iso)).toEqual([...ISO_BY_UNIVERSAL].sort());
	});

	it.each(ISO_BY_UNIVERSAL.map((iso, index) => [iso, String(index + 1)]))(
		'ISO 3950 %s is Universal #%s, and every system leads back to it',
		(iso, universal) => {
			const position = positionOfIso(iso);
			expect(position).toMatchObject({ iso, universal });
			expect(positionOfUniversal(universal)).toBe(position);
			expect(positionOfPalmer(formatToothNumber(iso, 'palmer'))).toBe(position);
			expect(positionOfPalmer(position?.palmerBracket ?? '')).toBe(position);
			expect(formatToothNumber(iso, 'iso')).toBe(iso);
			expect(formatToothNumber(iso, 'universal')).toBe(`#${universal}`);
		}
	);

	it('agree with the numbers of the tooth itself', () => {
		for (const { iso, tooth, side } of positions) {
			expect(toothOf(tooth)?.iso[side === 'right' ? 0 : 1]).toBe(iso);
		}
	});

	// One tooth of each quadrant, by hand: the corner is drawn on the side of both midlines, seen facing the patient.
	it.each([
		['16', 'UR6', '6┘', '3', 'maxillary-first-molar', 'right'],
		['24', 'UL4', '└4', '12', 'maxillary-first-premolar', 'left'],
		['37', 'LL7', '┌7', '18', 'mandibular-second-molar', 'left'],
		['41', 'LR1', '1┐', '25', 'mandibular-central-incisor', 'right']
	])('%s is %s, %s and #%s', (iso, palmer, palmerBracket, universal, tooth, side) => {
		expect(positionOfIso(iso)).toEqual({ iso, palmer, palmerBracket, universal, tooth, side });
	});

	it('read Palmer in either case and refuse what is no number of a permanent tooth', () => {
		expect(positionOfPalmer('ul6')?.iso).toBe('26');
		expect(['10', '19', '29', '50', '51', '1', '', '016'].map(positionOfIso)).toEqual(
			Array(8).fill(undefined)
		);
		expect(['0', '33', '03', '#3', ''].map(positionOfUniversal)).toEqual(Array(5).fill(undefined));
		expect(['UR9', 'UR0', 'R6', '6', ''].map(positionOfPalmer)).toEqual(Array(5).fill(undefined));
		expect(() => formatToothNumber('51', 'iso')).toThrow(RangeError);
	});
});
