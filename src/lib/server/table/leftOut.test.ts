import { describe, expect, it } from 'vitest';
import { entriesQuerySchema } from '$lib/schemas/table';
import { Problem } from '../api/problem';
import { readLeavingOut } from './leftOut';

describe('reading a list from an address', () => {
	it('leaves out what cannot be used, says why, and keeps the rest', async () => {
		const { query, errors, result } = await readLeavingOut(
			[
				['tooth', '16'],
				['method', 'guess'],
				['limit', '-1'],
				['q', 'mb2'],
				['q', 'twice']
			],
			entriesQuerySchema,
			(query) => {
				if (query.tooth) throw new Problem(422, 'x', [{ path: 'tooth', message: 'Unknown.' }]);
				return Promise.resolve('read');
			}
		);
		expect(result).toBe('read');
		expect(query).toEqual({ sort: 'id', limit: 50 });
		expect(errors.map(({ path }) => path).sort()).toEqual(['limit', 'method', 'q', 'tooth']);
	});

	it('passes on what is no mistake of the address', async () => {
		const fails = (problem: Error) => readLeavingOut([], entriesQuerySchema, () => Promise.reject(problem));
		await expect(fails(new Error('broken'))).rejects.toThrow('broken');
		await expect(fails(new Problem(503, 'busy'))).rejects.toMatchObject({ status: 503 });
		await expect(fails(new Problem(422, 'x', [{ path: 'tooth', message: 'y' }]))).rejects.toMatchObject({
			status: 422
		});
	});
});
