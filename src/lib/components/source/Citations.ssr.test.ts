import { render } from 'svelte/server';
import { describe, expect, it } from 'vitest';
import type { SourceFact } from '$lib/schemas/table';
import Citations from './Citations.svelte';
import FactList from './FactList.svelte';
import MeasurementList from './MeasurementList.svelte';

describe('the citations of a source', () => {
	const body = render(Citations, {
		props: {
			id: 'id/with slash',
			citations: [
				{ format: 'vancouver', text: 'Adams A. Canals. 2001.' },
				{ format: 'bibtex', text: '@article{adams, title = {<b>}}' }
			]
		}
	}).body;

	it('can be read and downloaded without JavaScript', () => {
		expect(body).toContain('Adams A. Canals. 2001.');
		expect(body).toContain('@article{adams, title = {&lt;b>}}');
		expect(body).toContain('href="/api/v1/sources/id%2Fwith%20slash?format=bibtex" download');
		expect(body).not.toContain('<button');
	});
});

describe('what a source gave besides entries', () => {
	it('says what was quoted elsewhere and what was recalled', () => {
		const measurement = {
			...{
				source: 'a',
				locator: 'table 1',
				tooth: '',
				root: 'MB',
				scope: '',
				country: 'BRA',
				method: 'cbct'
			},
			...{ quantity: 'root-length', n: 10, mean: 12, sd: null, min: null, max: null, unit: 'mm', note: '' }
		};
		const list = (provenance: 'read' | 'secondary' | 'memory') =>
			render(MeasurementList, {
				props: { measurements: [{ ...measurement, provenance, verified: provenance !== 'memory' }] }
			}).body;
		expect(list('read')).not.toContain('quoted');
		expect(list('secondary')).toContain('quoted in another source');
		expect(list('memory')).toContain('unverified');
		expect(list('read')).toContain('Brazil');
	});

	it('gives a fact its standing, unless it was worked out, and is silent without facts', () => {
		const fact = { head: 'Size 25', figures: '0.25 mm', detail: 'Norm 1', verified: false };
		const list = (facts: SourceFact[]) =>
			render(FactList, { props: { id: 'standards', title: 'From the standard', facts } }).body;
		expect(list([{ ...fact, provenance: 'memory' }])).toContain('unverified');
		expect(list([{ ...fact, provenance: null }])).not.toContain('verified');
		expect(list([])).not.toContain('From the standard');
	});
});
