import { AxeBuilder } from '@axe-core/playwright';
import type { Page } from '@playwright/test';
import { PAGES } from './support/places';
import { expect, test } from './support/test';

const TAGS = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'];
const WIDTHS_PX = [390, 1440];
const NARROWEST_PX = 320;

/** The page on which one of the nine questions, which are built alike, is opened: its table takes axe a minute. */
const WITH_QUESTION = 'root';
const PATIENCE_MS = 400_000;

/** Opens what is folded away, which has to pass too. */
const unfold = (page: Page, question: boolean) =>
	page.evaluate((withQuestion) => {
		const folded = `details:not([id^="q"])${withQuestion ? ', details#q1' : ''}`;
		document.querySelectorAll<HTMLDetailsElement>(folded).forEach((details) => (details.open = true));
	}, question);

/** What sticks out of a page to the right, if anything makes it wider than the window. */
const overflowing = (page: Page) =>
	page.evaluate((width) => {
		if (document.documentElement.scrollWidth <= width) return [];
		return [...document.querySelectorAll('body *')]
			.filter((one) => one.getBoundingClientRect().right > width + 1)
			.slice(0, 8)
			.map(
				(one) =>
					`${one.tagName} ${one.className.toString().slice(0, 60)} ${one.textContent?.trim().slice(0, 40)}`
			);
	}, NARROWEST_PX);

// A page that is not there is answered with 404, which the console reports.
test.use({ expectedMessages: [/status of 404/] });

for (const [name, address] of Object.entries(PAGES)) {
	// Few visits: loading and unfolding a page takes as long as looking it over.
	test(`${name}: axe finds nothing, in light and dark, at 390 and 1440 px; nothing overflows at 320 px`, async ({
		page
	}) => {
		test.setTimeout(PATIENCE_MS);
		for (const colorScheme of ['light', 'dark'] as const) {
			await page.emulateMedia({ colorScheme, reducedMotion: 'reduce' });
			await page.setViewportSize({ width: NARROWEST_PX, height: 900 });
			await page.goto(address);
			await unfold(page, name === WITH_QUESTION);
			expect(await overflowing(page), `${address} at ${NARROWEST_PX} px`).toEqual([]);
			for (const width of WIDTHS_PX) {
				await page.setViewportSize({ width, height: 900 });
				const { violations, passes } = await new AxeBuilder({ page }).withTags(TAGS).analyze();
				const found = violations.map(
					({ id, nodes }) =>
						`${id}: ${nodes.map(({ html, failureSummary }) => `${html} ${failureSummary}`).join('\n')}`
				);
				expect(found, `${address} at ${width} px, ${colorScheme}`).toEqual([]);
				expect(passes.length).toBeGreaterThan(10);
			}
		}
	});
}

test('every control is at least 44 px high on a phone, or is a link in running text', async ({ page }) => {
	await page.setViewportSize({ width: 390, height: 900 });
	for (const address of [PAGES.home, PAGES.root, PAGES['join, three canals']]) {
		await page.goto(address);
		const small = await page.evaluate(() =>
			[
				...document.querySelectorAll(
					'button, select, input:not([type=radio], [type=checkbox], [type=hidden]), label:has(input), a.button, a.button-quiet, summary'
				)
			]
				.filter((one) => one.getClientRects().length > 0 && one.getBoundingClientRect().height < 43.5)
				.map(
					(one) =>
						`${one.tagName} ${one.textContent?.trim().slice(0, 40)} ${one.getBoundingClientRect().height}`
				)
		);
		expect(small, address).toEqual([]);
	}
});
