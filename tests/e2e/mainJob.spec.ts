import type { Page } from '@playwright/test';
import { JOIN, ROOT } from './support/places';
import { expect, open, tabTo, test } from './support/test';

const TOOTH = '/teeth/maxillary-first-molar';

/** The figures of the answer as the page prints them. */
async function figures(page: Page): Promise<string> {
	const panel = page.getByRole('region', { name: 'How probable it is' });
	await expect(panel).toBeVisible();
	return (await panel.innerText()).replace(/\s+/g, ' ');
}

const answerOf = (page: Page, test: string) => page.getByRole('group', { name: test });

test.describe('the main job', () => {
	test('with the mouse: tooth, root, samples, source, findings, probability', async ({ page }) => {
		await open(page, '/');
		await page.getByRole('link', { name: /^16, upper right first molar/ }).click();
		await expect(page).toHaveURL(TOOTH);
		await expect(page.getByRole('heading', { level: 1 })).toHaveText('Upper first molar');

		await page.getByRole('link', { name: 'Mesiobuccal root', exact: true }).click();
		await expect(page).toHaveURL(ROOT);
		await expect(page.getByText(/More than one canal:/)).toContainText(/about \d+ in 10/);

		const question = page.locator('#q1');
		await question.locator('summary').click();
		await expect(question.getByRole('row').nth(1)).toBeVisible();
		const rows = await question.getByRole('table').first().getByRole('row').count();
		expect(rows).toBeGreaterThan(20);
		await question.getByRole('link').first().click();
		await expect(page).toHaveURL(/\/sources\//);
		await expect(page.getByRole('heading', { name: 'What the table took from it' })).toBeVisible();
		await page.goBack();
		await expect(page).toHaveURL(ROOT);

		await page.getByRole('link', { name: /Two canals found/ }).click();
		await expect(page).toHaveURL(JOIN);
		await page.getByRole('radio', { name: /^Two/ }).check();
		await expect(page).toHaveURL(`${JOIN}?canals=2`);
		const before = await figures(page);
		await page.getByLabel('How the root was searched for more').selectOption('microscope');
		await expect(page).toHaveURL(/search=microscope/);
		await answerOf(page, 'Cone mark')
			.getByRole('radio', { name: /^Positive/ })
			.check();
		await expect(page).toHaveURL(`${JOIN}?canals=2&search=microscope&cone-mark=positive`);
		await expect(page.getByRole('region', { name: 'The account, step by step' })).toContainText(
			'Cone mark: positive'
		);
		expect(await figures(page)).not.toBe(before);
		await expect(page.getByRole('region', { name: 'What would settle it' })).toBeVisible();
	});

	test('with the keyboard only', async ({ page }) => {
		await open(page, '/about');
		await page.keyboard.press('/');
		await expect(page.getByRole('combobox', { name: 'Look up' })).toBeFocused();
		await page.keyboard.type('16');
		await page.keyboard.press('Enter');
		await expect(page).toHaveURL(TOOTH);

		await tabTo(page, page.getByRole('link', { name: 'Mesiobuccal root', exact: true }));
		await page.keyboard.press('Enter');
		await expect(page).toHaveURL(ROOT);

		const summary = page.locator('#q1 > summary');
		await tabTo(page, summary);
		await page.keyboard.press('Space');
		await expect(page.locator('#q1')).toHaveAttribute('open', '');
		const source = page.locator('#q1').getByRole('link').first();
		await tabTo(page, source);
		await page.keyboard.press('Enter');
		await expect(page).toHaveURL(/\/sources\//);
		await page.goBack();
		await expect(page).toHaveURL(ROOT);

		await tabTo(page, page.getByRole('link', { name: /Two canals found/ }));
		await page.keyboard.press('Enter');
		await expect(page).toHaveURL(JOIN);

		await tabTo(page, page.getByRole('radio', { name: /^One/ }));
		await page.keyboard.press('ArrowRight');
		await expect(page).toHaveURL(`${JOIN}?canals=2`);
		await figures(page);

		// The chosen field keeps the focus while the answer changes.
		await expect(page.getByRole('radio', { name: /^Two/ })).toBeFocused();
		await tabTo(page, page.getByLabel('How the root was searched for more'));
		await page.keyboard.type('Loupes');
		await expect(page).toHaveURL(/search=loupes/);
		await tabTo(page, answerOf(page, 'Cone mark').getByRole('radio', { name: 'Not done' }));
		await page.keyboard.press('ArrowDown');
		await expect(page).toHaveURL(`${JOIN}?canals=2&search=loupes&cone-mark=positive`);
		await expect(page.getByRole('region', { name: 'The account, step by step' })).toContainText(
			'Cone mark: positive'
		);
	});

	test.describe('without JavaScript', () => {
		test.use({ javaScriptEnabled: false });

		test('every step is a page of its own', async ({ page }) => {
			await page.goto('/');
			await page.getByRole('searchbox').fill('upper first molar');
			await page.getByRole('button', { name: 'Look up' }).click();
			await expect(page).toHaveURL(TOOTH);
			await page.getByRole('link', { name: 'Mesiobuccal root', exact: true }).click();
			await expect(page).toHaveURL(ROOT);
			await page.locator('#q1 > summary').click();
			await page.locator('#q1').getByRole('link').first().click();
			await expect(page).toHaveURL(/\/sources\//);
			await page.goto(ROOT);
			await page.getByRole('link', { name: /Two canals found/ }).click();
			await page.getByRole('radio', { name: /^Two/ }).check();
			await page.getByLabel('How the root was searched for more').selectOption('microscope');
			await answerOf(page, 'Cone mark')
				.getByRole('radio', { name: /^Positive/ })
				.check();
			await page.getByRole('button', { name: 'Work it out' }).click();
			const asked = new URL(page.url()).searchParams;
			expect(asked.get('canals')).toBe('2');
			expect(asked.get('cone-mark')).toBe('positive');
			await expect(page.getByRole('region', { name: 'The account, step by step' })).toContainText(
				'Cone mark: positive'
			);
			await expect(page.getByRole('radio', { name: /^Two/ })).toBeChecked();

			// Fields left blank say the same as fields left out.
			const plain = await figures(page);
			await page.goto(`${JOIN}?canals=2&search=microscope&cone-mark=positive`);
			expect(await figures(page)).toBe(plain);
		});

		test('filters narrow the samples, and a wrong one is named at its field', async ({ page }) => {
			await page.goto(ROOT);
			const all = await page.getByText(/^From \d/).innerText();
			await page.getByText('Narrow the samples').click();
			await page.getByRole('checkbox', { name: 'CBCT' }).check();
			await page.locator('input[name=minTotal]').fill('200');
			await page.getByRole('button', { name: 'Narrow', exact: true }).click();
			await expect(page).toHaveURL(/method=cbct/);
			expect(await page.getByText(/^From \d/).innerText()).not.toBe(all);
			await page.goto(`${ROOT}?yearFrom=abc`);
			await expect(page.getByRole('alert')).toContainText('Give a year');
			await expect(page.locator('input.field[name=yearFrom]')).toHaveValue('abc');
			await expect(page.locator('input.field[name=yearFrom]')).toHaveAttribute('aria-invalid', 'true');
		});
	});
});

test.describe('one typed phrase finds the place', () => {
	for (const [phrase, address] of [
		['16', TOOTH],
		['#3', TOOTH],
		['UR6', TOOTH],
		['upper right first molar', TOOTH],
		['mb2', ROOT]
	]) {
		test(`"${phrase}"`, async ({ page }) => {
			await open(page, '/');
			await page.getByRole('combobox', { name: 'Look up' }).fill(phrase);
			await page.keyboard.press('Enter');
			await page.waitForURL((url) => url.pathname !== '/' || url.searchParams.get('q') === phrase);
			if (new URL(page.url()).pathname === '/')
				await page.locator(`section a[href="${address}"]`).first().click();
			await expect(page).toHaveURL(address);
			await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
		});
	}
});
