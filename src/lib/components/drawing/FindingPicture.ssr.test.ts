import { TESTS } from '$lib/schemas/terms';
import { drawing } from '$lib/strings/drawing';
import { render } from 'svelte/server';
import { describe, expect, it } from 'vitest';
import FindingPicture from './FindingPicture.svelte';
import SequenceGlyph from './SequenceGlyph.svelte';

describe('FindingPicture', () => {
	it.each(TESTS)('draws both results of %s, each with a text alternative', (finding) => {
		const [positive, negative] = (['positive', 'negative'] as const).map((result) => {
			const { body } = render(FindingPicture, { props: { finding, result } });
			expect(body).toContain(`role="img" aria-label="${drawing.findings[finding][result]}"`);
			expect(body).not.toMatch(/ style=|undefined|NaN/);
			return body;
		});
		// The sign of a confluence stands where canals meet and nowhere else.
		expect(positive).toContain('stroke-coral');
		expect(negative).not.toContain('stroke-coral');
	});
});

describe('SequenceGlyph', () => {
	it('is an image where it has a label, and silent where words stand beside it', () => {
		const labelled = render(SequenceGlyph, { props: { sequence: '2-1', label: 'Sequence 2-1' } }).body;
		expect(labelled).toContain('role="img" aria-label="Sequence 2-1"');
		const silent = render(SequenceGlyph, { props: { sequence: '2-1' } }).body;
		expect(silent).toContain('aria-hidden="true"');
		expect(labelled + silent).not.toMatch(/ style=/);
	});
});
