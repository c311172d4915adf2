import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { AttemptLimit } from './limits';

beforeEach(() => void vi.useFakeTimers({ now: 0 }));
afterEach(() => void vi.useRealTimers());

const taken = async (limit: AttemptLimit, key: string, times: number) => {
	const waits: number[] = [];
	for (let time = 0; time < times; time++) waits.push(await limit.take(key));
	return waits;
};

describe('AttemptLimit', () => {
	it('lets so many through, then says how long to wait, and forgets after its window', async () => {
		const limit = new AttemptLimit(3, 60);
		expect(await taken(limit, 'a', 4)).toEqual([0, 0, 0, 60]);
		await vi.advanceTimersByTimeAsync(45_000);
		expect(await limit.take('a')).toBe(15);
		await vi.advanceTimersByTimeAsync(15_001);
		expect(await limit.take('a')).toBe(0);
	});

	it('counts keys apart, so that nobody is kept waiting by others', async () => {
		const limit = new AttemptLimit(1, 60);
		expect(await taken(limit, 'a', 2)).toEqual([0, 60]);
		expect(await limit.take('b')).toBe(0);
	});

	it('counts before the work is done: many at once cannot slip through', async () => {
		const limit = new AttemptLimit(3, 60);
		const waits = await Promise.all(Array.from({ length: 10 }, () => limit.take('a')));
		expect(waits.filter((wait) => wait === 0)).toHaveLength(3);
	});

	it('gives an attempt back that was rightful, and forgets a key', async () => {
		const limit = new AttemptLimit(2, 60);
		for (let time = 0; time < 10; time++) {
			expect(await limit.take('a')).toBe(0);
			await limit.giveBack('a');
		}
		expect(await taken(limit, 'a', 3)).toEqual([0, 0, 60]);
		await limit.forget('a');
		expect(await limit.take('a')).toBe(0);
	});
});
