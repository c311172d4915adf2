import { AxeBuilder } from '@axe-core/playwright';
import { type Browser, type Page } from '@playwright/test';
import { Secret, TOTP } from 'otpauth';
import { freePort } from '../support/freePort.js';
import { PASSWORD } from './support/caller';
import { linkIn, Mailbox } from './support/mailbox';
import { OwnServer } from './support/server';
import { expect, test } from './support/test';

const FIRST = 'first@example.org';
const ADA = 'ada@example.org';
const TAGS = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'];

let server: OwnServer;
let mailbox: Mailbox;

test.describe.configure({ mode: 'serial' });
// Wrong passwords are answered with 401, wrong fields with 422, what is gone with 404, and browsers report each.
test.use({ expectedMessages: [/status of (401|404|409|422)/] });

test.beforeAll(async () => {
	test.setTimeout(120_000);
	mailbox = new Mailbox(await freePort());
	await mailbox.up();
	server = await OwnServer.start({
		SMTP_URL: mailbox.url,
		MAIL_RETRY_SECONDS: '1',
		RATE_LIMIT_PER_MINUTE: '100000'
	});
});
test.afterAll(async () => {
	await mailbox?.down();
	await server?.stop();
});

/** A browser of one's own. */
async function newBrowser(browser: Browser, options: { javaScriptEnabled?: boolean } = {}): Promise<Page> {
	const context = await browser.newContext({ baseURL: server.origin, ...options });
	return context.newPage();
}

async function signIn(page: Page, email: string, password = PASSWORD) {
	await page.goto('/sign-in');
	await page.getByLabel('E-mail address').fill(email);
	await page.getByLabel('Password', { exact: true }).fill(password);
	await page.locator('main').getByRole('button', { name: 'Sign in' }).click();
}

/** axe finds nothing and nothing overflows, on a phone and a desk, light and dark. */
async function check(page: Page, address = page.url()) {
	for (const [width, colorScheme] of [
		[320, 'light'],
		[1440, 'dark']
	] as const) {
		await page.setViewportSize({ width, height: 900 });
		await page.emulateMedia({ colorScheme, reducedMotion: 'reduce' });
		if (page.url() !== new URL(address, server.origin).href) await page.goto(address);
		const { violations } = await new AxeBuilder({ page }).withTags(TAGS).analyze();
		expect(
			violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html).join('\n')}`),
			address
		).toEqual([]);
		expect(
			await page.evaluate(() => document.documentElement.scrollWidth),
			`${address} at ${width}`
		).toBeLessThanOrEqual(width);
	}
	await page.setViewportSize({ width: 1280, height: 900 });
	await page.emulateMedia({ colorScheme: 'light' });
}

test('the first start prints a link by which the first administrator is made, once', async ({ page }) => {
	test.slow();
	const [link] = await server.printed(/http:\S+\/set-up\?key=[\w-]+/);
	// On the output, and never in a line of the log.
	expect(
		server.printedSoFar.split('\n').filter((line) => line.startsWith('{') && line.includes('key='))
	).toEqual([]);
	await page.goto(link);
	await page.getByLabel('E-mail address').fill(FIRST);
	await page.getByLabel('Your name').fill('Firsty');
	await page.getByLabel('Password', { exact: true }).fill('passwordpassword');
	await page.getByRole('button', { name: 'Make the administrator' }).click();
	await expect(page.getByText('Too many people use this password')).toBeVisible();
	await expect(page.getByLabel('E-mail address')).toHaveValue(FIRST);
	await expect(page.getByLabel('Your name')).toHaveValue('Firsty');
	await check(page, link);
	await page.getByLabel('E-mail address').fill(FIRST);
	await page.getByLabel('Your name').fill('Firsty');
	await page.getByLabel('Password', { exact: true }).fill(PASSWORD);
	await page.getByRole('button', { name: 'Make the administrator' }).click();
	await expect(page.getByRole('heading', { name: 'Invitations', level: 1 })).toBeVisible();
	await page.goto(link);
	await expect(page.getByText('This installation is set up')).toBeVisible();
});

test('an educator is invited, accepts from the mail, turns a second factor on, and signs in with it', async ({
	browser
}) => {
	test.slow();
	const [first, ada] = [await newBrowser(browser), await newBrowser(browser)];
	await signIn(first, FIRST);
	await expect(first.getByText('Firsty')).toBeVisible();
	await first.goto('/administration/invitations');
	await first.getByLabel('E-mail address').fill(ADA);
	await first.getByRole('checkbox', { name: /Educator/ }).check();
	await first.getByRole('button', { name: 'Invite' }).click();
	await expect(first.getByText(`The invitation of ${ADA} is on its way.`)).toBeVisible();
	const letter = await mailbox.wait(ADA);
	expect(letter.headers).toContain('Subject: Firsty invites you to Watersmeet');
	expect(letter.text).toContain('You would be: educator.');
	// Plain text and HTML lead to the same place.
	expect(letter.html).toContain(linkIn(letter));

	await ada.goto(linkIn(letter));
	await check(ada);
	await ada.getByLabel('Your name').fill('Ada Lock');
	await ada.getByLabel('Password', { exact: true }).fill(PASSWORD);
	await ada.getByRole('button', { name: 'Make my account' }).click();
	await expect(ada.getByText('Your roles: Educator')).toBeVisible();
	const again = await newBrowser(browser);
	await again.goto(linkIn(letter));
	await expect(again.getByRole('heading', { name: 'This invitation no longer works' })).toBeVisible();

	await ada.goto('/account/second-factor');
	await ada.getByLabel('Your present password').fill(PASSWORD);
	await ada.getByRole('button', { name: 'Set it up' }).click();
	await expect(ada.getByRole('img', { name: /QR code/ })).toBeVisible();
	const secret = (await ada.locator('code').first().innerText()).replace(/\s/g, '');
	// Another implementation of RFC 6238 than the server's would be better; otpauth's is checked against the RFC's vectors in secondFactor.test.ts.
	const totp = new TOTP({ secret: Secret.fromBase32(secret) });
	const used = totp.generate();
	await ada.getByLabel('The six digits it shows now').fill(used);
	await ada.getByRole('button', { name: 'Turn it on' }).click();
	await expect(ada.getByRole('heading', { name: 'Your recovery codes' })).toBeVisible();
	const codes = await ada.locator('section code').allInnerTexts();
	expect(new Set(codes).size).toBe(10);
	await ada.locator('summary', { hasText: 'Ada Lock' }).click();
	await ada.getByRole('button', { name: 'Sign out' }).click();
	await expect(ada.getByRole('link', { name: 'Sign in' })).toBeVisible();

	const words: string[] = [];
	for (const [email, password] of [
		[ADA, 'not the password at all'],
		['nobody@example.org', 'not the password at all']
	]) {
		await signIn(ada, email, password);
		words.push(await ada.getByRole('alert').innerText());
		await expect(ada.getByLabel('E-mail address')).toHaveValue(email);
	}
	expect(words[0]).toBe(words[1]);
	await signIn(ada, ADA);
	await expect(ada.getByRole('heading', { name: 'Your second factor' })).toBeVisible();
	await check(ada, '/sign-in');
	// A code works once.
	await ada.getByLabel('Code').fill(used);
	await ada.getByRole('button', { name: 'Sign in' }).click();
	await expect(ada.getByText('This code is not right, or was used already')).toBeVisible();
	await ada.getByLabel('Code').fill(codes[0].toUpperCase());
	await ada.getByRole('button', { name: 'Sign in' }).click();
	await expect(ada.locator('summary', { hasText: 'Ada Lock' })).toBeVisible();
	await ada.goto('/account/second-factor');
	await expect(ada.getByText('9 of 10 recovery codes left.')).toBeVisible();
	await ada
		.locator('form', { has: ada.getByRole('heading', { name: 'Turn it off' }) })
		.getByLabel('Your present password')
		.fill(PASSWORD);
	await ada.getByRole('button', { name: 'Turn it off' }).click();
	await expect(ada.getByText('The second factor is off.').first()).toBeVisible();
});

test('a forgotten password is reset by mail, and every device is signed out', async ({ browser }) => {
	test.slow();
	const [ada, other] = [await newBrowser(browser), await newBrowser(browser)];
	await signIn(other, ADA);
	await expect(other.locator('summary', { hasText: 'Ada Lock' })).toBeVisible();
	const said: string[] = [];
	for (const email of ['nobody@example.org', ADA]) {
		await ada.goto('/reset');
		await ada.getByLabel('E-mail address').fill(email);
		await ada.getByRole('button', { name: 'Send the link' }).click();
		said.push((await ada.locator('main').getByRole('status').innerText()).replace(email, 'X'));
	}
	expect(said[0]).toBe(said[1]);
	const link = linkIn(await mailbox.wait(ADA, 2));
	expect(mailbox.to('nobody@example.org')).toEqual([]);
	await ada.goto(link);
	await ada.getByLabel('New password').fill('three rivers become none');
	await ada.getByRole('button', { name: 'Keep the new password' }).click();
	await expect(ada.getByText('Your roles: Educator')).toBeVisible();
	await other.goto('/account');
	await expect(other.getByRole('heading', { name: 'Sign in' })).toBeVisible();
	await signIn(other, ADA, 'three rivers become none');

	await ada.goto('/account/devices');
	await expect(ada.getByText('(this device)')).toHaveCount(1);
	await check(ada);
	await ada.getByRole('button', { name: /^Sign out Chrome/ }).click();
	await expect(ada.locator('main').getByRole('status').last()).toHaveText('Signed out.');
	await other.goto('/account');
	await expect(other.getByRole('heading', { name: 'Sign in' })).toBeVisible();

	await ada.goto('/account/password');
	await ada.getByLabel('Your present password').fill('three rivers become none');
	await ada.getByLabel('New password').fill(PASSWORD);
	await ada.getByRole('button', { name: 'Keep the new password' }).click();
	await expect(ada.locator('main').getByRole('status').last()).toContainText('The new password is kept.');
});

test('a form sent after the sign-in has ended keeps what was typed: in place with scripts, carried through without', async ({
	browser
}) => {
	test.slow();
	const ada = await newBrowser(browser);
	await signIn(ada, ADA);
	await expect(ada.locator('summary', { hasText: 'Ada Lock' })).toBeVisible();
	await ada.goto('/account');
	const tab = await ada.context().newPage();
	await tab.goto('/account');
	await tab.locator('summary', { hasText: 'Ada Lock' }).click();
	await tab.getByRole('button', { name: 'Sign out' }).click();
	await ada.getByRole('textbox', { name: 'Name', exact: true }).fill('Ada <i>"Lock"</i>, née Wëir');
	await ada.getByRole('button', { name: 'Keep the name' }).click();
	await expect(ada.getByRole('alert')).toContainText('Your sign-in has ended. What you typed is still here');
	await expect(ada.getByRole('textbox', { name: 'Name', exact: true })).toHaveValue(
		'Ada <i>"Lock"</i>, née Wëir'
	);
	const opened = ada.waitForEvent('popup');
	await ada.getByRole('link', { name: 'Sign in in a new tab' }).click();
	await signIn(await opened, ADA);
	await expect((await opened).locator('summary', { hasText: 'Ada Lock' })).toBeVisible();
	await ada.getByRole('button', { name: 'Keep the name' }).click();
	await expect(ada.locator('main').getByRole('status').last()).toHaveText('Kept.');
	await ada.reload();
	await expect(ada.getByRole('textbox', { name: 'Name', exact: true })).toHaveValue(
		'Ada <i>"Lock"</i>, née Wëir'
	);

	const plain = await newBrowser(browser, { javaScriptEnabled: false });
	await signIn(plain, ADA);
	await plain.goto('/account');
	await plain.getByRole('textbox', { name: 'Name', exact: true }).fill('Ada\u2003Lock & Weir');
	await plain.context().clearCookies();
	await plain.getByRole('button', { name: 'Keep the name' }).click();
	await expect(plain.getByRole('heading', { name: 'Sign in again' })).toBeVisible();
	await plain.getByLabel('E-mail address').fill(ADA);
	await plain.getByLabel('Password', { exact: true }).fill('a wrong password here');
	await plain.locator('main').getByRole('button', { name: 'Sign in' }).click();
	await expect(plain.getByRole('alert')).toContainText('do not belong together');
	await plain.getByLabel('Password', { exact: true }).fill(PASSWORD);
	await plain.locator('main').getByRole('button', { name: 'Sign in' }).click();
	await expect(plain.getByRole('heading', { name: 'Send what you typed' })).toBeVisible();
	await expect(plain.getByRole('cell')).toHaveText('Ada\u2003Lock & Weir');
	await plain.getByRole('button', { name: 'Send it now' }).click();
	await expect(plain.locator('main').getByRole('status').last()).toHaveText('Kept.');
	await expect(plain.getByRole('textbox', { name: 'Name', exact: true })).toHaveValue('Ada\u2003Lock & Weir');
	// The whole menu works without scripts too.
	await plain.locator('summary', { hasText: 'Ada' }).click();
	await plain.getByRole('button', { name: 'Sign out' }).click();
	await expect(plain.getByRole('link', { name: 'Sign in' })).toBeVisible();
});

test('with the mail server down nothing else fails, and the mail goes out once when it is back', async ({
	browser
}) => {
	test.slow();
	const [first, ada] = [await newBrowser(browser), await newBrowser(browser)];
	await signIn(ada, ADA);
	await expect(ada.locator('summary', { hasText: 'Ada' })).toBeVisible();
	await signIn(first, FIRST);
	await expect(first.locator('summary', { hasText: 'Firsty' })).toBeVisible();
	await mailbox.down();
	const before = mailbox.letters.length;
	await ada.goto('/account');
	await ada.getByLabel('New e-mail address').fill('lock@example.org');
	await ada.getByLabel('Your present password').fill(PASSWORD);
	await ada.getByRole('button', { name: 'Send the link' }).click();
	await expect(ada.locator('main').getByRole('status').last()).toContainText(
		'A mail is on its way to lock@example.org'
	);
	await first.goto('/administration/mail?state=waiting');
	await expect(async () => {
		await first.reload();
		await expect(first.getByText(/What the mail server said: .*ECONNREFUSED/)).toHaveCount(2, {
			timeout: 1000
		});
	}).toPass({ timeout: 20_000 });
	await check(first);
	await mailbox.up();
	const letter = await mailbox.wait('lock@example.org');
	expect((await mailbox.wait(ADA, 3)).text).toContain('lock@example.org');
	await ada.goto(linkIn(letter));
	await ada.getByRole('button', { name: 'Confirm this address' }).click();
	await expect(ada.locator('main').getByRole('status').last()).toHaveText(
		'Your account now uses lock@example.org.'
	);
	await first.goto('/administration/mail?state=waiting');
	await expect(first.getByText('No mail.')).toBeVisible();
	expect(mailbox.letters.length - before).toBe(2);
});

test('an administrator finds people, changes roles, closes an account, and reads who did what', async ({
	browser
}) => {
	test.slow();
	const [first, ada] = [await newBrowser(browser), await newBrowser(browser)];
	await signIn(ada, 'lock@example.org');
	await expect(ada.locator('summary', { hasText: 'Ada' })).toBeVisible();
	await signIn(first, FIRST);
	await expect(first.locator('summary', { hasText: 'Firsty' })).toBeVisible();
	await first.goto('/administration/people');
	await check(first);
	await first.getByLabel('Name or address').fill('LOCK@');
	await first.getByRole('button', { name: 'Show' }).click();
	await expect(first.getByText('One person')).toBeVisible();
	await first.getByRole('link', { name: /^Ada/ }).click();
	await expect(first.getByRole('heading', { name: /^Ada/, level: 1 })).toBeVisible();
	await check(first);
	await first.getByRole('checkbox', { name: /Dentist/ }).check();
	await first.getByRole('button', { name: 'Keep the roles' }).click();
	await expect(first.locator('main').getByRole('status').last()).toHaveText('Kept.');
	await ada.goto('/account');
	await expect(ada.getByText('Your roles: Dentist, Educator')).toBeVisible();
	await first.getByRole('button', { name: 'Close the account' }).click();
	await expect(first.getByText('Closed since')).toBeVisible();
	await ada.goto('/account');
	await signIn(ada, 'lock@example.org');
	await expect(ada.getByRole('alert')).toContainText('do not belong together');

	await first.goto('/administration/people?q=first');
	await first.getByRole('link', { name: 'Firsty' }).click();
	await expect(first.getByRole('heading', { name: 'Firsty', level: 1 })).toBeVisible();
	await first.getByRole('button', { name: 'Close the account' }).click();
	await expect(first.getByText('This is the last administrator.')).toBeVisible();

	await first.goto('/administration/audit?action=deactivated');
	await expect(first.getByText('One line')).toBeVisible();
	await expect(first.getByRole('row', { name: /Firsty Deactivated lock@example.org/ })).toBeVisible();
	await check(first, '/administration/audit');
	const download = first.waitForEvent('download');
	await first.getByRole('link', { name: 'Download as CSV' }).click();
	const chunks: Buffer[] = [];
	for await (const chunk of await (await download).createReadStream()) chunks.push(chunk as Buffer);
	const csv = Buffer.concat(chunks).toString('utf8');
	expect(csv.split('\r\n')[0]).toBe('id,at,action,who,who id,subject,detail,address');
	expect(csv).toContain('invitation accepted');
	// No secret of the whole story stands in the log or the export.
	for (const text of [csv, server.printedSoFar.replace(/.*\/set-up\?key=.*/g, '')])
		for (const secret of [
			PASSWORD,
			'three rivers',
			...mailbox.letters.map((letter) => /[\w-]{43}/.exec(letter.text)?.[0])
		])
			if (secret) expect(text).not.toContain(secret);
});

test('the remaining pages pass axe and fit a phone', async ({ browser }) => {
	test.setTimeout(180_000);
	const first = await newBrowser(browser);
	await check(first, '/sign-in');
	await check(first, '/reset');
	await signIn(first, FIRST);
	await expect(first.locator('summary', { hasText: 'Firsty' })).toBeVisible();
	for (const address of [
		'/account',
		'/account/tokens',
		'/account/password',
		'/account/second-factor',
		'/administration/invitations',
		'/administration/settings'
	])
		await check(first, address);
});
