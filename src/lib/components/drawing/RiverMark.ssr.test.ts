import { readFileSync } from 'node:fs';
import { layoutRiverMark } from '$lib/drawing/riverMark';
import { render } from 'svelte/server';
import { describe, expect, it } from 'vitest';
import RiverMark from './RiverMark.svelte';

describe('RiverMark', () => {
	it('is silent beside the name and an image where it stands alone', () => {
		expect(render(RiverMark, { props: {} }).body).toContain('aria-hidden="true"');
		const alone = render(RiverMark, { props: { label: 'Watersmeet' } }).body;
		expect(alone).toContain('role="img" aria-label="Watersmeet"');
		expect(alone).not.toMatch(/ style=/);
	});

	it('has the shape of the icon that browsers show', () => {
		const icon = readFileSync('static/favicon.svg', 'utf8');
		const { streams, meeting } = layoutRiverMark(64);
		expect(icon).toContain(`d="${streams}"`);
		expect(icon).toContain(`cx="${meeting.x}" cy="${meeting.y}" r="${meeting.radius}"`);
	});
});
