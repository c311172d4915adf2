import type { Page } from '@playwright/test';
import { scriptBytes } from '../support/pageScripts';
import { PAGES } from './support/places';
import { expect, open, test } from './support/test';

const TOOTH = '/teeth/maxillary-first-molar';
/** The budget of the design for the tooth page. */
const MOST_SCRIPT_BYTES = 120_000;

const field = (page: Page) => page.getByRole('combobox', { name: 'Look up' });
const options = (page: Page) => page.getByRole('listbox', { name: 'Suggestions' }).getByRole('option');

/** Pages in a PDF as Chromium writes it: each is an object of its own, outside any packed stream. */
const pagesIn = (pdf: Buffer) => [...pdf.toString('latin1').matchAll(/\/Type\s*\/Page(?![a-zA-Z])/g)].length;

/** One page of each kind: every one has its field in the head or, on the first, in the page. */
const KINDS = [
	'home',
	'tooth',
	'root',
	'join, answered',
	'source',
	'about',
	'api',
	'rows not placed'
] as const;

test('the field is under / and Ctrl+K on every kind of page', async ({ page }) => {
	for (const [at, name] of KINDS.entries()) {
		await page.goto(PAGES[name]);
		// The field says that it offers a list once its script runs.
		await expect(field(page), name).toBeVisible();
		await page.keyboard.press(at % 2 === 0 ? '/' : 'Control+k');
		await expect(field(page), name).toBeFocused();
	}
});

test('suggestions by keyboard: typed, chosen, taken, dismissed', async ({ page }) => {
	const asked: string[] = [];
	page.on('request', (request) => {
		if (request.url().includes('/api/v1/search')) asked.push(request.url());
	});
	await open(page, '/about');
	await page.keyboard.press('/');
	await page.keyboard.type('premolar');
	await expect(options(page).first()).toHaveText(/Upper first premolar/);
	expect(asked.length, 'one word typed in one go is not one request a letter').toBeLessThan(8);
	await expect(page.getByRole('group', { name: 'Teeth' }).getByRole('option')).toHaveCount(4);
	await expect(page.getByRole('group', { name: 'Sources' })).toBeVisible();
	await expect(field(page)).toHaveAttribute('aria-expanded', 'true');

	await page.keyboard.press('ArrowDown');
	await page.keyboard.press('ArrowDown');
	const active = await field(page).getAttribute('aria-activedescendant');
	await expect(page.locator(`[id="${active}"]`)).toHaveText(/Upper second premolar/);
	await expect(page.locator(`[id="${active}"]`)).toHaveAttribute('aria-selected', 'true');

	await page.keyboard.press('Escape');
	await expect(options(page)).toHaveCount(0);
	await expect(field(page)).toHaveValue('premolar');
	await page.keyboard.press('ArrowDown');
	await page.keyboard.press('ArrowDown');
	await page.keyboard.press('Enter');
	await expect(page).toHaveURL('/teeth/maxillary-second-premolar');

	// A feature leads to its own place on the page; a source to its page.
	await page.keyboard.press('/');
	await page.keyboard.type('c shaped');
	await expect(options(page).first()).toContainText('Lower second molar');
	await page.keyboard.press('ArrowDown');
	await page.keyboard.press('Enter');
	await expect(page).toHaveURL('/teeth/mandibular-second-molar#feature-c-shape');
	await expect(page.locator('#feature-c-shape')).toBeInViewport();
	await page.keyboard.press('/');
	await page.keyboard.type('vertucci 84');
	await options(page).first().click();
	await expect(page).toHaveURL('/sources/vertucci-1984');

	// Leaving the field closes the list: it never stays over the page.
	await page.keyboard.press('/');
	await page.keyboard.type('molar');
	await expect(options(page).first()).toBeVisible();
	await page.keyboard.press('Tab');
	await expect(options(page)).toHaveCount(0);
});

test('what was looked up is kept on the device, offered again, and forgotten when asked', async ({
	page,
	context
}) => {
	await open(page, '/about');
	await page.keyboard.press('/');
	await page.keyboard.type('37');
	await expect(options(page).first()).toHaveText(/Lower left second molar \(37\)/);
	await page.keyboard.press('ArrowDown');
	await page.keyboard.press('Enter');
	await expect(page).toHaveURL('/teeth/mandibular-second-molar');
	await page.keyboard.press('/');
	await expect(page.getByRole('group', { name: 'Looked up on this device' })).toContainText('(37)');
	await page.keyboard.press('Escape');
	await open(page, '/');
	const recent = page.getByRole('region', { name: 'Looked up on this device' });
	await expect(recent.getByRole('link')).toHaveText(['Lower left second molar (37)']);
	expect((await context.cookies()).map(({ value }) => value).join()).not.toContain('37');
	await recent.getByRole('button', { name: 'Forget these' }).click();
	await expect(recent).toHaveCount(0);
	await page.reload();
	await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
	expect(await page.evaluate(() => Object.keys(localStorage))).not.toContain('watersmeet.recent');
});

test('blocked storage changes nothing else', async ({ page }) => {
	await page.addInitScript(() => {
		Object.defineProperty(window, 'localStorage', {
			get: () => {
				throw new DOMException('blocked', 'SecurityError');
			}
		});
	});
	await open(page, '/');
	await page.keyboard.press('/');
	await page.keyboard.type('16');
	await expect(options(page).first()).toBeVisible();
	await page.keyboard.press('ArrowDown');
	await page.keyboard.press('Enter');
	await expect(page).toHaveURL(TOOTH);
});

test('a phrase that finds nothing is answered with phrases that do', async ({ page }) => {
	await open(page, '/?q=vertuxxx');
	await page.getByRole('link', { name: 'vertucci', exact: true }).click();
	await expect(
		page
			.getByRole('region', { name: /answer/ })
			.getByRole('link')
			.first()
	).toContainText('Vertucci');
	await open(page, '/?q=zzzz');
	await page
		.getByRole('region', { name: /Nothing here answers/ })
		.getByRole('link', { name: 'isthmus' })
		.click();
	await expect(page.getByRole('heading', { level: 3, name: 'Features' })).toBeVisible();
});

test.describe('without JavaScript', () => {
	test.use({ javaScriptEnabled: false });

	test('the form looks up, results come by kind, and nothing is shown that cannot work', async ({ page }) => {
		await page.goto('/');
		await expect(page.getByRole('listbox')).toHaveCount(0);
		await expect(page.getByText('Looked up on this device')).toHaveCount(0);
		await page.getByRole('searchbox').fill('brasil');
		await page.getByRole('button', { name: 'Look up' }).click();
		await expect(page).toHaveURL('/?q=brasil');
		await expect(page.getByRole('heading', { level: 3, name: 'Countries' })).toBeVisible();
		await expect(page.locator('a[href="/table?country=BRA"]')).toBeVisible();
		await page.goto(TOOTH);
		await expect(page.getByRole('button', { name: 'Print the one-page brief' })).toHaveCount(0);
		await expect(page.getByRole('region', { name: 'What to look for' })).toContainText(
			'expect a second canal'
		);
	});
});

test('probabilities follow the unit chosen, on the tooth page and in its drawings', async ({ page }) => {
	await page.goto(TOOTH);
	await expect(page.locator('main')).toContainText(/\d to \d+\s%/);
	await page.getByRole('combobox', { name: 'Probabilities' }).selectOption('in-100');
	await page.getByRole('group', { name: 'On this device' }).getByRole('button').click();
	await expect(page).toHaveURL(TOOTH);
	await expect(page.getByRole('combobox', { name: 'Probabilities' })).toHaveValue('in-100');
	for (const section of ['Roots', 'What to look for', 'Number of roots']) {
		const region = page.getByRole('region', { name: section, exact: true });
		await expect(region).toContainText(/in\s100/);
		const words = await region.evaluate((one) => [
			...[...one.querySelectorAll('p, li, td, th')].map((part) => part.textContent),
			...[...one.querySelectorAll('[aria-label]')].map((part) => part.getAttribute('aria-label'))
		]);
		expect(
			// "95 % interval" names the interval; it is no figure of a tooth.
			words.filter((text) => text?.replace(/95\s% interval/, '').includes('%')),
			section
		).toEqual([]);
	}
});

test('the brief of every tooth is one page of A4 and one of Letter', async ({ page, request }) => {
	// Thirty-two sheets are printed.
	test.slow();
	const { teeth } = (await (await request.get('/api/v1/teeth')).json()) as { teeth: { id: string }[] };
	expect(teeth).toHaveLength(16);
	const sheets: Record<string, number> = {};
	for (const { id } of teeth) {
		await page.goto(`/teeth/${id}`);
		for (const format of ['A4', 'Letter']) sheets[`${id}, ${format}`] = pagesIn(await page.pdf({ format }));
	}
	expect(Object.entries(sheets).filter(([, pages]) => pages !== 1)).toEqual([]);
	await page.emulateMedia({ media: 'print' });
	await expect(page.locator('.brief')).toContainText('Largest samples');
	await expect(page.locator('.brief')).toContainText('Every sample with its source and place');
	await expect(page.getByRole('heading', { level: 1 })).toBeHidden();
	// The count is no accident of the reading: a page that is long on paper counts as several.
	await page.goto('/how');
	expect(pagesIn(await page.pdf({ format: 'A4' }))).toBeGreaterThan(1);
});

test('the pages fit 320 px and 200 % zoom without scrolling sideways', async ({ browser, baseURL }) => {
	for (const viewport of [
		{ width: 320, height: 640 },
		{ width: 640, height: 450 }
	]) {
		const context = await browser.newContext({ baseURL, viewport, deviceScaleFactor: 2 });
		const page = await context.newPage();
		for (const address of ['/', '/?q=isthmus', '/?q=zzzz', TOOTH, '/teeth/mandibular-second-molar']) {
			await page.goto(address);
			const over = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
			expect(over, `${address} at ${viewport.width}`).toBeLessThanOrEqual(0);
		}
		await open(page, '/about');
		await page.keyboard.press('/');
		await page.keyboard.type('isthmus');
		await expect(options(page).first()).toBeInViewport();
		expect(
			await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth)
		).toBeLessThanOrEqual(0);
		await context.close();
	}
});

test('the tooth page asks for no more scripts than its budget', async ({ page, baseURL }) => {
	const bytes = await scriptBytes(baseURL!, TOOTH);
	expect(bytes).toBeLessThanOrEqual(MOST_SCRIPT_BYTES);
	// What the browser does ask for is what was measured: no script is fetched late.
	const asked = new Set<string>();
	page.on('request', (one) => {
		if (one.resourceType() === 'script') asked.add(one.url());
	});
	await open(page, TOOTH);
	expect(asked.size).toBeGreaterThan(2);
});
