import { deflateRawSync } from 'node:zlib';
import writeXlsxFile, { type SheetData } from 'write-excel-file/node';
import { describe, expect, it } from 'vitest';
import { zipOf } from '../../../../tests/support/zip';
import { checkArchive, DATE_MARK, readXlsx } from './spreadsheet';

const sheetOf = (rows: unknown[][]) => writeXlsxFile(rows as SheetData).toBuffer();

describe('a spreadsheet', () => {
	it('is read as text, numbers as they are written, dates marked', async () => {
		const bytes = await sheetOf([
			['category', 'count', 'percent', 'when'],
			['2-1', 40, 12.5, { value: new Date(Date.UTC(2026, 1, 1)), type: Date, format: 'dd/mm/yyyy' }],
			['1', 0.1, null, true]
		]);
		const { rows } = await readXlsx(bytes);
		expect(rows).toEqual([
			['category', 'count', 'percent', 'when'],
			['2-1', '40', '12.5', `${DATE_MARK}2026-02-01`],
			['1', '0.1', '', 'yes']
		]);
	});

	it('that is a text file, or cut off, is refused', async () => {
		await expect(readXlsx(Buffer.from('a,b\n1,2'))).rejects.toThrow(/cannot be read/);
		const whole = await sheetOf([['a']]);
		await expect(readXlsx(whole.subarray(0, whole.length / 2))).rejects.toThrow(/cannot be read/);
	});
});

describe('an archive', () => {
	it('is counted while it is unpacked, whatever its directory says', async () => {
		const content = Buffer.alloc(5_000_000);
		const packed = deflateRawSync(content);
		expect(packed.length).toBeLessThan(10_000);
		const honest = zipOf([{ name: 'xl/worksheets/sheet1.xml', packed, size: content.length }]);
		expect(await checkArchive(honest)).toBe(5_000_000);
		// One that claims to hold a hundred bytes.
		const lying = zipOf([{ name: 'xl/worksheets/sheet1.xml', packed, size: 100 }]);
		await expect(checkArchive(lying, 1_000_000)).rejects.toThrow(/more than 100 MB/);
	});

	it('of very many parts is not opened', async () => {
		const packed = deflateRawSync(Buffer.from('x'));
		const parts = Array.from({ length: 1_001 }, (_, index) => ({ name: `part${index}`, packed, size: 1 }));
		await expect(checkArchive(zipOf(parts))).rejects.toThrow(/far more parts/);
	});
});
