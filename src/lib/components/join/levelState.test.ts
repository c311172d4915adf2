import { levelRequestSchema } from '$lib/schemas/level';
import { describe, expect, it } from 'vitest';
import { errorsAtFields, questionOf, readLevel } from './levelState';
import { questionFields, readState, writeState } from './state';

const FULL =
	'canals=2&search=microscope&draw=negative&cone-mark=positive&wl1=20.5&wl2=19%2C5&mark=3&markShort=0&shortfall=1.2+mm&contact=16.5&cbct=3&shapedTo=full&tip=25&taper=6+%25&coneTip=25&coneTaper=.06';

/** Fields at which the page shows an error for an address. */
function complaints(query: string) {
	const question = questionOf(readLevel(new URLSearchParams(query)))!;
	const issues = levelRequestSchema.safeParse(question.request).error?.issues ?? [];
	const errors = issues.map(({ path, message }) => ({ path: path.join('.'), message }));
	return errorsAtFields(question, errors);
}

describe('the state of the page with a level', () => {
	it('is written as it was read, findings in their order', () => {
		const state = readState(new URLSearchParams(FULL));
		expect(writeState(state)).toBe(FULL);
		expect(state.findings.map(({ test }) => test)).toEqual(['draw', 'cone-mark']);
		expect(questionFields(state).map(([name]) => name)).toEqual(['canals', 'search', 'draw', 'cone-mark']);
	});

	it('takes blank fields and the choice that stands there from the start as nothing typed', () => {
		const state = readLevel(new URLSearchParams('wl1=&mark=+&shapedTo=unknown'));
		expect(state).toEqual({});
		expect(questionOf(state)).toBeNull();
	});
});

describe('questionOf', () => {
	it('reads lengths, sizes and tapers as they are typed', () => {
		expect(questionOf(readLevel(new URLSearchParams(FULL)))!.request).toEqual({
			workingLengths: { first: 20.5, second: 19.5 },
			measurements: [
				{ kind: 'cone-mark', value: 3, coneShortBy: 0 },
				{ kind: 'cone-shortfall', value: 1.2 },
				{ kind: 'file-contact', value: 16.5 },
				{ kind: 'cbct', value: 3 }
			],
			canal: { tip: 0.25, taper: 0.06 },
			cone: { tip: 0.25, taper: 0.06 },
			secondShapedTo: 'full'
		});
	});

	it.each([
		['.06', 0.06],
		['0.06', 0.06],
		[',06', 0.06],
		['06', 0.06],
		['6', 0.06],
		['6%', 0.06],
		['4,5 %', 0.045]
	])('reads the taper %s', (typed, taper) => {
		const { canal } = questionOf({ tip: '25', taper: typed })!.request as { canal: { taper: number } };
		expect(canal.taper).toBeCloseTo(taper, 12);
	});
});

describe('errors at the fields of the page', () => {
	it('stand where something is missing', () => {
		expect(Object.keys(complaints('mark=3')).sort()).toEqual(['wl1', 'wl2']);
		expect(Object.keys(complaints('wl1=20&wl2=20'))).toEqual(['measured']);
		expect(Object.keys(complaints('wl1=20&wl2=20&markShort=1'))).toEqual(['mark']);
		expect(Object.keys(complaints('wl1=20&wl2=20&mark=3&tip=25&coneTaper=.06')).sort()).toEqual([
			'coneTip',
			'taper'
		]);
	});

	it('stand at the measurement they speak of, whichever were typed', () => {
		expect(Object.keys(complaints('wl1=20&wl2=20&cbct=abc&shortfall=2'))).toEqual(['cbct']);
		expect(Object.keys(complaints('wl1=20&wl2=20&mark=3&markShort=x'))).toEqual(['markShort']);
	});

	it('speak of sizes and tapers as on the package', () => {
		const errors = complaints('wl1=20&wl2=20&mark=3&tip=0.25&taper=30&coneTip=25&coneTaper=.06');
		expect(errors.tip![0]).toContain('such as 25');
		expect(errors.taper![0]).toContain('6 %');
	});
});
