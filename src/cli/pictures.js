/**
 * `npm run pictures -- [address] [folder]`: photographs the screens of a running server in every width, light and dark,
 * and the picture of the README with them.
 */
import { existsSync, mkdirSync } from 'node:fs';
import path from 'node:path';
import process from 'node:process';
import { chromium } from '@playwright/test';

const [address = 'http://localhost:3000', folder = 'data/runtime/pictures'] = process.argv.slice(2);
const WIDTHS_PX = [390, 820, 1440];
const HEIGHT_PX = 900;
const SCREENS = {
	find: '/',
	results: '/?q=premolar',
	nothing: '/?q=zzzz',
	tooth: '/teeth/maxillary-first-molar',
	premolar: '/teeth/mandibular-first-premolar',
	root: '/teeth/maxillary-first-molar/MB',
	narrowed: '/teeth/maxillary-first-molar/MB?method=cbct&minTotal=100',
	alone: '/teeth/maxillary-first-molar/MB?show=2-1&sort=weight&group=method&open=q4',
	compare: '/compare',
	mesial: '/teeth/mandibular-first-molar/M',
	noEvidence: '/teeth/maxillary-second-premolar/P',
	join: '/teeth/maxillary-first-molar/MB/join',
	joined: '/teeth/maxillary-first-molar/MB/join?canals=2&search=microscope&cone-mark=positive&draw=positive',
	three: '/teeth/mandibular-first-molar/M/join?canals=3&cone-mark=positive&cone-mark-pair=MB-ML',
	mistake: '/teeth/mandibular-first-molar/M/join?canals=1&cone-mark=positive',
	table: '/table',
	found: '/table?q=saudi+cbct&sort=-total',
	filtersWrong: '/table?tooth=16&q=zzzz',
	entry: '/table/40',
	sources: '/sources',
	source: '/sources/vertucci-1984',
	about: '/about',
	notPlaced: '/table/not-placed',
	missing: '/nowhere'
};

const executablePath = [process.env.CHROMIUM_PATH, '/usr/bin/chromium'].find(
	(file) => file && existsSync(file)
);
const browser = await chromium.launch({
	executablePath,
	args: process.getuid?.() === 0 ? ['--no-sandbox'] : []
});
mkdirSync(folder, { recursive: true });
for (const width of WIDTHS_PX) {
	for (const colorScheme of /** @type {const} */ (['light', 'dark'])) {
		const page = await browser.newPage({ viewport: { width, height: HEIGHT_PX }, colorScheme });
		for (const [name, screen] of Object.entries(SCREENS)) {
			await page.goto(new URL(screen, address).href, { waitUntil: 'networkidle' });
			await page.screenshot({
				path: path.join(folder, `${name}-${width}-${colorScheme}.png`),
				fullPage: true
			});
		}
		await page.close();
	}
}
const page = await browser.newPage({ viewport: { width: 1180, height: 1080 }, colorScheme: 'light' });
await page.goto(new URL(SCREENS.root, address).href, { waitUntil: 'networkidle' });
await page.screenshot({ path: path.join(folder, 'readme.png') });
await browser.close();
process.stdout.write(`Pictures are in ${folder}.\n`);
