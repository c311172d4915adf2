import { render } from 'svelte/server';
import { describe, expect, it } from 'vitest';
import type { FilterFields } from '$lib/filterQuery';
import TableFilters from './TableFilters.svelte';

const show = (fields: FilterFields, errors: { path: string; message: string }[] = []) =>
	render(TableFilters, {
		props: { fields, errors, countries: ['TUR', 'BRA', 'multi'], columns: ['figures', 'total'] }
	}).body;

describe('the filters of the table', () => {
	it('are a form that works without JavaScript and keeps the order', () => {
		const body = show([
			['q', 'mb"2'],
			['sort', '-year'],
			['cursor', 'abc']
		]);
		expect(body).toContain('method="get" action="/table"');
		expect(body).toContain('name="sort" value="-year"');
		expect(body).not.toContain('value="abc"');
		expect(body).toMatch(/name="q"[^>]*value="mb&quot;2"/);
		expect(body.match(/type="checkbox"[^>]*checked/g)).toHaveLength(2);
	});

	it('name countries in words, in order', () => {
		const names = [...show([]).matchAll(/<option value="(?:TUR|BRA|multi)"[^>]*>([^<]*)/g)].map(
			([, name]) => name
		);
		expect(names).toEqual(['Brazil', 'several countries', 'Türkiye']);
	});

	it('say at the field what is wrong, and keep what was given', () => {
		const body = show([['tooth', '16']], [{ path: 'tooth', message: 'The table knows no tooth "16".' }]);
		expect(body).toMatch(
			/<select id="filter-tooth" name="tooth"[^>]*aria-invalid="true"[^>]*aria-describedby="tooth-error"/
		);
		expect(body).toMatch(/id="tooth-error"[^>]*>The table knows no tooth "16"\./);
		expect(body).toMatch(/<option value="16" selected/);
		expect(body).toContain('role="alert"');
		expect(show([])).not.toContain('role="alert"');
	});
});
