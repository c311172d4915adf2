import { describe, expect, it } from 'vitest';
import { OneByOne } from './oneByOne';

describe('OneByOne', () => {
	it('runs one at a time in order, goes on after a failure, and refuses what is too much', async () => {
		const queue = new OneByOne(3);
		const log: string[] = [];
		let running = 0;
		const task =
			(name: string, fails = false) =>
			async () => {
				running++;
				expect(running).toBe(1);
				await Promise.resolve();
				log.push(name);
				running--;
				if (fails) throw new Error(name);
			};
		expect([queue.add(task('a')), queue.add(task('b', true)), queue.add(task('c'))]).toEqual([
			true,
			true,
			true
		]);
		expect(queue.add(task('d'))).toBe(false);
		await new Promise((resolve) => setTimeout(resolve, 5));
		expect(log).toEqual(['a', 'b', 'c']);
		expect(queue.add(task('e'))).toBe(true);
		await new Promise((resolve) => setTimeout(resolve, 5));
		expect(log).toEqual(['a', 'b', 'c', 'e']);
	});
});
