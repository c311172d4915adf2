import { describe, expect, it } from 'vitest';
import { keptFields, packForm, unpackForm, valuesOf } from './keptForm';

function form(...fields: [string, string | File][]): FormData {
	const data = new FormData();
	for (const [name, value] of fields) data.append(name, value);
	return data;
}

describe('what a form held', () => {
	it('is kept in its order, repeats and empty fields and all, but for secrets and files', () => {
		const kept = keptFields(
			form(
				['title', 'Two\r\nlines'],
				['category', 'a'],
				['category', ''],
				['own-password', 'x'],
				['code', '123456'],
				['page', new File(['x'], 'page.png')],
				['nothing', new File([], '')]
			)
		);
		expect(kept).toEqual({
			fields: [
				['title', 'Two\r\nlines'],
				['category', 'a'],
				['category', '']
			],
			lost: ['own-password', 'code', 'page']
		});
		expect(valuesOf(kept.fields)).toEqual({ title: 'Two\r\nlines', category: ['a', ''] });
	});

	it('has names that are no danger to objects', () => {
		expect(Object.entries(valuesOf([['toString', 'x']]))).toEqual([['toString', 'x']]);
	});

	it('has an end, and says what lies beyond it', () => {
		const kept = keptFields(form(['long', 'x'.repeat(499_990)], ['more', 'x'.repeat(100)], ['b', '1']));
		expect(kept.fields.map(([name]) => name)).toEqual(['long']);
		expect(kept.lost).toEqual(['more', 'b']);
	});

	it('passes through a hidden field unchanged, and nothing else does', () => {
		const kept = { fields: [['a', '"<&>\u2028'] as [string, string]], lost: ['page'] };
		expect(unpackForm(packForm(kept))).toEqual(kept);
		for (const wrong of [
			null,
			'',
			'{',
			'[]',
			'{"fields":[["a"]],"lost":[]}',
			'{"fields":[["a",1]],"lost":[]}',
			'{"fields":[]}'
		])
			expect(unpackForm(wrong)).toBe(null);
	});
});
