import { AxeBuilder } from '@axe-core/playwright';
import type { BrowserContext, Page } from '@playwright/test';
import { freePort } from '../support/freePort.js';
import type { Caller } from './support/caller';
import { firstAdministrator, invited, PASSWORD } from './support/caller';
import { linkIn, Mailbox } from './support/mailbox';
import { expectProblem } from './support/refused';
import { OwnServer } from './support/server';
import { expect, test } from './support/test';

const ADA = 'ada@example.org';
const BO = 'bo@example.org';
const ROOT = '/api/v1/teeth/maxillary-first-molar/roots/MB/expectation';
const TAGS = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'];

let server: OwnServer;
let mailbox: Mailbox;
let ada: Caller;
let bo: Caller;

test.describe.configure({ mode: 'serial' });
test.use({ expectedMessages: [/status of (409|422)/] });

test.beforeAll(async () => {
	test.setTimeout(180_000);
	mailbox = new Mailbox(await freePort());
	await mailbox.up();
	server = await OwnServer.start({ SMTP_URL: mailbox.url, RATE_LIMIT_PER_MINUTE: '1000000' });
	const administrator = await firstAdministrator(server, 'first@example.org');
	ada = await invited(administrator, mailbox, ADA, ['educator']);
	bo = await invited(administrator, mailbox, BO, ['educator']);
});
test.afterAll(async () => {
	await mailbox?.down();
	await server?.stop();
});

async function signIn(context: BrowserContext, email: string): Promise<Page> {
	const page = await context.newPage();
	await page.goto(`${server.origin}/sign-in`);
	await page.locator('[name=email]').fill(email);
	await page.locator('[name=password]').fill(PASSWORD);
	await page.keyboard.press('Enter');
	await page.waitForURL((url) => !url.pathname.startsWith('/sign-in'));
	return page;
}

const open = (page: Page, address: string) =>
	page.goto(new URL(address, server.origin).href, { waitUntil: 'networkidle' });

/** Goes on with Tab until something is focused, as somebody without a mouse does. */
async function tabTo(page: Page, selector: string) {
	const wanted = page.locator(selector).first();
	for (let presses = 0; presses < 150; presses++) {
		if (await wanted.evaluate((element) => element === document.activeElement)) return;
		await page.keyboard.press('Tab');
	}
	throw new Error(`Tab never reaches ${selector}.`);
}

async function type(page: Page, selector: string, text: string) {
	await tabTo(page, selector);
	await page.keyboard.type(text);
}

async function checkPage(page: Page) {
	const { violations } = await new AxeBuilder({ page }).withTags(TAGS).analyze();
	expect(
		violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html).join('\n')}`),
		page.url()
	).toEqual([]);
}

interface Expected {
	tableRevision: number;
	fates: Record<string, { mean: number }>;
	questions: { id: string; studies: { source: string; total: number }[] }[];
}
const expectation = async () => (await (await fetch(server.origin + ROOT)).json()) as Expected;
const totalsOf = ({ questions }: Expected, source: string) =>
	questions
		.flatMap(({ studies }) => studies.filter((study) => study.source === source))
		.map(({ total }) => total);
const csv = async (address: string) => (await fetch(server.origin + address)).text();

test('an entry is typed by keyboard, returned, mended, published by another; the estimate and the record move', async ({
	browser
}) => {
	test.setTimeout(180_000);
	const before = await expectation();
	const [page, other] = [
		await signIn(await browser.newContext(), ADA),
		await signIn(await browser.newContext(), BO)
	];

	await open(page, '/desk');
	await expect(page.getByText('No draft.')).toBeVisible();
	await checkPage(page);
	await tabTo(page, 'a[href="/desk/entries/new"]');
	await page.keyboard.press('Enter');
	await page.waitForURL('**/desk/entries/new');
	await page.waitForLoadState('networkidle');
	await tabTo(page, '#locator');
	await tabTo(page, 'button:has-text("Save draft")');
	await page.keyboard.press('Enter');
	await expect(page.locator('#source-remarks')).toContainText('Name the source');
	await expect(page.locator('#source')).toHaveAttribute('aria-invalid', 'true');
	await checkPage(page);

	await page.locator('#content').focus();
	await type(page, '#source', 'ahmed-2007');
	await type(page, '#locator', 'table 9');
	await type(page, '#root', 'Mesiob');
	await type(page, '#method', 'CBCT');
	await type(page, '#country', 'THA');
	await type(page, '#total', '2000');
	await tabTo(page, 'button[value="1"][name=add]');
	await page.keyboard.press('Enter');
	await expect(page.locator('#figure-count-0')).toBeFocused();
	await page.keyboard.type('400');
	await type(page, '#figure-category-1', '2-1');
	await page.keyboard.press('Tab');
	await page.keyboard.press('Tab');
	await page.keyboard.type('70');
	await expect(page.locator('#figure-1-remarks')).toContainText('1,400, worked out');
	await type(page, '#figure-category-2', '4-3-4');
	await page.keyboard.press('Tab');
	await page.keyboard.type('500');
	await expect(page.locator('#figure-2-remarks')).toContainText('has ever shown 4-3-4');
	await page.keyboard.press('Shift+Tab');
	await page.keyboard.press('Control+A');
	await page.keyboard.type('2');
	await page.keyboard.press('Tab');
	await page.keyboard.press('Control+A');
	await page.keyboard.type('200');
	await tabTo(page, 'button:has-text("Save draft")');
	await page.keyboard.press('Enter');
	await page.waitForURL(/\/desk\/entries\/\d+/);
	await page.waitForLoadState('networkidle');
	const address = new URL(page.url()).pathname;

	await type(page, 'form:has-text("Ask for review") textarea', 'Table 9 is hard to read.');
	await tabTo(page, 'button:has-text("Ask for review")');
	await page.keyboard.press('Enter');
	await expect(page.getByText('You have written in this entry')).toBeVisible();
	expect(totalsOf(await expectation(), 'ahmed-2007')).toEqual(totalsOf(before, 'ahmed-2007'));

	const asked = await mailbox.wait(BO, 2);
	expect(asked.text).toContain('Table 9 is hard to read.');
	expect(new URL(linkIn(asked)).pathname).toBe(address);
	await open(other, address);
	await expect(other.getByRole('heading', { name: 'What publishing does' })).toBeVisible();
	await checkPage(other);
	await other.getByLabel('Reasons, one a line').fill('The total is 1,900.\nWhich table?');
	await other.getByRole('button', { name: 'Return with reasons' }).click();
	await expect(other.getByText('Returned by bo')).toBeVisible();

	expect((await mailbox.wait(ADA, 2)).text).toContain('Which table?');
	await open(page, address);
	await expect(page.getByText('The total is 1,900.', { exact: true })).toBeVisible();
	await page.locator('#total').fill('1900');
	await page.locator('#figure-count-1').fill('1300');
	await page.locator('#figure-percent-1').fill('');
	await page.getByRole('button', { name: 'Save draft' }).click();
	await expect(page.getByText('Done.')).toBeVisible();
	await page.getByRole('button', { name: 'Ask for review' }).click();
	await expect(page.getByText('You have written in this entry')).toBeVisible();

	await open(other, address);
	await expect(other.locator('section[aria-labelledby=effect]')).toContainText(
		/Inside|Outside|no other sample/
	);
	await other.getByRole('button', { name: 'Publish' }).click();
	await other.waitForURL('**/table/revisions**');
	const revision = other.locator('#revision-2');
	await expect(revision).toContainText('written by ada, checked and published by bo');
	await expect(async () => {
		await other.reload();
		await expect(revision.locator('summary')).toContainText('points');
	}).toPass();
	await revision.locator('summary').click();
	await checkPage(other);
	const after = await expectation();
	expect(after.tableRevision).toBe(2);
	expect(totalsOf(after, 'ahmed-2007')).toContain(1900);
	expect(after.fates['shared-exit'].mean).not.toBe(before.fates['shared-exit'].mean);
	expect((await mailbox.wait(ADA, 3)).text).toContain('published it');

	expect(await csv('/api/v1/table-revisions/2/table.csv')).toBe(await csv('/api/v1/table.csv'));
	expect(await csv('/api/v1/table-revisions/1/table.csv')).not.toContain('table 9');

	await open(page, address);
	await page.getByRole('button', { name: 'Restore revision 1', exact: true }).click();
	await expect(page.getByText('The published entry stays in the estimates')).toBeVisible();
	await expect(page.locator('#total')).toHaveValue('2000');
	expect(totalsOf(await expectation(), 'ahmed-2007')).toContain(1900);
	await checkPage(page);

	await open(other, address);
	await page.locator('#total').fill('2010');
	await page.getByRole('button', { name: 'Save draft' }).click();
	await expect(page.getByText('Done.')).toBeVisible();
	await other.locator('#country').fill('LAO');
	await other.locator('#total').fill('2020');
	await other.getByRole('button', { name: 'Save draft' }).click();
	await expect(other.getByRole('heading', { name: 'Somebody has saved this meanwhile' })).toBeVisible();
	await checkPage(other);
	await other.getByRole('group', { name: 'Total' }).getByText('Theirs').click();
	await other.getByRole('button', { name: 'Save the merged draft' }).click();
	await expect(other.locator('#country')).toHaveValue('LAO');
	await expect(other.locator('#total')).toHaveValue('2010');

	await open(page, '/desk/characteristics');
	await checkPage(page);
	await open(page, '/desk/characteristics/cone-mark.positive-if-meet.any');
	await page.getByLabel('Parameter a').fill('18');
	await page.getByRole('button', { name: 'Save draft' }).click();
	await expect(page.getByRole('heading', { name: 'Draft by ada' })).toBeVisible();
	await checkPage(page);
});

test('the desk works without scripts, and over the API with a token', async () => {
	const form = {
		source: 'ahmed-2007',
		locator: 'p. 3',
		provenance: 'read',
		tooth: 'maxillary-first-molar',
		root: 'DB'
	};
	const typed = { ...form, scope: 'all', country: 'THA', method: 'clearing', subgroup: 'all', total: '52' };
	const figures = {
		measure: 'configuration',
		'figure-category': '1',
		'figure-count': '52',
		'figure-percent': '',
		'figure-note': ''
	};
	const picked = await ada.send('/desk/entries/new?/check', { ...typed, ...figures, add: '2-1' });
	expect(picked).toContain('value="2-1"');
	expect(picked).toContain('value="p. 3"');
	const wrong = await ada.ask('/desk/entries/new?/save', { form: { ...typed, ...figures, total: 'many' } });
	expect(wrong.status).toBe(422);
	expect(await wrong.text()).toContain('value="many"');
	const saved = await ada.ask('/desk/entries/new?/save', { form: { ...typed, ...figures } });
	expect([saved.status, saved.headers.get('location')]).toEqual([
		303,
		expect.stringMatching(/^\/desk\/entries\/\d+\?saved$/)
	]);

	const token = await bo.makeToken(['table:write']);
	const id = /\d+/.exec(saved.headers.get('location')!)![0];
	const draft = await token.ask(`/api/v1/entries/${id}/draft`);
	const etag = draft.headers.get('etag')!;
	expect(etag).toBe('"1"');
	const patch = async (json: unknown, match?: string) => {
		const response = await token.ask(`/api/v1/entries/${id}`, {
			...{ method: 'PATCH', json },
			headers: match ? { 'if-match': match } : {}
		});
		return {
			status: response.status,
			headers: Object.fromEntries(response.headers),
			text: await response.text()
		};
	};
	expectProblem(await patch({ changes: { total: 60 } }), 428);
	expect((await patch({ changes: { total: 60 } }, etag)).status).toBe(200);
	expectProblem(await patch({ changes: { total: 70 } }, etag), 409, ['total']);
	expectProblem(await patch({ changes: { total: 7 } }, '"2"'), 422, ['figures.0.count']);
	expect((await fetch(`${server.origin}/api/v1/entries/${id}`)).status).toBe(404);
	const gone = await token.ask(`/api/v1/entries/${id}`, { method: 'DELETE', headers: { 'if-match': '"2"' } });
	expect(gone.status).toBe(200);
});
