import { problemSchema } from '$lib/schemas/common';
import { describe, expect, it } from 'vitest';
import { requestEvent } from '../../../../tests/support/requestEvent';
import { Problem, problemResponse } from '../api/problem';
import { apiProblems, isApi } from './apiProblems';

const handle = async (path: string, response: Response) =>
	apiProblems({
		event: requestEvent(new Request(`http://localhost:3000${path}`)),
		resolve: () => response
	});

describe('apiProblems', () => {
	it.each([
		[400, 'could not be read'],
		[403, 'not allowed'],
		[404, 'nothing at this address'],
		[405, 'does not answer that method'],
		[413, 'too large'],
		[500, 'The log has the details'],
		[502, 'The log has the details']
	])('turns a bare %i of the API into a problem document', async (status, words) => {
		const page = new Response('<h1>secret stack</h1>', { status, headers: { 'content-type': 'text/html' } });
		const response = await handle('/api/v1/nowhere', page);
		expect(response.status).toBe(status);
		expect(response.headers.get('content-type')).toBe('application/problem+json');
		const body = problemSchema.parse(await response.json());
		expect(body).toMatchObject({ status, errors: [] });
		expect(body.detail).toContain(words);
		expect(JSON.stringify(body)).not.toContain('secret');
	});

	it('keeps the methods that are allowed', async () => {
		const response = await handle(
			'/api/v1/pool',
			new Response('', { status: 405, headers: { allow: 'POST' } })
		);
		expect(response.headers.get('allow')).toBe('POST');
	});

	it.each([
		['a success of the API', '/api/v1/teeth', new Response('{}', { status: 200 })],
		['a redirect of the API', '/api/v1/teeth/', new Response(null, { status: 308 })],
		['a problem of the API', '/api/v1/teeth/x', problemResponse(new Problem(404, 'There is no tooth "x".'))],
		['a failure of a page', '/teeth/x', new Response('<h1>Not found</h1>', { status: 404 })]
	])('leaves %s as it is', async (_, path, response) => {
		expect(await handle(path, response)).toBe(response);
	});
});

describe('isApi', () => {
	it.each([
		['/api/v1', true],
		['/api/v1/', true],
		['/api/v1/teeth', true],
		['/api', false],
		['/api/v10', false],
		['/', false]
	])('of %s is %s', (path, expected) => {
		expect(isApi(path)).toBe(expected);
	});
});
