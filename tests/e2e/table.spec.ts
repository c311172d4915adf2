import { readFileSync } from 'node:fs';
import type { Page } from '@playwright/test';
import { expect, open, test } from './support/test';

const table = (page: Page) => page.getByRole('table', { name: 'The literature table' });
const shown = (page: Page) => page.getByRole('status').filter({ hasText: /entr|Entr/ });
const rows = (page: Page) => table(page).getByRole('rowheader').allInnerTexts();
const totalOf = async (page: Page) => (await shown(page).innerText()).replace(/^.* of /, '');

test('the table by mouse: search, filter, sort, page, columns, back and forward, entry, source, downloads', async ({
	page
}) => {
	await open(page, '/');
	await page.getByRole('navigation', { name: 'Main' }).getByRole('link', { name: 'Table' }).click();
	await expect(page).toHaveURL('/table');
	await expect(shown(page)).toHaveText(/^Entries 1 to 50 of 1,\d{3}$/);
	const everything = await totalOf(page);

	await page.getByRole('searchbox', { name: 'Words in the entry' }).fill('saudi');
	await page.getByText('Tooth, root, method, country and other filters').click();
	await page.getByLabel('Method', { exact: true }).and(page.locator('select')).selectOption('CBCT');
	await page.getByRole('button', { name: 'Show' }).click();
	// The short address: no blanks, nothing usual.
	await expect(page).toHaveURL('/table?method=cbct&q=saudi');
	await expect(table(page).getByRole('cell', { name: 'Saudi Arabia' }).first()).toBeVisible();
	const found = await totalOf(page);
	expect(found).not.toBe(everything);

	await table(page).getByRole('link', { name: 'Total' }).click();
	await expect(table(page).locator('[aria-sort="ascending"]')).toHaveText(/^Total/);
	await table(page).getByRole('link', { name: /Total/ }).click();
	await expect(page).toHaveURL('/table?method=cbct&q=saudi&sort=-total');
	await expect(table(page).locator('[aria-sort="descending"]')).toHaveText(/^Total/);
	const totals = (await table(page).getByRole('row').locator('td:nth-child(4)').allInnerTexts()).map((text) =>
		Number(text.replace(/\D/g, ''))
	);
	expect(totals).toEqual([...totals].sort((a, b) => b - a));

	await page.getByText('Columns', { exact: true }).click();
	await page.getByLabel('Standing').uncheck();
	await page.getByLabel('Year').check();
	await page.getByLabel('Rows on a page').selectOption('25');
	await page.getByRole('button', { name: 'Show' }).click();
	await expect(page).toHaveURL(/column=year/);
	await expect(table(page).getByRole('columnheader', { name: 'Standing' })).toHaveCount(0);
	await expect(table(page).getByRole('columnheader', { name: 'Year' })).toBeVisible();
	const first = await rows(page);
	expect(first).toHaveLength(25);
	await page.getByRole('link', { name: 'Next' }).click();
	await expect(shown(page)).toHaveText(new RegExp(`^Entries 26 to \\d+ of ${found}$`));
	const bookmark = page.url();
	const second = await rows(page);
	await page.getByRole('link', { name: 'Previous' }).click();
	await expect(shown(page)).toHaveText(`Entries 1 to 25 of ${found}`);
	expect(await rows(page)).toEqual(first);
	await page.goBack();
	await expect(page).toHaveURL(bookmark);
	// The address changes before the rows that belong to it have come.
	await expect.poll(() => rows(page)).toEqual(second);
	await page.goBack();
	await expect.poll(() => rows(page)).toEqual(first);
	await page.goForward();
	await expect.poll(() => rows(page)).toEqual(second);

	// The download holds what the filters leave, whatever page is shown.
	const [download] = await Promise.all([
		page.waitForEvent('download'),
		page.getByRole('link', { name: 'CSV' }).click()
	]);
	expect(download.suggestedFilename()).toMatch(/^watersmeet-table-part-revision-\d+-\d{4}-\d\d-\d\d\.csv$/);
	const csv = readFileSync(await download.path(), 'utf8');
	expect(csv).toMatch(/^source_id,locator,tooth,root,/);
	expect(
		csv
			.split('\n')
			.slice(1, -1)
			.every((line) => line.includes(',cbct,'))
	).toBe(true);

	await table(page).getByRole('rowheader').first().getByRole('link').click();
	await expect(page.getByRole('heading', { level: 1 })).toHaveText(/^Entry \d+: /);
	await expect(page.getByRole('heading', { name: 'Revisions' })).toBeVisible();
	await page.getByRole('link', { name: 'Everything the table took from this source' }).click();
	await expect(page).toHaveURL(/\/sources\/[^#]+#entries$/);
	await page.context().grantPermissions(['clipboard-read', 'clipboard-write']);
	await page.getByRole('button', { name: 'Copy as RIS' }).click();
	await expect(page.getByText('Copied', { exact: true })).toBeVisible();
	expect(await page.evaluate(() => navigator.clipboard.readText())).toMatch(/^TY {2}- /);
	const [citation] = await Promise.all([
		page.waitForEvent('download'),
		page.getByRole('link', { name: 'Download BibTeX' }).click()
	]);
	expect(readFileSync(await citation.path(), 'utf8')).toMatch(/^@\w+\{/);
});

test('the table by keyboard: rows by arrow, Home and End, the order by Enter', async ({ page }) => {
	await open(page, '/table?tooth=maxillary-first-molar&limit=25');
	const links = table(page).getByRole('rowheader').getByRole('link');
	await links.first().focus();
	await page.keyboard.press('ArrowDown');
	await expect(links.nth(1)).toBeFocused();
	await page.keyboard.press('End');
	await expect(links.last()).toBeFocused();
	await page.keyboard.press('Home');
	await expect(links.first()).toBeFocused();
	const sort = table(page)
		.getByRole('link', { name: /^Source/ })
		.first();
	await sort.focus();
	await page.keyboard.press('Enter');
	await expect(page).toHaveURL(/sort=-author/);
	// The focus stays, so that the next key turns the order round again.
	await page.keyboard.press('Enter');
	await expect(page).not.toHaveURL(/sort=/);
});

test.describe('without JavaScript', () => {
	test.use({ javaScriptEnabled: false });

	test('the table and the sources are searched, filtered, sorted and paged all the same', async ({
		page
	}) => {
		await page.goto('/table');
		await page.getByRole('searchbox', { name: 'Words in the entry' }).fill('zzzz nothing');
		await page.getByRole('button', { name: 'Show' }).click();
		await expect(page).toHaveURL('/table?q=zzzz+nothing');
		await expect(page.getByText('No entry fits these filters.')).toBeVisible();
		await page.getByRole('link', { name: 'Clear the filters' }).first().click();
		await expect(page).toHaveURL('/table');
		await page.getByRole('link', { name: 'Next' }).click();
		await expect(shown(page)).toHaveText(/^Entries 51 to 100 of/);

		await page.goto('/table?tooth=16&root=MB&sort=colour');
		const tooth = page.getByLabel('Tooth', { exact: true });
		await expect(tooth).toHaveAttribute('aria-invalid', 'true');
		await expect(tooth).toHaveValue('16');
		await expect(page.locator('#tooth-error')).toHaveText('The table knows no tooth "16".');
		expect((await rows(page)).every((place) => place.endsWith(', MB'))).toBe(true);

		await page.goto('/sources');
		await page.getByRole('searchbox', { name: /Words in author/ }).fill('vertucci 1984');
		await page.getByLabel('Order').selectOption('Newest first');
		await page.getByRole('button', { name: 'Show' }).click();
		await expect(page).toHaveURL('/sources?q=vertucci+1984&sort=-year');
		await page.getByRole('link', { name: 'Root canal anatomy of the human permanent teeth' }).click();
		await expect(page.getByText(/^Vertucci FJ\. Root canal anatomy/)).toBeVisible();
		await expect(page.getByRole('link', { name: 'Download RIS' })).toBeVisible();
		await page.getByRole('link', { name: 'These entries in the table' }).click();
		await expect(page).toHaveURL('/table?source=vertucci-1984');
	});
});

test('the whole table is served with its revision, date and licence note', async ({ request }) => {
	const csv = await request.get('/api/v1/table.csv');
	expect(csv.headers()).toMatchObject({ 'content-type': expect.stringContaining('text/csv') });
	expect(Number(csv.headers()['x-table-revision'])).toBeGreaterThan(0);
	expect(csv.headers()['x-table-licence']).toMatch(/cite those sources/);
	const json = (await (await request.get('/api/v1/table.json')).json()) as {
		revision: number;
		rows: unknown[];
	};
	expect(json.rows.length).toBeGreaterThan(2000);
	for (const [ending, start] of [
		['bib', /^@/],
		['ris', /^TY {2}- /],
		['json', /^\[/]
	] as const)
		expect(await (await request.get(`/api/v1/sources.${ending}?q=vertucci`)).text()).toMatch(start);
});
