import { problemSchema } from '$lib/schemas/common';
import { describe, expect, it } from 'vitest';
import { Problem, problemResponse } from './problem';

describe('problemResponse', () => {
	// RFC 9457, sections 3 and 3.1: media type and members of a problem document.
	it('is a problem document with the status, its headers, and no room in a cache', async () => {
		const errors = [{ path: 'findings.1.test', message: 'The test must be one of these.' }];
		const response = problemResponse(
			new Problem(422, 'Some values are out of range.', errors, { allow: 'GET' })
		);
		expect(response.status).toBe(422);
		expect(response.headers.get('content-type')).toBe('application/problem+json');
		expect(response.headers.get('cache-control')).toBe('no-store');
		expect(response.headers.get('allow')).toBe('GET');
		const body: unknown = await response.json();
		expect(body).toEqual({
			type: 'about:blank',
			title: 'A value is out of range',
			status: 422,
			detail: 'Some values are out of range.',
			errors
		});
		expect(problemSchema.parse(body)).toEqual(body);
	});

	it('has a title of its own for every status the API speaks of, and some title for any other', async () => {
		const titleOf = async (status: number) =>
			problemSchema.parse(await problemResponse(new Problem(status, 'Detail.')).json()).title;
		const statuses = [400, 403, 404, 405, 413, 415, 422, 429, 500, 503];
		const titles = await Promise.all(statuses.map(titleOf));
		expect(new Set([...titles, await titleOf(418)]).size).toBe(statuses.length + 1);
	});
});
