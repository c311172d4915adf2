import { render } from 'svelte/server';
import { describe, expect, it } from 'vitest';
import FateBars from './FateBars.svelte';

const body = render(FateBars, {
	props: {
		label: 'What becomes of the canals',
		fates: [
			{ fate: 'shared-exit', mean: 0.63, interval: [0.35, 0.88] },
			{ fate: 'separate', mean: 0.366, interval: [0.1, 0.6] },
			{ fate: 'meet-and-part', mean: 0.004, interval: [0, 0.02] }
		]
	}
}).body.replaceAll('\u00a0', ' ');
const items = (body.match(/<li[\s\S]*?<\/li>/g) ?? []).map((item) => ({
	item,
	words: item
		.replace(/<[^>]*>/g, '')
		.replace(/\s+/g, ' ')
		.trim()
}));

describe('FateBars', () => {
	it('says each fate as a sentence, a number and a range', () => {
		expect(items.map(({ words }) => words)).toEqual([
			'Meet and share one exit about 6 in 10, 63 % (35 to 88 %)',
			'Stay separate about 4 in 10, 37 % (10 to 60 %)',
			'Meet, then part again fewer than 1 in 100, under 1 % (0 to 2 %)'
		]);
	});

	it('gives each bar a text alternative', () => {
		expect(items[0].item).toContain(
			'role="img" aria-label="Meet and share one exit: 63 %, 95 % interval 35 to 88 %"'
		);
	});

	it('puts the sign of a confluence at the fates that have one', () => {
		expect(items.map(({ item }) => item.includes('stroke-coral'))).toEqual([true, false, true]);
	});

	it('needs no style attribute', () => {
		expect(body).not.toMatch(/ style=/);
	});
});
