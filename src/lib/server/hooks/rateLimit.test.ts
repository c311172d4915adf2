import { describe, expect, it, vi } from 'vitest';
import { requestEvent } from '../../../../tests/support/requestEvent';
import { rateLimit } from './rateLimit';

// The limit is read when the module is.
vi.hoisted(() => {
	process.env.RATE_LIMIT_PER_MINUTE = '3';
});

async function ask(path: string, address: string): Promise<Response> {
	const event = requestEvent(new Request(`http://localhost:3000${path}`), {
		getClientAddress: () => address
	});
	return rateLimit({ event, resolve: () => new Response('through') });
}

const statuses = async (times: number, path: string, address: string) => {
	const seen: number[] = [];
	for (let time = 0; time < times; time++) seen.push((await ask(path, address)).status);
	return seen;
};

describe('rateLimit', () => {
	it('lets as many requests a minute through as the environment says, then answers 429 with when to come again', async () => {
		expect(await statuses(4, '/api/v1/teeth', '192.0.2.1')).toEqual([200, 200, 200, 429]);
		const refused = await ask('/api/v1/teeth', '192.0.2.1');
		expect(refused.headers.get('content-type')).toBe('application/problem+json');
		const seconds = Number(refused.headers.get('retry-after'));
		expect(seconds).toBeGreaterThanOrEqual(1);
		expect(seconds).toBeLessThanOrEqual(60);
		expect(await refused.json()).toMatchObject({
			status: 429,
			detail: `Too many requests. Try again in ${seconds} s.`
		});
	});

	it('counts each address by itself, pages and API together', async () => {
		expect(await statuses(2, '/', '192.0.2.2')).toEqual([200, 200]);
		expect(await statuses(2, '/api/v1/teeth', '192.0.2.2')).toEqual([200, 429]);
		const page = await ask('/', '192.0.2.2');
		expect(page.status).toBe(429);
		expect(page.headers.get('retry-after')).toMatch(/^\d+$/);
		expect(await page.text()).toContain('Too many requests');
	});

	it.each(['/health', '/api/v1/health'])('never refuses %s', async (path) => {
		expect(await statuses(10, path, '192.0.2.3')).toEqual(Array<number>(10).fill(200));
	});
});
