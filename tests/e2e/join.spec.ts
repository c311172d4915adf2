import type { Locator, Page } from '@playwright/test';
import { JOIN } from './support/places';
import { expect, open, tabTo, test } from './support/test';

const TWO = `${JOIN}?canals=2`;
const THREE_FOUND = `${TWO}&search=microscope&draw=positive&cone-mark=positive&two-files=negative`;
/** With more pages a print is no summary any more. */
const MOST_PAGES = 2;

const groupOf = (page: Page, test: string) => page.getByRole('group', { name: test });
const choice = (page: Page, test: string, result: RegExp) =>
	groupOf(page, test).getByRole('radio', { name: result });
const answerOf = (page: Page) => page.getByRole('region', { name: 'How probable it is' });
const account = (page: Page) => page.getByRole('region', { name: 'The account, step by step' });
const query = (page: Page) => new URL(page.url()).search;
const plain = (text: string) => text.replace(/[\s\u00a0]+/g, ' ');

/** The figures of the answer as the page prints them. */
async function figures(page: Page): Promise<string> {
	await expect(answerOf(page)).toBeVisible();
	return plain(await answerOf(page).innerText());
}

/** The tests of the account in its order. */
const order = (page: Page) =>
	account(page)
		.getByText(/^\d\. /)
		.allInnerTexts();

test('findings are entered, ordered, removed, undone and redone, and the address shares them', async ({
	page,
	browser,
	baseURL
}) => {
	await page.emulateMedia({ reducedMotion: 'no-preference' });
	await open(page, TWO);
	const first = await figures(page);
	const strength = () =>
		page
			.getByRole('img', { name: /^Canal sequences still possible/ })
			.last()
			.locator('g[stroke-opacity]')
			.first();
	const before = Number(await strength().getAttribute('stroke-opacity'));
	const [undo, redo] = ['Undo', 'Redo'].map((name) => page.getByRole('button', { name }).first());
	await expect(undo).toHaveAttribute('aria-disabled', 'true');

	await choice(page, 'Draw test', /^Positive/).check();
	await expect(page).toHaveURL(`${TWO}&draw=positive`);
	const second = await figures(page);
	expect(second).not.toBe(first);
	await expect(page.getByRole('main').getByRole('status').first()).toContainText('Meet and share one exit');
	// A finding fades the sequences it speaks against: the first drawn is two separate canals.
	expect(Number(await strength().getAttribute('stroke-opacity'))).toBeLessThan(before);

	// The most telling of the next tests, entered by its own button.
	const next = page.getByRole('region', { name: 'What would settle it' });
	await next.getByRole('button', { name: /^Positive: a groove/ }).click();
	await expect(page).toHaveURL(`${TWO}&draw=positive&cone-mark=positive`);
	await expect(choice(page, 'Cone mark', /^Positive/)).toBeChecked();
	expect(await order(page)).toEqual(['1. Draw test: positive', '2. Cone mark: positive']);
	const third = await figures(page);

	await page.getByRole('button', { name: 'Move up: cone mark' }).click();
	await expect(page).toHaveURL(`${TWO}&cone-mark=positive&draw=positive`);
	await expect(page.getByRole('button', { name: 'Move up: cone mark' })).toBeFocused();
	expect(await order(page)).toEqual(['1. Cone mark: positive', '2. Draw test: positive']);
	expect(await figures(page)).toBe(third);

	await page.getByRole('button', { name: 'Remove: cone mark' }).click();
	await expect(page).toHaveURL(`${TWO}&draw=positive`);
	await expect(choice(page, 'Cone mark', /^Not done/)).toBeChecked();
	await expect(page.getByRole('button', { name: 'Remove: draw test' })).toBeFocused();

	await undo.click();
	await expect(page).toHaveURL(`${TWO}&cone-mark=positive&draw=positive`);
	await expect(undo).toBeFocused();
	await expect(choice(page, 'Cone mark', /^Positive/)).toBeChecked();
	await page.goBack();
	await expect(page).toHaveURL(`${TWO}&draw=positive&cone-mark=positive`);
	await redo.click();
	await page.goForward();
	await expect(page).toHaveURL(`${TWO}&draw=positive`);
	await expect(redo).toHaveAttribute('aria-disabled', 'true');
	expect(await figures(page)).toBe(second);

	const context = await browser.newContext({ baseURL });
	const other = await context.newPage();
	await other.goto(page.url());
	expect(await figures(other)).toBe(second);
	await context.close();
});

test('with the keyboard only the focus is never lost, and nothing covers it', async ({ page }) => {
	await page.setViewportSize({ width: 390, height: 844 });
	await open(page, THREE_FOUND);
	const bar = page.getByRole('complementary', { name: 'The answer in short' });
	const advice = () => bar.locator('p').first().innerText();
	const said = await advice();
	expect(said).not.toBe('');

	// What is focused stays clear of the bar, all the way down the page.
	let seen = 0;
	for (let presses = 0; presses < 80; presses++) {
		await page.keyboard.press('Tab');
		const covered = await page.evaluate(() => {
			const focused = document.activeElement!;
			const over = document.querySelector('[data-answer-bar]')!;
			if (over.contains(focused) || focused === document.body) return null;
			const { top, bottom, height } = focused.getBoundingClientRect();
			const bar = over.getBoundingClientRect();
			return height < bar.top && bottom > bar.top + 1 && top < bar.bottom ? focused.outerHTML : '';
		});
		if (covered === null) continue;
		seen += 1;
		expect(covered).toBe('');
	}
	expect(seen).toBeGreaterThan(20);

	const remove = page.getByRole('button', { name: 'Remove: cone mark' });
	await remove.focus();
	await page.keyboard.press('Enter');
	await expect(page).toHaveURL(`${TWO}&search=microscope&draw=positive&two-files=negative`);
	await expect(page.getByRole('button', { name: 'Remove: two files together' })).toBeFocused();
	expect(await order(page)).toEqual(['1. Draw test: positive', '2. Two files together: negative']);
	await page.keyboard.press('Control+z');
	await expect(page).toHaveURL(THREE_FOUND);
	await expect(page.getByRole('button', { name: 'Remove: two files together' })).toBeFocused();
	expect(await advice()).toBe(said);
	await page.keyboard.press('Control+Shift+Z');
	await expect(page).toHaveURL(`${TWO}&search=microscope&draw=positive&two-files=negative`);

	await choice(page, 'Two files together', /^Negative/).focus();
	await page.keyboard.press('ArrowUp');
	await expect(page).toHaveURL(`${TWO}&search=microscope&draw=positive&two-files=positive`);
	await expect(choice(page, 'Two files together', /^Positive/)).toBeFocused();

	// The last finding gone, the focus goes to what is still there.
	await page.getByRole('button', { name: 'Remove: two files together' }).press('Enter');
	await page.getByRole('button', { name: 'Remove: draw test' }).press('Enter');
	await expect(account(page)).toHaveCount(0);
	await expect(page.getByRole('heading', { name: 'Tests of whether two canals join' })).toBeFocused();

	// A box of text keeps its own undo.
	const box = page.getByLabel('First canal');
	await tabTo(page, box);
	await page.keyboard.type('20.5');
	await page.keyboard.press('Control+z');
	await expect(page).toHaveURL(`${TWO}&search=microscope`);
});

test('two quick choices are both kept', async ({ page }) => {
	await open(page, TWO);
	await page.evaluate(() => {
		for (const name of ['cone-mark', 'draw'])
			document.querySelector<HTMLInputElement>(`input[name="${name}"][value="positive"]`)?.click();
	});
	await expect(page).toHaveURL(/cone-mark=positive&draw=positive/);
	await expect(choice(page, 'Cone mark', /^Positive/)).toBeChecked();
	await expect(choice(page, 'Draw test', /^Positive/)).toBeChecked();
});

test('with three canals the pair is asked for where it is missing, and nothing is lost', async ({ page }) => {
	await open(page, `${JOIN}?canals=3`);
	const enter = page.getByRole('button', { name: /^Positive: a groove/ });
	await enter.click();
	await expect(groupOf(page, 'Cone mark').getByRole('alert')).toContainText('name the two');
	await expect(choice(page, 'Cone mark', /^Positive/)).toBeChecked();
	const pair = groupOf(page, 'Cone mark').getByLabel('Which two canals');
	await expect(pair).toBeFocused();
	await pair.selectOption({ index: 1 });
	await expect(account(page)).toContainText('1. Cone mark: positive (MB1-MB2)');
	await expect(page.getByRole('alert')).toHaveCount(0);
});

test('the decision line: the address wins over the device, the device over the usual', async ({ page }) => {
	await open(page, THREE_FOUND);
	const usual = await figures(page);
	expect(usual).toContain('The line is at 90 % for a shared exit, the usual one.');
	const shares = (text: string) => text.match(/Meet and share one exit [^)]*\)/)?.[0];

	await page.getByLabel('Treat as joined from').last().selectOption('0.95');
	await page.getByRole('button', { name: 'Keep' }).click();
	await expect(answerOf(page)).toContainText('as kept on this device');
	await expect(page).toHaveURL(THREE_FOUND);
	expect(await figures(page)).toContain('The line is at 95 %');

	const slider = page.getByRole('slider');
	await slider.focus();
	for (let presses = 0; presses < 3; presses++) await page.keyboard.press('ArrowLeft');
	await expect(page).toHaveURL(
		`${TWO}&search=microscope&threshold=0.92${THREE_FOUND.split('microscope')[1]}`
	);
	await expect(slider).toBeFocused();
	const set = await figures(page);
	expect(set).toContain('The line is at 92 % for a shared exit, as set here.');
	expect(shares(set)).toBe(shares(usual));
	// Moved in small steps, undone at once.
	await page.keyboard.press('Control+z');
	await expect(answerOf(page)).toContainText('as kept on this device');

	const box = page.getByRole('spinbutton');
	await box.fill('50');
	await box.press('Enter');
	await expect(answerOf(page)).toContainText('The line is at 50 %');
	await expect(page).toHaveURL(/threshold=0\.5/);
	await page.goto(`${THREE_FOUND}&threshold=0.3`);
	await expect(page.getByText('Give a percentage from 50 to 99.')).toBeVisible();
});

test('the text for the record says what the screen says and is copied whole', async ({ page, context }) => {
	await context.grantPermissions(['clipboard-read', 'clipboard-write']);
	await open(page, `${THREE_FOUND}&wl1=20.5&wl2=19.5&mark=3`);
	await page.getByText('As text for the record').click();
	const text = await page.getByLabel('Text for the record').inputValue();
	await page.getByRole('button', { name: 'Copy the text' }).click();
	await expect(page.getByText('Copied.')).toBeVisible();
	expect(await page.evaluate(() => navigator.clipboard.readText())).toBe(text);

	const screen = await figures(page);
	for (const [, fate, share] of text.matchAll(/^- (.+): (\S+(?: 1| 99)? % \(.+\))$/gm))
		expect(screen).toMatch(new RegExp(`${fate} [a-z0-9 ]+, ${share.replace(/[()]/g, '\\$&')}`));
	expect(text.match(/^- .* % \(/gm)).toHaveLength(4);
	expect(text).toMatch(
		/1\. Draw test: positive[^]*2\. Cone mark: positive[^]*3\. Two files together: negative/
	);
	const head = await answerOf(page).locator('p').first().innerText();
	expect(text).toContain(`Advice: ${head}.`);
	const level = await page
		.locator('#level')
		.getByText(/above the common end \(/)
		.innerText();
	expect(text).toContain(plain(level));
	expect(text).toContain(page.url());
	expect(text).toMatch(/^\d{4}-\d\d-\d\d \(UTC\), table revision \d+$/m);

	// One or two tidy pages.
	for (const format of ['A4', 'Letter']) {
		const pdf = (await page.pdf({ format })).toString('latin1');
		const pages = pdf.match(/\/Type\s*\/Page\b(?!s)/g)?.length ?? 0;
		expect(pages, format).toBeGreaterThan(0);
		expect(pages, format).toBeLessThanOrEqual(MOST_PAGES);
	}
});

test('bars and streams move, and do not where motion is to be reduced', async ({ page }) => {
	await open(page, THREE_FOUND);
	const durations = (of: Locator) => of.evaluate((one) => getComputedStyle(one).transitionDuration);
	const bar = answerOf(page).locator('rect.stroke-river').first();
	const stream = answerOf(page).locator('g[stroke-opacity]').first();
	for (const moving of [bar, stream]) expect(await durations(moving)).toBe('0.3s');
	await page.emulateMedia({ reducedMotion: 'reduce' });
	for (const moving of [bar, stream]) expect(parseFloat(await durations(moving))).toBeLessThan(0.001);
});

test('the advice and every fate are in sight after each finding, and nothing overflows at 320 px', async ({
	page
}) => {
	for (const [width, height] of [
		[1440, 900],
		[390, 844],
		[320, 640]
	]) {
		await page.setViewportSize({ width, height });
		await open(page, TWO);
		for (const name of ['Cone mark', 'CBCT reading']) {
			await choice(page, name, /^Positive/).check();
			await expect(account(page)).toContainText(name);
			await choice(page, name, /^Positive/).scrollIntoViewIfNeeded();
			const summary =
				width < 1024 ? page.getByRole('complementary', { name: 'The answer in short' }) : answerOf(page);
			await expect(summary.locator('p').first()).toBeInViewport({ ratio: 1 });
			for (const fate of await summary.getByRole('listitem').all())
				await expect(fate).toBeInViewport({ ratio: 1 });
			expect(await summary.getByRole('listitem').count()).toBe(4);
		}
		expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(width);
	}
});

test.describe('without JavaScript', () => {
	test.use({ javaScriptEnabled: false });

	test('findings are entered, ordered and removed by plain forms that keep what was not sent yet', async ({
		page
	}) => {
		await page.goto(`${TWO}&two-files=negative`);
		await choice(page, 'Draw test', /^Positive/).check();
		await choice(page, 'CBCT reading', /^Negative/).check();
		await page.getByRole('spinbutton').fill('80');
		await page.getByRole('button', { name: 'Work it out' }).click();
		// The new ones follow, though the form sends its fields in the order of the page.
		expect(query(page)).toBe(
			'?canals=2&threshold=0.8&two-files=negative&draw=positive&cbct-reading=negative'
		);
		await expect(answerOf(page)).toContainText('The line is at 80 % for a shared exit, as set here.');

		await choice(page, 'Cone mark', /^Positive/).check();
		await page.getByRole('button', { name: 'Move up: draw test' }).click();
		expect(query(page)).toBe(
			'?canals=2&threshold=0.8&draw=positive&two-files=negative&cbct-reading=negative&cone-mark=positive'
		);
		await page.getByRole('button', { name: 'Remove: cbct reading' }).click();
		await page.getByRole('button', { name: /^Negative: no contact/ }).click();
		expect(query(page)).toBe(
			'?canals=2&threshold=0.8&draw=positive&two-files=negative&cone-mark=positive&file-contact=negative'
		);
		await expect.poll(() => order(page)).toHaveLength(4);
		await page.getByText('As text for the record').click();
		await expect(page.getByLabel('Text for the record')).toHaveValue(/1\. Draw test: positive/);
		await expect(page.getByRole('button', { name: 'Copy the text' })).toHaveCount(0);
		await page.goBack();
		expect(query(page)).toBe('?canals=2&threshold=0.8&draw=positive&two-files=negative&cone-mark=positive');
	});
});
