import { expect, test, type APIRequestContext } from '@playwright/test';

const API = '/api/v1';
const JSON_TYPE = { 'content-type': 'application/json' };

/** A request that the API refuses. */
export interface Refused {
	name: string;
	/** GET, or POST where there is a body. */
	method?: string;
	/** Below /api/v1. */
	address: string;
	body?: unknown;
	/** Sent as it is instead of `body`. */
	raw?: string;
	headers?: Record<string, string>;
	status: number;
	/** Paths that the errors name. */
	fields?: string[];
}

/** A refusal as the program that asked sees it. */
interface Answer {
	status: number;
	headers: Record<string, string | string[] | undefined>;
	text: string;
}

/** Checks a problem document (RFC 9457) from its status to its last field; it names the fields given. */
export function expectProblem({ status, headers, text }: Answer, expected: number, fields: string[] = []) {
	expect(status, text.slice(0, 500)).toBe(expected);
	expect(headers['content-type']).toBe('application/problem+json');
	const problem = JSON.parse(text) as {
		status: number;
		title: string;
		detail: string;
		errors: { path: string; message: string }[];
	};
	expect(Object.keys(problem).sort()).toEqual(['detail', 'errors', 'status', 'title', 'type']);
	expect(problem.status).toBe(expected);
	expect(problem.title).not.toBe('');
	expect(problem.detail).toMatch(/\.$/);
	expect(text).not.toMatch(/SELECT|SQLITE|\.js:\d|node_modules/);
	for (const field of fields) expect(problem.errors.map(({ path }) => path)).toContain(field);
	for (const { message } of problem.errors) expect(message.length).toBeGreaterThan(5);
	return problem;
}

async function send(request: APIRequestContext, { method, address, body, raw, headers }: Refused) {
	const sent = body === undefined ? raw : JSON.stringify(body);
	return request.fetch(`${API}${address}`, {
		method: method ?? (body === undefined ? 'GET' : 'POST'),
		headers: { ...(body !== undefined && JSON_TYPE), ...headers },
		...(sent !== undefined && { data: Buffer.from(sent) })
	});
}

/** One test for each request, that it is refused as it should be. */
export function testRefusals(cases: readonly Refused[]) {
	for (const one of cases) {
		test(`${one.name} is refused with ${one.status}`, async ({ request }) => {
			const response = await send(request, one);
			const headers = response.headers();
			expectProblem(
				{ status: response.status(), headers, text: await response.text() },
				one.status,
				one.fields
			);
			expect(headers['x-request-id']).toMatch(/^[0-9a-f-]{36}$/);
			if (one.status === 405) expect(headers.allow).toMatch(/GET|POST/);
		});
	}
}
