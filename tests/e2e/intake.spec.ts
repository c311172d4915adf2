import { readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import type { Page } from '@playwright/test';
import sharp from 'sharp';
import { startFakeCrossref } from '../../src/cli/fakeCrossref.js';
import { freePort } from '../support/freePort.js';
import { firstAdministrator, invited, PASSWORD, type Caller } from './support/caller';
import { Mailbox } from './support/mailbox';
import { OwnServer } from './support/server';
import { expect, open, test } from './support/test';

/** Sources and tables as they come in: one educator, who is an administrator as well, in a real browser. */
const HEADINGS =
	'source_id,locator,tooth,root,scope,country,method,subgroup,measure,category,count,total,percent,count_derived,provenance,note';
const row = (category: string, count: string, note = '', total = '120') =>
	`vandermeer-2021,table 2,mandibular-first-molar,D,all,BRA,cbct,all,configuration,${category},${count},${total},,no,read,${note}`;

let server: OwnServer;
let mailbox: Mailbox;
let crossref: Awaited<ReturnType<typeof startFakeCrossref>>;
let educator: Caller;

test.use({ expectedMessages: [/status of 4(09|13|22)/] });

test.beforeAll(async () => {
	test.setTimeout(180_000);
	crossref = await startFakeCrossref();
	mailbox = new Mailbox(await freePort());
	await mailbox.up();
	server = await OwnServer.start({
		...{ SMTP_URL: mailbox.url, CROSSREF_URL: crossref.url, RATE_LIMIT_PER_MINUTE: '1000000' }
	});
	const first = await firstAdministrator(server, 'first@example.org');
	educator = await invited(first, mailbox, 'ida@example.org', ['educator', 'administrator']);
});
test.afterAll(async () => {
	await server?.stop();
	await mailbox?.down();
	await crossref?.stop();
});

async function upload(page: Page, name: string, content: string | Buffer) {
	await open(page, `${server.origin}/desk/import`);
	await page.setInputFiles('#file', { name, mimeType: 'text/csv', buffer: Buffer.from(content) });
	await page.getByRole('button', { name: 'Look through it' }).click();
}

test('a source by its DOI, its page attached, a table with mistakes mended, imported and exported again', async ({
	page
}, info) => {
	test.setTimeout(180_000);
	await page.goto(`${server.origin}/sign-in?to=/desk/sources/new`);
	await page.fill('[name=email]', 'ida@example.org');
	await page.fill('[name=password]', PASSWORD);
	await page.keyboard.press('Enter');
	await page.waitForURL(({ pathname }) => pathname === '/desk/sources/new');

	await page.getByLabel('DOI', { exact: true }).first().fill('10.5555/unknown.1');
	await page.getByRole('button', { name: 'Look up', exact: true }).last().click();
	await expect(page.getByText('Crossref does not know this DOI')).toBeVisible();
	await page.getByLabel('DOI', { exact: true }).first().fill('https://doi.org/10.5555/WM.2021.001');
	await page.getByRole('button', { name: 'Look up', exact: true }).last().click();
	await expect(page.getByLabel('Title')).toHaveValue(
		'Canal systems of mandibular first molars in an invented population'
	);
	await expect(page.getByLabel('Authors')).toHaveValue(
		'Vandermeer, Ilse\nQuiroga, Tomás\n{Invented Root Study Group}'
	);
	await page.getByRole('button', { name: 'Save', exact: true }).click();
	await page.waitForURL('**/desk/sources/vandermeer-2021');

	// What was taken in the page cannot be added again unawares.
	await open(page, `${server.origin}/desk/sources/new`);
	await page.getByLabel('Written as').selectOption('ris');
	await page
		.getByLabel('Citation', { exact: true })
		.fill(
			'TY  - JOUR\nTI  - Canal systems of mandibular first molars in an invented population\nAU  - Vandermeer, I.\nER  - \n'
		);
	await page.getByRole('button', { name: 'Read', exact: true }).click();
	await expect(page.getByText('like title, same first author')).toBeVisible();

	await open(page, `${server.origin}/desk/sources/vandermeer-2021`);
	const picture = await sharp({ create: { width: 40, height: 30, channels: 3, background: 'white' } })
		.withExif({ IFD0: { Copyright: 'a secret' } })
		.jpeg()
		.toBuffer();
	await page.setInputFiles('#file', { name: 'table 2.jpg', mimeType: 'image/jpeg', buffer: picture });
	await page.getByRole('button', { name: 'Attach' }).click();
	await expect(page.getByText('Attached.')).toBeVisible();
	const address = (await page.getByRole('link', { name: 'table 2.jpg' }).getAttribute('href'))!;
	const kept = await educator.ask(address);
	expect(kept.headers.get('content-disposition')).toMatch(/^attachment/);
	expect(kept.headers.get('x-content-type-options')).toBe('nosniff');
	expect(kept.headers.get('content-security-policy')).toContain('sandbox');
	const bytes = Buffer.from(await kept.arrayBuffer());
	expect(bytes.subarray(0, 2).toString('hex')).toBe('ffd8');
	expect(bytes.includes('a secret')).toBe(false);
	const executable = Buffer.concat([Buffer.from('\x7fELF\x02\x01\x01'), Buffer.alloc(500)]);
	await page.setInputFiles('#file', { name: 'page.pdf', mimeType: 'application/pdf', buffer: executable });
	await page.getByRole('button', { name: 'Attach' }).click();
	await expect(page.getByText('This is no JPEG, PNG, WebP or PDF')).toBeVisible();

	// Three planted mistakes: an impossible sequence, a count above its total, a word that is no note on derivation.
	const before = await (await educator.ask('/api/v1/table.csv')).text();
	const wrong = [
		HEADINGS,
		row('1', '80'),
		row('2-2', '30'),
		row('2-1', '130'),
		row('2', '9').replace(',no,', ',perhaps,')
	];
	await upload(page, 'distal.csv', wrong.join('\r\n'));
	const problems = page.getByRole('region', { name: 'Problems' });
	await expect(problems.getByRole('row')).toHaveCount(4);
	for (const [number, column] of [
		['3', 'category'],
		['4', 'count'],
		['5', 'count_derived']
	])
		await expect(problems.getByRole('row').filter({ hasText: column }).getByRole('cell').first()).toHaveText(
			number
		);
	await expect(page.getByRole('button', { name: 'Import' })).toHaveCount(0);
	expect(await (await educator.ask('/api/v1/table.csv')).text()).toBe(before);

	// Mended, by a program that writes Windows-1252 and semicolons.
	const right = [HEADINGS, row('1', '80', '=sum of both'), row('2', '10', 'é'), row('2-1', '30')].join(
		'\r\n'
	);
	await upload(page, 'distal.csv', Buffer.from(right.replaceAll(',', ';'), 'latin1'));
	await expect(page.getByText('Windows-1252, semicolons between cells')).toBeVisible();
	await page.screenshot({ path: info.outputPath('preview.png'), fullPage: true });
	await page.getByRole('button', { name: 'Import and publish' }).click();
	await expect(page.getByText('1 entry, published')).toBeVisible({ timeout: 60_000 });

	const exported = await (await educator.ask('/api/v1/table.csv')).text();
	expect(exported).toContain("'=sum of both");
	const file = info.outputPath('exported.csv');
	writeFileSync(file, exported);
	await upload(page, 'exported.csv', readFileSync(file));
	await expect(page.getByText('There is nothing new in it: the table has all of it.')).toBeVisible();
	const sheet = Buffer.from(await (await educator.ask('/api/v1/table.xlsx')).arrayBuffer());
	await upload(page, path.basename('exported.xlsx'), sheet);
	await expect(page.getByText('There is nothing new in it: the table has all of it.')).toBeVisible();

	// Retracted: out of the estimates, and its page says so.
	await open(page, `${server.origin}/desk/sources/vandermeer-2021`);
	await page.getByRole('textbox', { name: 'Reason' }).fill('Retracted by its authors.');
	await page.getByRole('button', { name: 'Mark as retracted' }).click();
	await expect(page.getByText('Marked as retracted on')).toBeVisible({ timeout: 60_000 });
	await page.goto(`${server.origin}/sources/vandermeer-2021`);
	await expect(page.getByText('Retracted by its authors.')).toBeVisible();
	const root = '/api/v1/teeth/mandibular-first-molar/roots/D/expectation';
	const answer = (await (await educator.ask(root)).json()) as { evidence: { sources: string[] } };
	expect(answer.evidence.sources).not.toContain('vandermeer-2021');
});

test('uploads that are no tables get a sentence', async ({ page }) => {
	test.setTimeout(120_000);
	const send = async (name: string, bytes: Buffer) => {
		const response = await page.request.post(`${server.origin}/desk/import?/upload`, {
			multipart: { file: { name, mimeType: 'text/csv', buffer: bytes } },
			headers: { origin: server.origin, accept: 'text/html' },
			maxRedirects: 0
		});
		return { status: response.status(), text: await response.text() };
	};
	await page.goto(`${server.origin}/sign-in?to=/desk/import`);
	await page.fill('[name=email]', 'ida@example.org');
	await page.fill('[name=password]', PASSWORD);
	await page.keyboard.press('Enter');
	await page.waitForURL(({ pathname }) => pathname === '/desk/import');
	const elf = Buffer.concat([Buffer.from('\x7fELF\x02\x01\x01'), Buffer.alloc(500)]);
	const executable = await send('table.xlsx', elf);
	expect(executable.status).toBe(422);
	expect(executable.text).toContain('no table but a file of another kind');
	const huge = await send('huge.csv', Buffer.alloc(50_000_000, 'a'));
	expect(huge.status).toBe(413);
	expect(huge.text).toContain('larger than 20 MB');
	await upload(
		page,
		'many.csv',
		[HEADINGS, ...Array.from({ length: 5000 }, (_, n) => row('1', 'x', '', String(n + 1)))].join('\n')
	);
	await expect(page.getByText(/^[15]0?,000 in 5,000 rows\. The first 200 are listed\.$/)).toBeVisible();
});
