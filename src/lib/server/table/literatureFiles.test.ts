import { writeFileSync } from 'node:fs';
import path from 'node:path';
import { describe, expect, it } from 'vitest';
import { temporaryFolder } from '../../../../tests/support/database';
import { readLiteratureFiles } from './literatureFiles';

const TEXTS = {
	'sources.json': '[{ "id": "adams-2001" }]',
	'observations.csv': 'source_id,note\nadams-2001,plain\n',
	'measurements.csv': 'source_id\n',
	'diagnostics.csv': 'source_id\n',
	'finding-characteristics.csv': 'finding\n',
	'standards.csv': 'source_id\n'
};

function read(change: Partial<typeof TEXTS> = {}) {
	const folder = temporaryFolder();
	for (const [name, text] of Object.entries({ ...TEXTS, ...change }))
		writeFileSync(path.join(folder, name), text);
	return readLiteratureFiles(folder);
}

describe('readLiteratureFiles', () => {
	it('reads quoted commas, quotes and line ends, and says on which line a row stands', async () => {
		const files = await read({
			'observations.csv':
				'\ufeffsource_id,note\r\na,"one, two"\r\n\r\nb,"he said ""no"""\r\nc,"first\nsecond"\r\nd,\r\n'
		});
		expect(files.observations.map(({ cells }) => cells)).toEqual([
			{ source_id: 'a', note: 'one, two' },
			{ source_id: 'b', note: 'he said "no"' },
			{ source_id: 'c', note: 'first\nsecond' },
			{ source_id: 'd', note: '' }
		]);
		expect(files.observations.slice(0, 2).map(({ line }) => line)).toEqual([2, 4]);
	});

	it('has the same digest for the same files and another when any of them changes', async () => {
		const { digest } = await read();
		expect((await read()).digest).toBe(digest);
		const changed = await Promise.all(
			Object.entries(TEXTS).map(async ([name, text]) => (await read({ [name]: `${text}\n` })).digest)
		);
		expect(new Set([digest, ...changed]).size).toBe(7);
	});

	it('refuses a row with another number of cells than the header, and a missing file', async () => {
		await expect(read({ 'standards.csv': 'source_id,item\nadams-2001\n' })).rejects.toThrow(/line 2/);
		await expect(readLiteratureFiles(temporaryFolder())).rejects.toThrow(/ENOENT/);
	});
});
