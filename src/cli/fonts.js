/**
 * `npm run fonts`: cuts Latin Extended-A (authors' names of Europe and Turkey) out of Noto Sans, so that one letter of a name
 * does not bring 56 kB a weight with it. The results are kept in src/lib/fonts; run it again when @fontsource/noto-sans changes.
 */
import { mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import process from 'node:process';
import { fileURLToPath } from 'node:url';
import subsetFont from 'subset-font';

const root = path.resolve(fileURLToPath(import.meta.url), '../../..');
const FIRST = 0x100;
const LAST = 0x17f;
const letters = Array.from({ length: LAST - FIRST + 1 }, (_, i) => String.fromCodePoint(FIRST + i)).join('');

const target = path.join(root, 'src/lib/fonts');
mkdirSync(target, { recursive: true });
for (const weight of [400, 600]) {
	const whole = readFileSync(
		path.join(root, `node_modules/@fontsource/noto-sans/files/noto-sans-latin-ext-${weight}-normal.woff2`)
	);
	const part = await subsetFont(whole, letters, { targetFormat: 'woff2' });
	const file = path.join(target, `notoSansLatinExtendedA${weight}.woff2`);
	writeFileSync(file, part);
	process.stdout.write(`${path.relative(root, file)}: ${part.length} bytes of ${whole.length}\n`);
}
