import type { ExpectationData } from '$lib/drawing/expectation';
import { render } from 'svelte/server';
import { describe, expect, it } from 'vitest';
import ExpectationDrawing from './ExpectationDrawing.svelte';

const data: ExpectationData = {
	sequences: [
		{ sequence: '1', probability: 0.412, joinLevelMm: null, interval: [0.2, 0.65] },
		{ sequence: '2-1', probability: 0.35, joinLevelMm: 3.7 },
		{ sequence: '2-1-2', probability: 0.234, joinLevelMm: null },
		{ sequence: '3', probability: 0.004, joinLevelMm: null }
	],
	rootLengthMm: 13,
	lengthStanding: 'assumed'
};
const text = { label: 'Upper first molar, MB root', description: 'Most often one canal, about 4 in 10.' };
const html = (change: object = {}) =>
	render(ExpectationDrawing, { props: { data, ...text, ...change } }).body.replaceAll('\u00a0', ' ');

describe('ExpectationDrawing without JavaScript', () => {
	it('is an image with a name and a description', () => {
		const [, title, desc] = /role="img" aria-labelledby="(\S+) (\S+)"/.exec(html()) ?? [];
		expect(html()).toContain(`<title id="${title}">${text.label}</title>`);
		expect(html()).toContain(`<desc id="${desc}">${text.description}</desc>`);
	});

	it('draws a stream for each sequence, as strong as it is probable', () => {
		for (const opacity of ['0.412', '0.35', '0.234', '0.004']) {
			expect(html()).toContain(`stroke-opacity="${opacity}"`);
		}
	});

	it('lists each sequence with its probability, in words and focusable', () => {
		const buttons = html().match(/<button[\s\S]*?<\/button>/g) ?? [];
		const words = buttons.map((button) =>
			button
				.replace(/<[^>]*>/g, ' ')
				.replace(/\s+/g, ' ')
				.trim()
		);
		expect(words).toEqual([
			'1 One canal 41 % (20 to 65 %)',
			'2-1 Meet and share one exit 35 %',
			'2-1-2 Meet, then part again 23 %',
			'3 Stay separate, too rare to draw under 1 %'
		]);
		expect(buttons.every((button) => button.includes('aria-pressed="false"'))).toBe(true);
	});

	it('has a link for each sequence where the page can show it alone, and one back to all', () => {
		const address = (sequence: string | null) => (sequence === null ? '/here' : `/here?show=${sequence}`);
		const alone = html({ show: '2-1', showAddress: address });
		expect(alone).not.toContain('<button');
		const links = [...alone.matchAll(/<a [^>]*href="([^"]*)"[^>]*>/g)].map(([tag, href]) => [
			href,
			tag.includes('aria-current="true"')
		]);
		expect(links).toEqual([
			['/here?show=1', false],
			['/here', true],
			['/here?show=2-1-2', false],
			['/here?show=3', false],
			['/here', false]
		]);
		// 2-1 in full, the others faded, and the text alternative says so.
		const opacities = [...alone.matchAll(/stroke-opacity="([\d.]+)" stroke-width="7"/g)].map(
			([, value]) => value
		);
		expect(opacities).toEqual(['0.04', '1', '0.04', '0.004']);
		expect(alone).toContain('Shown alone: 2-1.</desc>');
	});

	it('draws a sequence that samples only name when it is shown alone, and not before', () => {
		const seen = { ...data, alsoSeen: [{ sequence: '1-3-2', joinLevelMm: null }] };
		const address = (sequence: string | null) => `/here?show=${sequence ?? ''}`;
		const opacity = (page: string) =>
			[...page.matchAll(/stroke-opacity="([\d.]+)" stroke-width="7"/g)].at(-1)?.[1];
		expect(opacity(html({ data: seen }))).toBe('0');
		expect(html({ data: seen })).toContain('counted with 1-2');
		expect(opacity(html({ data: seen, show: '1-3-2', showAddress: address }))).toBe('1');
	});

	it('shows all when the sequence asked for is not one of the root', () => {
		expect(html({ show: '4-1' })).toContain('stroke-opacity="0.412"');
	});

	it('says what is published and what is not', () => {
		expect(html()).toContain('3.7 mm');
		expect(html()).toContain('level not');
		expect(html()).toContain('13 mm is assumed');
		expect(html()).toContain('Canals meet here');
		expect(html({ data: { ...data, lengthStanding: 'published' } })).toContain('a published mean');
	});

	it('needs no style attribute', () => {
		expect(html()).not.toMatch(/ style=/);
	});

	it('leaves ruler, words and list out when compact', () => {
		const compact = html({ compact: true });
		expect(compact).toContain('role="img"');
		expect(compact).not.toMatch(/<button|<text| style=/);
	});
});
