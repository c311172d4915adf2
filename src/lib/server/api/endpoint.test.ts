import type { RequestEvent } from '@sveltejs/kit';
import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { requestEvent } from '../../../../tests/support/requestEvent';
import { endpoint, readBody, readQuery } from './endpoint';
import { Problem } from './problem';

const ADDRESS = 'http://localhost:3000/api/v1/pool';
const LIMIT_BYTES = 2048;

const schema = z.strictObject({
	name: z.string('Give a name.'),
	studies: z
		.array(z.strictObject({ total: z.number('Give a number.').int('Give a whole number.') }))
		.optional()
});

function posted(body: BodyInit | null, headers: Record<string, string> = {}): RequestEvent {
	// Node streams a body only half duplex; the DOM's type does not know the word.
	const init = {
		method: 'POST',
		body,
		duplex: 'half',
		headers: { 'content-type': 'application/json', ...headers }
	};
	return requestEvent(new Request(ADDRESS, init));
}

function streamed(...chunks: Uint8Array<ArrayBuffer>[]): ReadableStream<Uint8Array<ArrayBuffer>> {
	return new ReadableStream({
		start(controller) {
			for (const chunk of chunks) controller.enqueue(chunk);
			controller.close();
		}
	});
}

const bytes = (text: string) => new TextEncoder().encode(text);
const read = (event: RequestEvent) => readBody(event, schema, LIMIT_BYTES);

/** The problem that reading ends in. */
async function problemOf(reading: Promise<unknown>): Promise<Problem> {
	const error: unknown = await reading.then(
		() => 'read',
		(reason: unknown) => reason
	);
	expect(error).toBeInstanceOf(Problem);
	return error as Problem;
}

describe('readBody', () => {
	it.each(['application/json', 'application/json; charset=utf-8', 'Application/JSON ;charset=utf-8'])(
		'reads a body sent as %s',
		async (type) => {
			const event = posted('{"name":"Ørsted","studies":[{"total":3}]}', { 'content-type': type });
			expect(await read(event)).toEqual({ name: 'Ørsted', studies: [{ total: 3 }] });
		}
	);

	it.each([
		'text/plain',
		'application/x-www-form-urlencoded',
		'application/jsonp',
		'x/y; application/json',
		''
	])('refuses one sent as "%s" with 415', async (type) => {
		expect((await problemOf(read(posted('{"name":"a"}', { 'content-type': type })))).status).toBe(415);
	});

	it.each(['', '{"name":', '{name:"a"}', 'null,'])('refuses %j, which is no JSON, with 400', async (text) => {
		expect((await problemOf(read(posted(text)))).status).toBe(400);
	});

	it('refuses a request without any body with 400', async () => {
		expect((await problemOf(read(posted(null)))).status).toBe(400);
	});

	it('refuses text that is not UTF-8 with 400, and takes a letter split between two chunks', async () => {
		const latin1 = Buffer.from('{"name":"Ørsted"}', 'latin1');
		const problem = await problemOf(read(posted(streamed(new Uint8Array(latin1)))));
		expect([problem.status, problem.detail]).toEqual([400, 'The body is not valid UTF-8.']);
		const whole = bytes('{"name":"Ø"}');
		const cut = whole.indexOf(0xc3) + 1;
		expect(await read(posted(streamed(whole.slice(0, cut), whole.slice(cut))))).toEqual({ name: 'Ø' });
	});

	it('refuses what says of itself that it is too large with 413, unread', async () => {
		const event = posted(streamed(bytes('{"name":"a"}')), { 'content-length': String(LIMIT_BYTES + 1) });
		expect(await problemOf(read(event))).toMatchObject({
			status: 413,
			detail: 'The body is larger than 2 kB.'
		});
		expect(event.request.bodyUsed).toBe(false);
	});

	it('stops reading what does not say so once it is too large, with 413', async () => {
		let sent = 0;
		const long = new ReadableStream<Uint8Array<ArrayBuffer>>({
			pull(controller) {
				sent += 1;
				controller.enqueue(new Uint8Array(512));
				if (sent === 1000) controller.close();
			}
		});
		expect((await problemOf(read(posted(long)))).status).toBe(413);
		expect(sent).toBeLessThan(20);
	});

	it('takes a body of exactly the limit', async () => {
		const start = '{"name":"';
		const name = 'a'.repeat(LIMIT_BYTES - start.length - 2);
		expect(await read(posted(streamed(bytes(`${start}${name}"}`))))).toEqual({ name });
		expect((await problemOf(read(posted(streamed(bytes(`${start}${name}a"}`)))))).status).toBe(413);
	});

	it('answers with 413 when the stream breaks at the limit of the server itself', async () => {
		const broken = new ReadableStream({ start: (controller) => controller.error(new Error('too long')) });
		expect((await problemOf(read(posted(broken)))).status).toBe(413);
	});

	it('names each field that the schema refuses, unknown ones by their own names', async () => {
		const text = '{"studies":[{"total":1},{"total":1.5,"extra":1}],"nmae":"a"}';
		const { status, errors } = await problemOf(read(posted(text)));
		expect(status).toBe(422);
		const sorted = [...errors].sort((a, b) => a.path.localeCompare(b.path));
		expect(sorted).toEqual([
			{ path: 'name', message: 'Give a name.' },
			{ path: 'nmae', message: 'This field is not known here.' },
			{ path: 'studies.1.extra', message: 'This field is not known here.' },
			{ path: 'studies.1.total', message: 'Give a whole number.' }
		]);
	});

	it.each(['null', '[]', '"text"', '4'])('refuses %s, which is no object, with 422', async (text) => {
		expect(await problemOf(read(posted(text)))).toMatchObject({ status: 422, errors: [{ path: '' }] });
	});
});

describe('readQuery', () => {
	const query = z.strictObject({
		q: z.string('Give words once.').optional(),
		limit: z.coerce.number('Give a number.').optional(),
		method: z.array(z.string()).optional()
	});
	const at = (search: string) => readQuery(new URL(`${ADDRESS}${search}`).searchParams, query, ['method']);

	it('reads single values as text, and names that may repeat always as lists', () => {
		expect(at('?q=M%C3%98+B&limit=7')).toEqual({ q: 'MØ B', limit: 7 });
		expect(at('?method=cbct')).toEqual({ method: ['cbct'] });
		expect(at('?method=cbct&q=a&method=micro-ct')).toEqual({ q: 'a', method: ['cbct', 'micro-ct'] });
		expect(at('')).toEqual({});
	});

	it.each([
		['?limit=many', 'limit'],
		['?q=a&q=b', 'q'],
		['?qq=a', 'qq']
	])('refuses %s with 422 at its field', (search, path) => {
		expect(() => at(search)).toThrow(
			expect.objectContaining({ status: 422, errors: [expect.objectContaining({ path })] })
		);
	});
});

describe('endpoint', () => {
	const event = posted('{}');

	it('sends what the handler returns as JSON, also when it returns it later', async () => {
		const now = await endpoint(() => ({ a: 1 }))(event);
		expect(now.headers.get('content-type')).toBe('application/json');
		expect([now.status, await now.json()]).toEqual([200, { a: 1 }]);
		expect(await (await endpoint(() => Promise.resolve([1]))(event)).json()).toEqual([1]);
	});

	it('lets a response pass as it is', async () => {
		const response = new Response(null, { status: 204 });
		expect(await endpoint(() => response)(event)).toBe(response);
	});

	it('turns a problem thrown at once or later into a problem document', async () => {
		const problem = new Problem(404, 'There is no such tooth.');
		const thrown = endpoint(() => {
			throw problem;
		});
		for (const handler of [thrown, endpoint(() => Promise.reject(problem))]) {
			const response = await handler(event);
			expect(response.status).toBe(404);
			expect(response.headers.get('content-type')).toBe('application/problem+json');
			expect(await response.json()).toMatchObject({ status: 404, detail: 'There is no such tooth.' });
		}
	});

	it('lets any other error through to kit', async () => {
		const defect = new TypeError('undefined is not a function');
		await expect(endpoint(() => Promise.reject(defect))(event)).rejects.toBe(defect);
	});
});
