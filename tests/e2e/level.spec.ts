import { AxeBuilder } from '@axe-core/playwright';
import { JOIN } from './support/places';
import { expect, open, test } from './support/test';

const TWO = `${JOIN}?canals=2&search=microscope`;
const JOINED = `${TWO}&draw=positive&cone-mark=positive&two-files=positive&cbct-reading=positive`;
/** The worked example of the design: mark 3.0 mm from the tip of a cone at full length, 25/.06, shaped to full length. */
const EXAMPLE = 'wl1=20.5&wl2=19.5&mark=3&shapedTo=full&tip=25&taper=.06&coneTip=25&coneTaper=.06';
const plain = (text: string) => text.replaceAll('\u00a0', ' ');

test('the level is worked out from what is typed, findings kept in their order', async ({ page }) => {
	await open(page, JOINED);
	const form = page.getByRole('form', { name: 'Where do they join?' });
	await form.getByLabel('First canal').fill('20.5');
	await form.getByLabel('Second canal').fill('19,5');
	await form.getByLabel('Mark on the cone, from its tip').fill('3');
	await form.getByLabel('To its full working length').check();
	await form.getByLabel('Preparation, ISO size').fill('25');
	await form.getByLabel('Its taper').first().fill('6 %');
	await form.getByLabel('Cone, ISO size').fill('25');
	await form.getByLabel('Its taper').last().fill('.06');
	await form.getByRole('button', { name: 'Work out the level' }).click();

	const result = page.getByRole('region', { name: 'The level', exact: true });
	await expect(result).toBeVisible();
	const said = plain((await result.textContent()) ?? '');
	expect(said).toContain('3 mm above the common end (2 to 4 mm)');
	expect(said).toContain('16.5 mm (15.5 to 17.5 mm)');
	expect(said).toContain('It will look short: that is right.');
	expect(said).toContain('Cut 3 mm off its tip');
	const query = new URL(page.url()).searchParams;
	expect([...query.keys()].filter((name) => /draw|cone-mark|two-files|cbct-reading/.test(name))).toEqual([
		'draw',
		'cone-mark',
		'two-files',
		'cbct-reading'
	]);
	await expect(form.getByLabel('Second canal')).toHaveValue('19,5');

	await page.goBack();
	await expect(result).toBeHidden();
});

test('a new finding keeps the level, and what is typed but not yet sent', async ({ page }) => {
	await open(page, `${TWO}&${EXAMPLE}`);
	const form = page.getByRole('form', { name: 'Where do they join?' });
	await form.getByLabel('Level on the CBCT').fill('2.8');
	await form.getByLabel('Only to the confluence').check();
	await page.getByRole('group', { name: 'Draw test' }).getByLabel('Positive').check();
	await expect(page).toHaveURL(/draw=positive/);
	await expect(page).toHaveURL(/wl1=20\.5/);
	await expect(form.getByLabel('Level on the CBCT')).toHaveValue('2.8');
	await expect(form.getByLabel('Only to the confluence')).toBeChecked();
});

test('measurements that contradict each other are said to', async ({ page }) => {
	await open(page, `${JOINED}&${EXAMPLE}&shortfall=1.2`);
	const section = page.locator('#level');
	await expect(section.getByText('contradict each other (p = 0.036)')).toBeVisible();
	await expect(section.getByText('assumed, not published')).toHaveCount(2);
});

test('a length is never given without its condition unless the canals are treated as joined', async ({
	page
}) => {
	await open(page, `${TWO}&cone-mark=negative&two-files=negative&${EXAMPLE}`);
	const section = page.locator('#level');
	await expect(section.getByText('Only if they share one exit:')).toBeVisible();
	await open(page, `${JOINED}&${EXAMPLE}`);
	await expect(page.locator('#level').getByText(/only if they share one exit/i)).toHaveCount(0);
});

test('one canal has no level, and does not lose what was typed', async ({ page }) => {
	await open(page, `${TWO}&${EXAMPLE}`);
	await page.getByRole('radio', { name: 'One', exact: true }).check();
	await expect(page.locator('#level')).toHaveCount(0);
	await page.getByRole('radio', { name: /^Two/ }).check();
	await expect(page.locator('#level').getByLabel('First canal')).toHaveValue('20.5');
});

test('the section passes axe, refused and answered, at 390 and 1440 px', async ({ page }) => {
	for (const address of [`${JOINED}&${EXAMPLE}&shortfall=1.2`, `${TWO}&wl1=20.5&mark=25&tip=0.25`]) {
		for (const width of [390, 1440]) {
			await page.setViewportSize({ width, height: 900 });
			await page.goto(address);
			const { violations, passes } = await new AxeBuilder({ page }).include('#level').analyze();
			expect(violations.map(({ id, nodes }) => `${id}: ${nodes[0].html}`)).toEqual([]);
			expect(passes.length).toBeGreaterThan(5);
		}
	}
});

test.describe('without JavaScript', () => {
	test.use({ javaScriptEnabled: false });

	test('the form works, keeps the findings and shows errors at their fields', async ({ page }) => {
		await page.goto(JOINED);
		const form = page.getByRole('form', { name: 'Where do they join?' });
		await form.getByLabel('First canal').fill('20.5');
		await form.getByLabel('Mark on the cone, from its tip').fill('3');
		await form.getByRole('button', { name: 'Work out the level' }).click();
		await expect(form.getByLabel('Second canal')).toHaveAccessibleDescription(
			'Give the working length of the second canal in mm.'
		);
		await expect(form.getByLabel('First canal')).toHaveValue('20.5');

		await form.getByLabel('Second canal').fill('19.5');
		await form.getByRole('button', { name: 'Work out the level' }).click();
		await expect(page.getByRole('region', { name: 'The level', exact: true })).toContainText(
			'above the common end'
		);
		await expect(page).toHaveURL(/#level$/);
		await expect(page.getByRole('group', { name: 'Cone mark' }).getByLabel('Positive')).toBeChecked();
	});
});
