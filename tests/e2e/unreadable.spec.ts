import { expect, test } from '@playwright/test';
import { sendBytes, sendRaw } from './support/raw';
import { expectProblem } from './support/refused';

/** What a client library would tidy, refuse or never send: requests as bytes. */

const METHODS = ['GET', 'HEAD', 'POST', 'PUT', 'PATCH', 'DELETE', 'OPTIONS', 'TRACE', 'PROPFIND'];
const JSON_TYPE = { 'content-type': 'application/json' };

test('every address answers every other method with 405 and the methods it has', async ({
	request,
	baseURL
}) => {
	const document = (await (await request.get('/api/v1/openapi.json')).json()) as {
		paths: Record<string, Record<string, unknown>>;
	};
	const paths = Object.entries(document.paths);
	expect(paths.length).toBeGreaterThan(9);
	for (const [path, operations] of paths) {
		const has = Object.keys(operations).flatMap((name) =>
			name === 'get' ? ['GET', 'HEAD'] : [name.toUpperCase()]
		);
		const address = `/api/v1${path.replace(/\{\w+\}/g, 'x')}`;
		for (const method of METHODS.filter((name) => !has.includes(name))) {
			const answer = await sendRaw(baseURL!, address, { method });
			expect(answer.status, `${method} ${address}`).toBe(405);
			expect(String(answer.headers.allow).split(', ').sort(), `${method} ${address}`).toEqual(has.sort());
			// An answer to HEAD has no body.
			if (method !== 'HEAD') expectProblem(answer, 405);
			expect(answer.headers['x-request-id']).toMatch(/^[0-9a-f-]{36}$/);
		}
	}
});

for (const [address, status] of [
	['/api/v1/teeth/%E0%A4%A', 400],
	['/api/v1/teeth/%', 400],
	['/api/v1/%ZZ/teeth', 400],
	['/api/v1/sources/%C0%AE%C0%AE', 400],
	['/api/v1/teeth/../teeth/nothing', 404],
	['/api/v1/teeth/..%2F..%2Fhealth', 404],
	['/api/v1/teeth/maxillary-first-molar%00', 404],
	['/api/v1/teeth//', 404],
	['/api/v1/teeth/maxillary-first-molar/__data.json', 404],
	['/api/v1/entries?%E0%A4%A=1', 422],
	['/api/v1/entries?sort=%E0%A4%A', 422],
	['/api/v1/entries?sort=id%00', 422]
] as const) {
	test(`${address} is answered with ${status}`, async ({ baseURL }) => {
		const answer = await sendRaw(baseURL!, address);
		expectProblem(answer, status);
		expect(answer.headers['x-request-id']).toMatch(/^[0-9a-f-]{36}$/);
	});
}

test('a body that streams past the limit is cut off with 413', async ({ baseURL }) => {
	const chunks = ['{"studies":[],"padding":"', ...Array.from({ length: 64 }, () => 'x'.repeat(16 * 1024))];
	const answer = await sendRaw(baseURL!, '/api/v1/pool', { method: 'POST', headers: JSON_TYPE, chunks });
	expectProblem(answer, 413);
});

test('a streamed body is taken, also where a letter is cut in two', async ({ baseURL }) => {
	const chunks = ['{"studies":[{"events":1,', '"total":2}]', '}'];
	const answer = await sendRaw(baseURL!, '/api/v1/pool', { method: 'POST', headers: JSON_TYPE, chunks });
	expect(answer.status).toBe(200);
	expect(JSON.parse(answer.text)).toMatchObject({ studies: 1 });
});

test('text that is not UTF-8 is no JSON', async ({ request }) => {
	const response = await request.post('/api/v1/pool', {
		headers: JSON_TYPE,
		data: Buffer.from('{"studies":"Ø"}', 'latin1')
	});
	expectProblem({ status: response.status(), headers: response.headers(), text: await response.text() }, 400);
});

for (const [name, bytes, status] of [
	[
		'an address longer than the server takes',
		`GET /api/v1/teeth?q=${'a'.repeat(20_000)} HTTP/1.1\r\nHost: x\r\n\r\n`,
		431
	],
	[
		'a header longer than the server takes',
		`GET / HTTP/1.1\r\nHost: x\r\nX: ${'a'.repeat(20_000)}\r\n\r\n`,
		431
	],
	['what is no HTTP', 'Good morning!\r\n\r\n', 400],
	['a header with a line break in its name', 'GET /api/v1/teeth HTTP/1.1\r\nHo st: x\r\n\r\n', 400],
	[
		'two lengths that differ',
		'POST /api/v1/pool HTTP/1.1\r\nHost: x\r\nContent-Length: 2\r\nContent-Length: 5\r\n\r\n{}',
		400
	]
] as const) {
	test(`${name} is answered with ${status}, and the server goes on`, async ({ baseURL, request }) => {
		expectProblem(await sendBytes(baseURL!, bytes), status);
		expect((await request.get('/health')).status()).toBe(200);
	});
}

test('preferences that are no form are refused, not broken by', async ({ baseURL }) => {
	const origin = new URL(baseURL!).origin;
	for (const [type, body] of [
		['application/json', '{"theme":"dark"}'],
		['text/plain', 'theme=dark'],
		['multipart/form-data', 'theme=dark'],
		['multipart/form-data; boundary=x', 'theme=dark'],
		['', '']
	]) {
		const answer = await sendRaw(baseURL!, '/preferences', {
			method: 'POST',
			headers: { origin, ...(type && { 'content-type': type }) },
			chunks: [body]
		});
		// Without a length it is refused before it is read.
		expect([400, 411], type).toContain(answer.status);
		expect(answer.headers['set-cookie'], type).toBeUndefined();
	}
});
