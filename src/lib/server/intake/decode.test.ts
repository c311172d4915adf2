import fc from 'fast-check';
import { stringify } from 'csv-stringify/sync';
import { describe, expect, it } from 'vitest';
import { decodeText, delimiterOf, readCsv } from './decode';
import { MOST_ROWS } from './limits';

const bytes = (text: string) => Buffer.from(text, 'utf8');

/** Control characters no table has, but for tab and line ends, and the mark of byte order. */
const unreadable = (character: string) =>
	character === '\ufeff' || (character < ' ' && !['\t', '\n', '\r'].includes(character));

describe('the text of a file', () => {
	// Unicode Standard, 23.8: the marks of UTF-8 and UTF-16. Windows-1252 after Unicode's CP1252.TXT: 0xE9 é, 0x80 €, 0x96 en dash.
	it('is read as what wrote it', () => {
		expect(decodeText(Buffer.from([0xef, 0xbb, 0xbf, 0x61]))).toEqual({ text: 'a', encoding: 'UTF-8' });
		expect(decodeText(Buffer.from([0xff, 0xfe, 0x61, 0]))).toEqual({ text: 'a', encoding: 'UTF-16' });
		expect(decodeText(Buffer.from([0xfe, 0xff, 0, 0x61]))).toEqual({ text: 'a', encoding: 'UTF-16' });
		expect(decodeText(Buffer.from([0x43, 0x61, 0x66, 0xe9, 0x20, 0x80, 0x96]))).toEqual({
			text: 'Café €–',
			encoding: 'Windows-1252'
		});
		expect(decodeText(bytes('Café €')).encoding).toBe('UTF-8');
	});

	it('is refused where it is none', () => {
		// The first bytes of an ELF executable.
		expect(() => decodeText(Buffer.from([0x7f, 0x45, 0x4c, 0x46, 2, 1, 1, 0]))).toThrow(/no text/);
	});

	it('whatever it is, comes back from UTF-8', () => {
		fc.assert(
			fc.property(fc.string({ unit: 'grapheme' }), (text) => {
				fc.pre(![...text].some(unreadable));
				expect(decodeText(bytes(text)).text).toBe(text);
			})
		);
	});
});

describe('the separator', () => {
	it.each([
		['a,b,c', ','],
		['a;b;c', ';'],
		['a\tb', '\t'],
		['"a,b,c";d', ';'],
		['"a\nb;c;d;e",f\n;;;;;;', ','],
		['alone', ',']
	])('of %j is %j', (text, delimiter) => expect(delimiterOf(text)).toBe(delimiter));
});

describe('a CSV file', () => {
	it('comes back whatever its cells hold and whichever separator it uses', () => {
		const cell = fc.oneof(
			fc.string(),
			fc.constantFrom('a;b', 'a,b', 'a"b', 'a\nb', 'a\r\nb', ' x ', "'=1", 'é')
		);
		const row = fc.array(cell, { minLength: 3, maxLength: 3 });
		fc.assert(
			fc.property(
				fc.array(row, { minLength: 1, maxLength: 8 }),
				fc.constantFrom(',', ';', '\t'),
				(rows, delimiter) => {
					const clean = rows
						.map((cells) =>
							cells.map((one) => [...one].filter((character) => !unreadable(character)).join(''))
						)
						.filter((cells) => cells.some((one) => one !== ''));
					const all = [['one', 'two', 'three'], ...clean];
					const text = stringify(all, { delimiter, quoted: true });
					expect(readCsv(bytes(text))).toEqual({ rows: all, encoding: 'UTF-8', delimiter });
				}
			)
		);
	});

	it('keeps the numbers of its rows over blank ones', () => {
		expect(readCsv(bytes('a,b\n\n1,2\n,\n3,4\n')).rows).toEqual([['a', 'b'], [], ['1', '2'], [], ['3', '4']]);
	});

	it('with a quotation mark left open is refused, with the line', () => {
		expect(() => readCsv(bytes('a,b\n1,"2\n3,4\n'))).toThrow(/quotation marks do not match/);
	});

	it('that is too long or too wide is refused', () => {
		expect(() => readCsv(bytes(`a\n${'1\n'.repeat(MOST_ROWS + 1)}`))).toThrow(/more than 50,000 rows/);
		expect(() => readCsv(bytes(','.repeat(200)))).not.toThrow();
		expect(() => readCsv(bytes(`${'a,'.repeat(200)}b`))).toThrow(/more than 100 columns/);
	});
});
