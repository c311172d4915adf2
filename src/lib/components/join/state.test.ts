import { FILTER_FIELDS, TESTS } from '$lib/schemas/terms';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { LevelState } from './levelState';
import { isFormAddress, readState, withAction, withFinding, writeState, type JoinState } from './state';

const query = (text: string) => readState(new URLSearchParams(text));

/** Text as somebody may type it, without blanks around it and never empty. */
const typed = fc
	.string({ unit: 'grapheme', minLength: 1 })
	.map((text) => text.trim())
	.filter((text) => text !== '' && text !== 'unknown');
// 0 alone: an address has no -0.
const number = fc.oneof(fc.integer(), fc.double()).map((value) => (value === 0 ? 0 : value));

const findings = fc
	.shuffledSubarray([...TESTS])
	.chain((tests) =>
		fc.tuple(
			...tests.map((test) =>
				fc.record(
					{ test: fc.constant<string>(test), result: typed, pair: typed },
					{ requiredKeys: ['test', 'result'] }
				)
			)
		)
	);
const level: Record<keyof LevelState, typeof typed> = {
	...{ wl1: typed, wl2: typed, mark: typed, markShort: typed, shortfall: typed, contact: typed, cbct: typed },
	...{ shapedTo: typed, tip: typed, taper: typed, coneTip: typed, coneTaper: typed }
};
/** Grouped by name in the order in which an address is read. */
const filters = fc
	.tuple(
		...FILTER_FIELDS.map((name) =>
			fc
				.array(typed, { maxLength: 2 })
				.map((values) => values.map((value): [string, string] => [name, value]))
		)
	)
	.map((groups) => groups.flat());

const states: fc.Arbitrary<JoinState> = fc
	.record(
		{
			canals: number,
			orifices: number,
			rootsSeen: typed,
			search: typed,
			threshold: number,
			findings,
			level: fc.record(level, { requiredKeys: [] }),
			filters
		},
		{ requiredKeys: ['findings', 'level', 'filters'] }
	)
	.map((state) => ({ ...state, asked: state.canals !== undefined }));

describe('the state of the page in its address', () => {
	it('is read as it was written', () => {
		fc.assert(
			fc.property(states, (state) => {
				expect(readState(new URLSearchParams(writeState(state)))).toEqual(state);
			})
		);
	});

	it('keeps findings in the order they were made in, each with its pair', () => {
		const { findings: made } = query(
			'draw=negative&canals=3&cone-mark=positive&cone-mark-pair=MB-ML&draw-pair='
		);
		expect(made).toEqual([
			{ test: 'draw', result: 'negative' },
			{ test: 'cone-mark', result: 'positive', pair: 'MB-ML' }
		]);
	});

	it('takes blank fields as absent: a form sends them too', () => {
		const blank = query(
			'canals=&orifices=+&rootsSeen=&search=&threshold=&draw=&cone-mark=+&draw-pair=MB-ML&method=&yearFrom=+'
		);
		expect(blank).toEqual({ asked: false, findings: [], level: {}, filters: [] });
		expect(blank).toEqual(query(''));
	});

	it('leaves it to the schema to say what is wrong with a value', () => {
		expect(query('canals=two&search=telescope&draw=perhaps')).toEqual({
			asked: true,
			canals: NaN,
			search: 'telescope',
			findings: [{ test: 'draw', result: 'perhaps' }],
			level: {},
			filters: []
		});
	});

	it('passes over names that are none of the page', () => {
		expect(query('canals=2&utm=x&constructor=y&cone-mark-pair=MB-ML')).toEqual({
			asked: true,
			canals: 2,
			findings: [],
			level: {},
			filters: []
		});
	});
});

describe('withFinding', () => {
	const state = query('canals=2&draw=negative&cone-mark=positive&file-contact=unclear');
	const testsOf = (of: JoinState) => of.findings.map(({ test, result }) => `${test}=${result}`);

	it('adds a new finding at the end', () => {
		const after = withFinding(state, 'two-files', 'positive', 'MB-ML');
		expect(after.findings.at(-1)).toEqual({ test: 'two-files', result: 'positive', pair: 'MB-ML' });
		expect(after.findings.slice(0, 3)).toEqual(state.findings);
		expect(after.canals).toBe(2);
	});

	it('changes a finding in its place', () => {
		expect(testsOf(withFinding(state, 'cone-mark', 'negative'))).toEqual([
			'draw=negative',
			'cone-mark=negative',
			'file-contact=unclear'
		]);
	});

	it('takes a finding out, and nothing where there is none', () => {
		expect(testsOf(withFinding(state, 'cone-mark', ''))).toEqual(['draw=negative', 'file-contact=unclear']);
		expect(withFinding(state, 'two-files', '')).toEqual(state);
	});

	it('leaves the state it was given as it is', () => {
		const before = structuredClone(state);
		withFinding(state, 'draw', '');
		withFinding(state, 'draw', 'positive');
		withFinding(state, 'two-files', 'positive');
		expect(state).toEqual(before);
	});
});

describe('withAction', () => {
	const state = query('canals=3&draw=negative&draw-pair=MB-ML&cone-mark=positive&file-contact=unclear');
	const after = (action: string) =>
		withAction(state, action).findings.map(({ test, result }) => `${test}=${result}`);
	const [draw, mark, contact] = ['draw=negative', 'cone-mark=positive', 'file-contact=unclear'];

	it('moves a finding by one place', () => {
		expect(after('up:cone-mark')).toEqual([mark, draw, contact]);
		expect(after('down:cone-mark')).toEqual([draw, contact, mark]);
		expect(withAction(withAction(state, 'up:cone-mark'), 'down:cone-mark')).toEqual(state);
	});

	it('moves nothing beyond the ends, and nothing that was not found', () => {
		for (const action of ['up:draw', 'down:file-contact', 'up:two-files', 'remove:two-files'])
			expect(withAction(state, action)).toEqual(state);
	});

	it('takes a finding out, and enters one', () => {
		expect(after('remove:draw')).toEqual([mark, contact]);
		expect(after('positive:two-files')).toEqual([draw, mark, contact, 'two-files=positive']);
	});

	it('makes an unclear finding anew in its place, its pair kept', () => {
		expect(after('positive:file-contact')).toEqual([draw, mark, 'file-contact=positive']);
		expect(withAction(state, 'positive:draw').findings[0].pair).toBe('MB-ML');
	});

	it.each(['', 'up', 'up:', ':draw', 'perhaps:draw', 'up:dowsing', 'remove:__proto__', 'up:draw:x:'])(
		'does nothing for "%s"',
		(action) => {
			expect(withAction(state, action)).toEqual(state);
		}
	);
});

describe('what a form without JavaScript sends', () => {
	it('comes in the order of its fields and keeps that of the account, a new finding last', () => {
		const sent = query('canals=2&order=two-files%2Cdraw&cone-mark=positive&draw=negative&two-files=positive');
		expect(writeState(sent)).toBe('canals=2&two-files=positive&draw=negative&cone-mark=positive');
	});

	it('does what its button says, with choices not sent before', () => {
		const sent = query('canals=2&order=draw&do=up:cone-mark&cone-mark=positive&draw=negative');
		expect(writeState(sent)).toBe('canals=2&cone-mark=positive&draw=negative');
	});

	it('gives the line in percent; an address gives it as a probability, which wins', () => {
		expect(query('canals=2&line=95').threshold).toBe(0.95);
		expect(query('canals=2&line=').threshold).toBeUndefined();
		expect(query('canals=2&line=95&threshold=0.8').threshold).toBe(0.8);
		expect(query('canals=2&line=much').threshold).toBeNaN();
	});

	it('is told from an address as the page writes it', () => {
		for (const sent of ['order=', 'canals=2&line=', 'canals=2&do=up:draw'])
			expect(isFormAddress(new URLSearchParams(sent))).toBe(true);
		expect(isFormAddress(new URLSearchParams(writeState(query('canals=2&line=95&order=draw'))))).toBe(false);
	});
});
