import { once } from 'node:events';
import { mkdtempSync, rmSync } from 'node:fs';
import { request as nodeRequest } from 'node:http';
import os from 'node:os';
import path from 'node:path';
import { PAGES, ROOT } from './support/places';
import { OwnServer } from './support/server';
import { expect, test } from './support/test';

const PREFERENCES = 'On this device';

test('every answer carries the security headers, and pages a policy without unsafe-inline', async ({
	request
}) => {
	for (const address of ['/', ROOT, '/api/v1/teeth', '/api/v1/nothing', '/health', '/nothing']) {
		const headers = (await request.get(address)).headers();
		expect(headers['x-content-type-options'], address).toBe('nosniff');
		expect(headers['x-frame-options'], address).toBe('DENY');
		expect(headers['referrer-policy'], address).toBe('same-origin');
		expect(headers['x-request-id'], address).toMatch(/^[0-9a-f-]{36}$/);
		expect(headers['x-powered-by'] ?? headers.server, address).toBeUndefined();
	}
	const policy = (await request.get('/')).headers()['content-security-policy'];
	expect(policy).not.toContain('unsafe-inline');
	expect(policy).not.toContain('unsafe-eval');
	expect(policy).toMatch(/script-src 'self' 'nonce-[^']+'/);
	expect(policy).toContain("default-src 'self'");
	expect(policy).toContain("frame-ancestors 'none'");
	expect(policy).toContain("object-src 'none'");
	const again = (await request.get('/')).headers()['content-security-policy'];
	expect(again, 'a nonce is used once').not.toBe(policy);
});

test('no page has a style attribute or an inline handler', async ({ request }) => {
	for (const [name, address] of Object.entries(PAGES)) {
		const html = await (await request.get(address)).text();
		expect(html, name).not.toMatch(/<[^>]+\sstyle=/);
		expect(html, name).not.toMatch(/<[^>]+\son(click|load|error|submit)=/);
	}
});

test('health answers, and says the revision of the table', async ({ request }) => {
	for (const address of ['/health', '/api/v1/health']) {
		const response = await request.get(address);
		expect(response.status()).toBe(200);
		expect(await response.json()).toEqual({ status: 'ok', tableRevision: 1 });
	}
});

test('the theme is kept in a cookie and stands in the page before anything is drawn', async ({
	page,
	context,
	request
}) => {
	await page.emulateMedia({ colorScheme: 'light' });
	await page.goto('/about');
	const ground = () => page.evaluate(() => getComputedStyle(document.documentElement).backgroundColor);
	const light = await ground();
	await page.getByRole('combobox', { name: 'Light or dark' }).selectOption('dark');
	await page.getByRole('group', { name: PREFERENCES }).getByRole('button').click();
	await expect(page.locator('html')).toHaveAttribute('data-theme', 'dark');
	await expect(page).toHaveURL('/about');
	expect(await ground()).not.toBe(light);

	const [cookie] = await context.cookies();
	expect(cookie).toMatchObject({ name: 'preferences', httpOnly: true, sameSite: 'Lax', path: '/' });

	// The very first bytes say it: no script has to run.
	const html = await (await request.get('/', { headers: { cookie: `preferences=${cookie.value}` } })).text();
	expect(html).toMatch(/^<!doctype html>\s*<html lang="en" data-theme="dark">/);
	expect(await (await request.get('/')).text()).toContain('data-theme="system"');
});

test('tooth numbers follow the choice on every page that shows them', async ({ page }) => {
	await page.goto('/');
	await page.getByRole('combobox', { name: 'Tooth numbers' }).selectOption('universal');
	await page.getByRole('group', { name: PREFERENCES }).getByRole('button').click();
	await expect(page.getByRole('link', { name: /^#?3, upper right first molar/ })).toBeVisible();
	await page.goto('/teeth/maxillary-first-molar');
	await expect(page.getByText(/^#?3, #?14$/)).toBeVisible();
	await page.goto('/?q=molar');
	await expect(page.getByRole('region', { name: /answer to/ })).not.toContainText(/\(1[68]\)|\(2[68]\)/);

	await page.goto('/about');
	await page.getByRole('combobox', { name: 'Tooth numbers' }).selectOption('palmer');
	await page.getByRole('group', { name: PREFERENCES }).getByRole('button').click();
	await page.goto('/teeth/maxillary-first-molar');
	await expect(page.getByText('UR6, UL6', { exact: true })).toBeVisible();
});

test('preferences lead back to this site only, and keep nothing that is no choice', async ({
	request,
	baseURL
}) => {
	const origin = baseURL ?? '';
	const choose = (form: Record<string, string>) =>
		request.post('/preferences', { form, headers: { origin }, maxRedirects: 0 });
	for (const [back, location] of [
		['/about?x=1', '/about?x=1'],
		['https://elsewhere.example/', '/'],
		['//elsewhere.example/', '/'],
		['/\\elsewhere.example/', '/'],
		['javascript:alert(1)', '/'],
		['', '/']
	]) {
		const response = await choose({ theme: 'dark', numbers: 'iso', back });
		expect(response.status()).toBe(303);
		expect(new URL(response.headers().location, origin).href, back).toBe(new URL(location, origin).href);
	}
	const odd = await choose({ theme: 'plaid', numbers: 'iso', back: '/' });
	expect(odd.headers()['set-cookie']).toBeUndefined();
});

test('a form from another site, or from nowhere, is refused', async ({ request }) => {
	const senders: Record<string, string>[] = [{ origin: 'https://elsewhere.example' }, { origin: 'null' }, {}];
	for (const headers of senders) {
		const response = await request.post('/preferences', {
			form: { theme: 'dark' },
			headers,
			maxRedirects: 0
		});
		expect(response.status()).toBe(403);
	}
});

test('a cookie that is spoilt does no harm', async ({ request }) => {
	for (const value of ['%7B', 'null', '[]', '%7B%22theme%22%3A%22plaid%22%7D', '%E0%A4%A']) {
		const response = await request.get('/', { headers: { cookie: `preferences=${value}` } });
		expect(response.status()).toBe(200);
		expect(await response.text()).toContain('data-theme="system"');
	}
});

test('too many requests a minute are told when to come again, API and pages; health still answers', async () => {
	const server = await OwnServer.start({ RATE_LIMIT_PER_MINUTE: '5' });
	try {
		const statuses: number[] = [];
		for (let asked = 0; asked < 5; asked++)
			statuses.push((await fetch(`${server.origin}/api/v1/sources?limit=1`)).status);
		expect(statuses).toEqual([200, 200, 200, 200, 200]);
		const refused = await fetch(`${server.origin}/api/v1/sources?limit=1`);
		expect(refused.status).toBe(429);
		expect(refused.headers.get('content-type')).toBe('application/problem+json');
		expect(refused.headers.get('x-request-id')).not.toBeNull();
		const seconds = Number(refused.headers.get('retry-after'));
		expect(seconds).toBeGreaterThanOrEqual(1);
		expect(seconds).toBeLessThanOrEqual(60);
		expect((await refused.json()) as object).toMatchObject({
			status: 429,
			title: 'Too many requests',
			errors: []
		});
		const page = await fetch(`${server.origin}/about`);
		expect(page.status).toBe(429);
		expect(page.headers.get('retry-after')).not.toBeNull();
		expect((await fetch(`${server.origin}/health`)).status).toBe(200);
	} finally {
		await server.stop();
	}
});

test('the log has an id, a route, a status and a time for each request, and nothing of what was asked', async () => {
	const server = await OwnServer.start();
	const response = await fetch(`${server.origin}/?q=secret-words`);
	const { output } = await server.stop();
	const lines = output
		.split('\n')
		.filter((line) => line.startsWith('{'))
		.map((line) => JSON.parse(line) as Record<string, unknown>);
	const logged = lines.find(({ request }) => request === response.headers.get('x-request-id'));
	expect(logged).toMatchObject({ method: 'GET', route: '/', status: 200 });
	expect(typeof logged?.ms).toBe('number');
	expect(output).not.toContain('secret-words');
	expect(output).not.toContain('127.0.0.1');
});

test('on SIGTERM a running request is finished, the database closed, and the process ends with 0', async () => {
	const server = await OwnServer.start();
	// A request whose body is still on its way when the signal comes: the server has read its head, for it says "continue".
	const body = JSON.stringify({ studies: [{ events: 3, total: 10 }] });
	const headers = {
		'content-type': 'application/json',
		'content-length': body.length,
		expect: '100-continue'
	};
	const running = nodeRequest(`${server.origin}/api/v1/pool`, { method: 'POST', headers });
	const answered = new Promise<string>((resolve, reject) => {
		running.on('error', reject);
		running.on('response', (response) => {
			let text = '';
			response.setEncoding('utf8').on('data', (chunk: string) => (text += chunk));
			response.on('end', () => resolve(text));
		});
	});
	running.flushHeaders();
	await once(running, 'continue');
	running.write(body.slice(0, 10));
	server.signal('SIGTERM');
	const newcomer = () =>
		fetch(`${server.origin}/health`).then(
			() => 'answered',
			() => 'turned away'
		);
	await expect.poll(newcomer).toBe('turned away');
	running.end(body.slice(10));
	expect(JSON.parse(await answered)).toMatchObject({ studies: 1, observed: { min: 0.3, max: 0.3 } });
	const { code, output } = await server.ended();
	expect(code).toBe(0);
	expect(output).toContain('"msg":"stopped"');
});

test('a second start on the same data finds everything in place', async () => {
	const dataDir = mkdtempSync(path.join(os.tmpdir(), 'watersmeet-twice-'));
	try {
		const first = await OwnServer.start({ DATA_DIR: dataDir });
		expect((await first.stop()).output).toContain('literature seeded');
		const second = await OwnServer.start({ DATA_DIR: dataDir });
		expect(await (await fetch(`${second.origin}/health`)).json()).toEqual({ status: 'ok', tableRevision: 1 });
		expect((await second.stop()).output).toContain('literature unchanged');
	} finally {
		rmSync(dataDir, { recursive: true, force: true });
	}
});

for (const [name, environment, sentence] of [
	['a port that is none', { PORT: '70000' }, 'PORT must be a whole number from 1 to 65535.'],
	[
		'an origin that is none',
		{ ORIGIN: 'canals' },
		'ORIGIN must be an address such as https://canals.example.org.'
	],
	[
		'a log level that is none',
		{ LOG_LEVEL: 'loud' },
		'LOG_LEVEL must be fatal, error, warn, info, debug, trace or silent.'
	],
	[
		'a rate of none',
		{ RATE_LIMIT_PER_MINUTE: '0' },
		'RATE_LIMIT_PER_MINUTE must be a whole number, at least 1.'
	],
	['a data folder that cannot be', { DATA_DIR: '/dev/null/data' }, 'DATA_DIR could not be made'],
	['literature that is not there', { LITERATURE_DIR: '/dev/null/data' }, '/dev/null/data']
] as const) {
	test(`${name}: the server says so in a sentence and does not start`, async () => {
		const server = await OwnServer.spawn(environment);
		const { code, output } = await server.ended();
		expect(code).toBe(1);
		expect(output).toContain('Watersmeet cannot start:');
		expect(output).toContain(sentence);
		expect(output).not.toMatch(/\n\s+at /);
	});
}

test('two mistakes of the environment are both said', async () => {
	const server = await OwnServer.spawn({ PORT: 'abc', ORIGIN: 'nonsense' });
	const { code, output } = await server.ended();
	expect(code).toBe(1);
	expect(output.trimEnd().split('\n')).toEqual([
		'Watersmeet cannot start:',
		'  - PORT must be a whole number from 1 to 65535.',
		'  - ORIGIN must be an address such as https://canals.example.org.'
	]);
});

test('a port that is taken is named in a sentence', async ({ baseURL }) => {
	const { port } = new URL(baseURL!);
	const { code, output } = await (await OwnServer.spawn({ PORT: port })).ended();
	expect(code).toBe(1);
	expect(output).toContain(`PORT ${port} is taken by another program.`);
	expect(output).not.toMatch(/\n\s+at /);
});

test('no page asks anything of another host', async ({ page, baseURL }) => {
	const asked = new Set<string>();
	page.on('request', (request) => asked.add(new URL(request.url()).origin));
	for (const address of [
		PAGES.home,
		PAGES.tooth,
		PAGES.root,
		PAGES['join, answered'],
		PAGES.source,
		PAGES.about,
		PAGES.api,
		PAGES['rows not placed']
	])
		await page.goto(address);
	expect([...asked]).toEqual([new URL(baseURL!).origin]);
});
