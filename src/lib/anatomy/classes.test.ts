import { describe, expect, it } from 'vitest';
import { ahmedCode, classLabels } from './classes';
import { SequenceError } from './sequence';

// The classes as the project's page on the domain lists them, in the order of their Roman numerals. The supplement
// is from memory there too: this checks the transcription, not the source.
const ROMAN = 'I II III IV V VI VII VIII IX X XI XII XIII XIV XV XVI XVII XVIII XIX XX XXI XXII XXIII'.split(
	' '
);
const VERTUCCI = '1 2-1 1-2-1 2 1-2 2-1-2 1-2-1-2 3'.split(' ');
const SUPPLEMENT = '1-3 1-2-3-2 1-2-3-4 2-3-1 1-2-1-3 4-2 3-2 2-3 1-3-1 3-1 2-1-2-1 4 4-1 5-4 3-4'.split(' ');
const WEINE = '1 2-1 2 1-2'.split(' ');

describe('classLabels', () => {
	it.each(VERTUCCI.map((sequence, index) => [sequence, ROMAN[index]]))(
		'%s is Vertucci %s and not in the supplement',
		(sequence, roman) => {
			expect(classLabels(sequence)).toMatchObject({ vertucci: roman, sertBayirli: null });
		}
	);

	it.each(SUPPLEMENT.map((sequence, index) => [sequence, ROMAN[VERTUCCI.length + index]]))(
		'%s is %s of the supplement and no class of Vertucci or Weine',
		(sequence, roman) => {
			expect(classLabels(sequence)).toMatchObject({ vertucci: null, weine: null, sertBayirli: roman });
		}
	);

	it('knows the four classes of Weine and no other', () => {
		const named = [...VERTUCCI, ...SUPPLEMENT].filter((sequence) => classLabels(sequence).weine !== null);
		expect(named.map((sequence) => [sequence, classLabels(sequence).weine])).toEqual(
			WEINE.map((sequence, index) => [sequence, ROMAN[index]])
		);
	});

	it('writes the superscript of a sequence without a named class too', () => {
		expect(classLabels(' 1-2-1-2-1 ')).toEqual({
			vertucci: null,
			weine: null,
			sertBayirli: null,
			ahmed: '¹⁻²⁻¹⁻²⁻¹'
		});
	});

	it('refuses a text that is no sequence', () => {
		expect(() => classLabels('IV')).toThrow(SequenceError);
	});
});

describe('ahmedCode', () => {
	it('writes the two examples of the domain', () => {
		const molar = [
			{ label: 'M', sequence: '2' },
			{ label: 'D', sequence: '1' }
		];
		expect(ahmedCode('46', molar)).toBe('²46 M² D¹');
		expect(ahmedCode('44', [{ label: 'single', sequence: '1-2' }])).toBe('¹44 ¹⁻²');
	});

	it('writes three roots in the order given', () => {
		const roots = [
			{ label: 'MB', sequence: '2-1' },
			{ label: 'DB', sequence: '1' },
			{ label: 'P', sequence: '1' }
		];
		expect(ahmedCode('16', roots)).toBe('³16 MB²⁻¹ DB¹ P¹');
	});

	it('refuses a tooth without a number or a root, an unnamed root of several, and a text that is no sequence', () => {
		const one = [{ label: '', sequence: '1' }];
		expect(() => ahmedCode(' ', one)).toThrow(RangeError);
		expect(() => ahmedCode('11', [])).toThrow(RangeError);
		expect(() => ahmedCode('46', [...one, ...one])).toThrow(RangeError);
		expect(() => ahmedCode('11', [{ label: '', sequence: '1-1' }])).toThrow(SequenceError);
	});
});
