import { readFile } from 'node:fs/promises';
import type { Locator, Page } from '@playwright/test';
import { parse } from 'csv-parse/sync';
import { COMPARE, ROOT } from './support/places';
import { expect, open, test } from './support/test';

const expectation = (page: Page) => page.getByRole('region', { name: 'What to expect' });
const entryOf = (page: Page, sequence: string) =>
	expectation(page)
		.locator('figcaption li')
		.filter({ has: page.getByText(sequence, { exact: true }) })
		.locator('a');

/** The stroke opacity of every sequence's stream, in the order of the list. */
const opacities = (page: Page) =>
	expectation(page)
		.locator('figure svg[role=img] > g[stroke-width="7"]')
		.evaluateAll((groups) => groups.map((group) => Number(group.getAttribute('stroke-opacity'))));

/** How many streams are drawn in full; the others are then faded. */
const alone = async (page: Page) => {
	const all = await opacities(page);
	return all.filter((opacity) => opacity === 1).length === 1 && all.every((o) => o === 1 || o <= 0.04);
};

/** The column of a question's plot in the order of its rows. */
const column = (question: Locator, place: number) =>
	question
		.locator('tbody tr:has(td)')
		.evaluateAll(
			(rows, at) => rows.map((row) => row.children[at].textContent?.replace(/\s+/g, ' ').trim() ?? ''),
			place
		);

test('one sequence alone: by hover, by focus, by choice, from the address, and back', async ({ page }) => {
	await open(page, `${ROOT}?minTotal=20`);
	const together = await opacities(page);
	expect(together.filter((opacity) => opacity > 0.04).length).toBeGreaterThan(2);

	await entryOf(page, '2-1').hover();
	await expect.poll(() => alone(page)).toBe(true);
	await page.getByRole('heading', { level: 1 }).hover();
	await expect.poll(() => opacities(page)).toEqual(together);

	await entryOf(page, '2').focus();
	await expect.poll(() => alone(page)).toBe(true);
	await page.keyboard.press('Tab');
	await page.keyboard.press('Shift+Tab');
	await page.keyboard.press('Enter');
	await expect(page).toHaveURL(`${ROOT}?minTotal=20&show=2`);
	await expect(entryOf(page, '2')).toHaveAttribute('aria-current', 'true');
	await expect(entryOf(page, '2')).toBeFocused();
	await page.keyboard.press('Escape');
	await expect(page).toHaveURL(`${ROOT}?minTotal=20`);
	await expect(expectation(page).locator('[aria-current]')).toHaveCount(0);

	await entryOf(page, '2-1').click();
	await expect(page).toHaveURL(/show=2-1/);
	await entryOf(page, '2-1').click();
	await expect(page).toHaveURL(`${ROOT}?minTotal=20`);
	await page.goBack();
	await expect(entryOf(page, '2-1')).toHaveAttribute('aria-current', 'true');
	await page.goForward();
	await expect(expectation(page).locator('[aria-current]')).toHaveCount(0);
});

test.describe('on a phone', () => {
	test.use({ viewport: { width: 320, height: 640 }, hasTouch: true });

	test('a tap shows a sequence alone and brings the drawing to it; nothing is wider than the screen', async ({
		page
	}) => {
		await open(page, `${ROOT}?open=q1&group=method`);
		await entryOf(page, '1-2-1').tap();
		await expect(page).toHaveURL(/show=1-2-1/);
		await expect.poll(() => alone(page)).toBe(true);
		await expect(expectation(page).getByRole('img').first()).toBeInViewport();
		await entryOf(page, '1-2-1').tap();
		await expect(page).not.toHaveURL(/show=/);
		for (const address of [page.url(), COMPARE]) {
			await open(page, address);
			expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(320);
		}
	});
});

test('samples are put in order and grouped on the server, at once and without JavaScript', async ({
	page,
	browser,
	baseURL
}) => {
	await open(page, `${ROOT}?method=cbct&method=micro-ct&method=clearing`);
	const question = page.locator('#q1');
	await question.locator('summary').click();
	await question.getByLabel('Order of the samples').selectOption('largest first');
	await expect(page).toHaveURL(/sort=size/);
	await expect(question).toHaveAttribute('open', '');
	const sizes = (await column(question, 4)).map((text) => Number(text.split(' of ')[1].replaceAll(',', '')));
	expect(sizes).toEqual([...sizes].sort((a, b) => b - a));
	await question.getByLabel('Methods apart').check();
	await expect(page).toHaveURL(/group=method/);
	const methods = await column(question, 3);
	expect([...new Set(methods)]).toEqual(
		['micro-CT', 'clearing', 'CBCT'].filter((name) => methods.includes(name))
	);
	expect(methods.filter((name, i) => name !== methods[i - 1])).toHaveLength(new Set(methods).size);
	const weights = (await column(question, 6)).map((text) =>
		Number(/(\d+) %/.exec(text.replace('under 1', '0'))?.[1])
	);
	expect(Math.abs(weights.reduce((sum, weight) => sum + weight, 0) - 100)).toBeLessThan(weights.length);
	const enhanced = await question.innerText();

	const context = await browser.newContext({ baseURL, javaScriptEnabled: false });
	const plain = await context.newPage();
	await plain.goto(page.url());
	expect(await plain.locator('#q1').innerText()).toBe(enhanced);
	await plain.locator('#q1').getByLabel('Order of the samples').selectOption('newest first');
	await plain.locator('#q1').getByRole('button', { name: 'Put in order' }).click();
	await expect(plain).toHaveURL(/sort=year.*group=method.*open=q1|open=q1.*sort=year/);
	expect(new URL(plain.url()).searchParams.getAll('method')).toHaveLength(3);
	await expect(plain.locator('#q1')).toHaveAttribute('open', '');
	await entryOf(plain, '2-1').click();
	await expect(plain).toHaveURL(/show=2-1/);
	expect(new URL(plain.url()).searchParams.getAll('method')).toHaveLength(3);
	expect(await alone(plain)).toBe(true);
	await expect(plain.getByRole('button', { name: /PNG/ })).toHaveCount(0);
	await context.close();
});

test('filters say what they changed, and a wrong one keeps what was typed', async ({ page }) => {
	await open(page, `${ROOT}?method=micro-ct&show=2`);
	const change = page.getByRole('region', { name: 'What the filters changed' });
	const sources = change.getByRole('row', { name: /^Sources/ }).getByRole('cell');
	expect(Number(await sources.nth(1).innerText())).toBeLessThan(Number(await sources.nth(0).innerText()));
	await page.getByRole('link', { name: 'Take all samples' }).click();
	await expect(page).toHaveURL(`${ROOT}?show=2`);
	await expect(change).toHaveCount(0);
	await open(page, `${ROOT}?country=XYZ&yearFrom=soon`);
	await expect(page.getByRole('checkbox', { name: 'XYZ' })).toBeChecked();
	await expect(page.locator('input.field[name=yearFrom]')).toHaveValue('soon');
	await expect(change).toHaveCount(0);
});

test('downloads hold the filters: CSV, JSON, SVG and PNG', async ({ page, request }) => {
	await open(page, `${ROOT}?method=cbct&show=2-1`);
	const save = async (name: RegExp) => {
		const [file] = await Promise.all([
			page.waitForEvent('download'),
			page.getByRole('region', { name: 'Take it with you' }).getByText(name).click()
		]);
		return { name: file.suggestedFilename(), bytes: await readFile(await file.path()) };
	};
	const csv = await save(/CSV/);
	expect(csv.name).toBe('maxillary-first-molar-MB.csv');
	const rows = parse<Record<string, string>>(csv.bytes, { columns: true, bom: true });
	const samples = rows.filter(({ kind }) => kind === 'sample');
	expect([...new Set(samples.map(({ method }) => method))]).toEqual(['cbct']);
	expect(samples.every(({ source, locator, total }) => source && locator && Number(total) > 0)).toBe(true);
	expect(rows.filter(({ kind }) => kind === 'new population')).toHaveLength(9);

	const json = await save(/JSON/);
	const api = await request.get('/api/v1/teeth/maxillary-first-molar/roots/MB/expectation?method=cbct');
	const answer = JSON.parse(json.bytes.toString()) as { questions: unknown; filters: unknown };
	expect(answer).toMatchObject({ filters: { methods: ['cbct'] } });
	expect(answer.questions).toEqual(((await api.json()) as { questions: unknown }).questions);

	const svg = (await save(/SVG/)).bytes.toString();
	expect(svg).toContain('Samples narrowed by: method cbct.');
	expect(svg).toMatch(/stroke-opacity="1"/);
	const png = await save(/PNG/);
	expect(png.name).toBe('maxillary-first-molar-MB.png');
	expect(png.bytes.subarray(1, 4).toString()).toBe('PNG');
	expect(png.bytes.readUInt32BE(16)).toBe(3 * 372);
});

test('compare: from a root, on a shared address the same digits, back and forward', async ({
	page,
	browser,
	baseURL
}) => {
	await open(page, ROOT);
	await page.getByRole('link', { name: 'CBCT against clearing, this root' }).click();
	await expect(page).toHaveURL(/a-method=cbct.*b-method=clearing/);
	await expect(page.getByRole('heading', { level: 1, name: 'Compare' })).toBeVisible();
	const first = await page.locator('main').innerText();
	expect(first).toContain('The two sides are one root');
	const ticks = (place: number) =>
		page
			.locator('section[aria-labelledby=drawings] svg[role=img]')
			.nth(place)
			.locator('g')
			.first()
			.locator('line:not([stroke-dasharray])')
			.evaluateAll((lines) => lines.slice(1, 3).map((line) => line.getBoundingClientRect().y));

	await page
		.getByRole('group', { name: 'Second' })
		.getByRole('combobox', { name: 'Root' })
		.selectOption('Lower first molar, mesial root');
	await page.getByRole('button', { name: 'Compare' }).click();
	await expect(page).toHaveURL(/b=mandibular-first-molar/);
	const [one, other] = [await ticks(0), await ticks(1)];
	expect(one[0] - one[1]).toBeGreaterThan(5);
	expect(Math.abs(one[0] - one[1] - (other[0] - other[1]))).toBeLessThan(0.1);
	await page.goBack();
	await expect(page).toHaveURL(/b=maxillary-first-molar/);
	await expect.poll(() => page.locator('main').innerText()).toBe(first);

	const context = await browser.newContext({ baseURL, javaScriptEnabled: false });
	const plain = await context.newPage();
	await plain.goto(page.url());
	expect(await plain.locator('main').innerText()).toBe(first);
	await plain.goto(`${COMPARE}&a-yearFrom=soon`);
	await expect(plain.locator('input[name=a-yearFrom]')).toHaveValue('soon');
	await expect(plain.getByText('Give a year, such as 1998.')).toBeVisible();
	await plain.goto('/compare?a=third-eye/MB');
	await expect(plain.getByText('Choose a root of the list.')).toBeVisible();
	await context.close();
});

test('words of the drawings never lie on each other or outside, in the roots with the most to say', async ({
	page
}) => {
	for (const root of [
		'maxillary-first-molar/MB',
		'mandibular-first-molar/M',
		'mandibular-first-premolar/whole'
	]) {
		await open(page, `/teeth/${root}`);
		const faults = await expectation(page)
			.locator('figure svg[role=img]')
			.first()
			.evaluate((svg) => {
				const outer = svg.getBoundingClientRect();
				const boxes = [...svg.querySelectorAll('text')].map((text) => ({
					text: text.textContent,
					box: text.getBoundingClientRect()
				}));
				return boxes.flatMap(({ text, box }, i) => {
					const outside =
						box.left < outer.left - 1 ||
						box.right > outer.right + 1 ||
						box.top < outer.top - 1 ||
						box.bottom > outer.bottom + 1;
					const on = boxes.slice(i + 1).filter(
						(other) =>
							box.left < other.box.right &&
							other.box.left < box.right &&
							// A line box is taller than its letters.
							box.top + 3 < other.box.bottom - 3 &&
							other.box.top + 3 < box.bottom - 3
					);
					return [...(outside ? [`${text} outside`] : []), ...on.map((other) => `${text} on ${other.text}`)];
				});
			});
		expect(faults, root).toEqual([]);
	}
});
