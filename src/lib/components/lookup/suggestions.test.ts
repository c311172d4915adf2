import type { SearchHit } from '$lib/schemas/search';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { Suggestions, type Ask } from './suggestions.svelte';

const hit = (kind: SearchHit['kind'], title: string): SearchHit => ({
	kind,
	title,
	detail: '',
	address: `/${title}`
});
const HITS = [hit('tooth', 'a'), hit('tooth', 'b'), hit('source', 'c')];

beforeEach(() => void vi.useFakeTimers());
afterEach(() => void vi.useRealTimers());

/** Types each text with no pause between them, then lets all time pass. */
async function typed(list: Suggestions, ...texts: string[]) {
	for (const text of texts) list.typed(text);
	await vi.runAllTimersAsync();
}

describe('suggestions', () => {
	it('asks once for a word typed in one go, and groups the answer by kind', async () => {
		const ask = vi.fn<Ask>(() => Promise.resolve(HITS));
		const list = new Suggestions(ask);
		await typed(list, 'm', 'mo', ' molar ');
		expect(ask.mock.calls.map(([query]) => query)).toEqual(['molar']);
		expect(list.open).toBe(true);
		expect(list.groups.map(({ kind, items }) => [kind, items.map(({ index }) => index)])).toEqual([
			['tooth', [0, 1]],
			['source', [2]]
		]);
	});

	it('aborts what it asked before, and a late answer changes nothing', async () => {
		const answers: ((hits: SearchHit[]) => void)[] = [];
		const signals: AbortSignal[] = [];
		const list = new Suggestions((_query, signal) => {
			signals.push(signal);
			return new Promise((resolve) => answers.push(resolve));
		});
		await typed(list, 'mo');
		await typed(list, 'mb2');
		expect(signals.map(({ aborted }) => aborted)).toEqual([true, false]);
		answers[1]([hit('root', 'mb')]);
		answers[0](HITS);
		await vi.runAllTimersAsync();
		expect(list.items.map(({ title }) => title)).toEqual(['mb']);
	});

	it('moves through the list and the field, both ways round', async () => {
		const list = new Suggestions(() => Promise.resolve(HITS));
		await typed(list, 'molar');
		const reached = [1, 1, 1, 1, -1, -1].map((step) => {
			list.move(step as 1 | -1);
			return list.active;
		});
		expect(reached).toEqual([0, 1, 2, -1, 2, 1]);
		list.close();
		expect([list.open, list.active]).toEqual([false, -1]);
		list.move(-1);
		expect([list.open, list.active]).toEqual([true, 2]);
	});

	it('stays closed after Escape although an answer is on its way', async () => {
		const list = new Suggestions(() => Promise.resolve(HITS));
		list.typed('molar');
		list.close();
		await vi.runAllTimersAsync();
		expect(list.open).toBe(false);
	});

	it('closes without a complaint when the server cannot answer', async () => {
		const list = new Suggestions(() => Promise.reject(new Error('offline')));
		await typed(list, 'molar');
		expect([list.open, list.items]).toEqual([false, []]);
	});

	it('opens on nothing: no hits, or an empty field with nothing looked up before', async () => {
		const list = new Suggestions(() => Promise.resolve([]));
		await typed(list, 'zzzz');
		expect(list.open).toBe(false);
		await typed(list, '');
		expect(list.open).toBe(false);
		list.move(1);
		expect([list.open, list.active]).toEqual([false, -1]);
	});
});
