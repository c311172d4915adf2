import { describe, expect, it } from 'vitest';
import { readView, viewFields } from './rootView';

const read = (query: string) => readView(new URLSearchParams(query));

describe('the view of a root in its address', () => {
	it.each(['', 'show=2-1', 'sort=year&group=method&open=q4', 'show=1-3-2&sort=weight'])(
		'is written as it was read: %j',
		(query) => {
			expect(new URLSearchParams(viewFields(read(query))).toString()).toBe(query);
		}
	);

	it('takes what it cannot use as absent', () => {
		expect(read('show=2-2&sort=colour&group=country&open=q10')).toEqual(read(''));
	});
});
