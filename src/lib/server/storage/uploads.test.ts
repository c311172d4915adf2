import { readdirSync } from 'node:fs';
import sharp from 'sharp';
import { describe, expect, it } from 'vitest';
import { temporaryFolder } from '../../../../tests/support/database';
import { diskStore } from './disk';
import { checkUpload, harmlessName, isWholePdf } from './uploads';

/** The smallest PDF there is: header, one object, table of references, trailer (ISO 32000-1, 7.5). */
function pdf(): Buffer {
	const head = '%PDF-1.4\n1 0 obj\n<< /Type /Catalog >>\nendobj\n';
	const table = 'xref\n0 2\n0000000000 65535 f \n0000000009 00000 n \ntrailer\n<< /Size 2 /Root 1 0 R >>\n';
	return Buffer.from(`${head}${table}startxref\n${head.length}\n%%EOF\n`, 'latin1');
}
const picture = () =>
	sharp({ create: { width: 20, height: 10, channels: 3, background: 'white' } })
		.withExif({ IFD0: { Copyright: 'a secret' } })
		.jpeg()
		.toBuffer();

describe('an upload', () => {
	it('that is a picture is kept without what its file says beside the pixels', async () => {
		const before = await picture();
		expect(before.includes('a secret')).toBe(true);
		const checked = await checkUpload(before);
		if ('failure' in checked) throw new Error(checked.failure);
		expect(checked.type).toBe('image/jpeg');
		expect(checked.bytes.includes('a secret')).toBe(false);
		expect(await sharp(checked.bytes).metadata()).toMatchObject({ width: 20, height: 10 });
	});

	it('that is a whole PDF is kept as it is', async () => {
		expect(await checkUpload(pdf())).toEqual({ bytes: pdf(), type: 'application/pdf', ending: 'pdf' });
		expect(isWholePdf(pdf().subarray(0, 60))).toBe(false);
	});

	it.each([
		['nothing', Buffer.alloc(0), 'empty'],
		['an executable', Buffer.concat([Buffer.from('\x7fELF\x02\x01\x01'), Buffer.alloc(99)]), 'wrong type'],
		['text', Buffer.from('<svg xmlns="http://www.w3.org/2000/svg"/>'), 'wrong type'],
		['a PDF cut off', Buffer.from('%PDF-1.7\n1 0 obj'), 'broken PDF'],
		['ten megabytes and one byte', Buffer.alloc(10 * 1024 * 1024 + 1), 'too large']
	])('that is %s is refused', async (_, bytes, failure) =>
		expect(await checkUpload(bytes)).toEqual({ failure })
	);

	it('that is a picture cut off is refused', async () => {
		expect(await checkUpload((await picture()).subarray(0, 200))).toEqual({ failure: 'broken image' });
	});

	it('has a name without folders and marks', () => {
		expect(harmlessName('C:\\temp\\..\\table "2".pdf')).toBe('table 2.pdf');
		expect(harmlessName('../../')).toBe('file');
	});
});

describe('the storage on disk', () => {
	it('keeps, opens and removes, and takes no name that leads elsewhere', async () => {
		const folder = temporaryFolder();
		const store = diskStore(folder);
		await store.put('abcdefgh12.pdf', Buffer.from('x'));
		expect(readdirSync(folder)).toEqual(['abcdefgh12.pdf']);
		expect(String(await store.read('abcdefgh12.pdf'))).toBe('x');
		await store.remove('abcdefgh12.pdf');
		await store.remove('abcdefgh12.pdf');
		expect(await store.open('abcdefgh12.pdf')).toBeNull();
		for (const name of ['../abcdefgh', '/etc/passwd', 'abcdefgh/x.pdf', 'a'])
			await expect(store.put(name, Buffer.from('x'))).rejects.toThrow(/no name/);
	});
});
