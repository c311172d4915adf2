import fc from 'fast-check';
import { parse } from 'csv-parse/sync';
import { stringify } from 'csv-stringify/sync';
import { describe, expect, it } from 'vitest';
import { harmlessCell, originalCell } from './harmlessCells';

/** Cells that begin as formulas do, and others, with everything CSV finds hard. */
const cell = fc
	.tuple(
		fc.constantFrom('', '=', '+', '-', '@', '\t', '\r', "'", "''", 'x'),
		fc.oneof(fc.string(), fc.constantFrom('1+1', 'a,b', 'a"b', 'a\nb', 'a\r\nb', "'", '=', ' '))
	)
	.map(([beginning, rest]) => beginning + rest);

describe('cells made harmless', () => {
	// OWASP, "CSV Injection": cells that begin with these characters are run as formulas; a single quote in front stops it.
	it.each(['=1+1', '+1', '-1', '@SUM(A1)', '\tx', '\rx'])('get an apostrophe in front: %j', (text) => {
		expect(harmlessCell(text)).toBe(`'${text}`);
	});

	it('never begin as a formula does, and can be undone exactly, whatever they hold', () => {
		fc.assert(
			fc.property(cell, (text) => {
				expect(harmlessCell(text)).not.toMatch(/^[=+\-@\t\r]/);
				expect(originalCell(harmlessCell(text))).toBe(text);
			})
		);
	});

	it('survive the way through a CSV file and back', () => {
		fc.assert(
			fc.property(fc.array(fc.tuple(cell, cell), { minLength: 1 }), (rows) => {
				const text = stringify([['a', 'b'], ...rows.map((row) => row.map(harmlessCell))], {
					quoted_match: /[\r\n]/
				});
				expect(
					parse(text, { from_line: 1 })
						.slice(1)
						.map((row) => row.map(originalCell))
				).toEqual(rows);
			})
		);
	});

	it('stay as they are where nothing needs doing', () => {
		for (const text of ['', '2-1', 'a=b', ' =1', '12', "o'clock"]) expect(harmlessCell(text)).toBe(text);
		expect(originalCell("'tis written by hand")).toBe("'tis written by hand");
	});
});
