import { TESTS } from '$lib/schemas/terms';
import { drawing } from '$lib/strings/drawing';
import { render } from 'svelte/server';
import { describe, expect, it } from 'vitest';
import FindingPicture from './FindingPicture.svelte';
import SequenceGlyph from './SequenceGlyph.svelte';

describe('FindingPicture', () => {
	it.each(TESTS)('draws %s with a text alternative', (finding) => {
		const { body } = render(FindingPicture, { props: { finding } });
		expect(body).toContain(`role="img" aria-label="${drawing.findings[finding]}"`);
		expect(body).not.toMatch(/ style=|undefined|NaN/);
	});

	it('takes the words of its page', () => {
		const { body } = render(FindingPicture, { props: { finding: 'draw', label: 'Draw test, positive' } });
		expect(body).toContain('aria-label="Draw test, positive"');
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
