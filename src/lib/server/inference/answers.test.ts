import { describe, expect, it } from 'vitest';
import { row, rows } from '../../../../tests/support/literatureTable';
import { answersOf } from './answers';
import { admit } from './eligibility';
import { buildSamples } from './samples';
import type { ObservationRow } from './types';

const FACTS = { id: 'source-a', citable: true, year: 2015, retracted: false };

/** The answers of the first sample, with all samples of the rows as its siblings. */
function answers(table: ObservationRow[]) {
	const admitted = table.map((each) => {
		const verdict = admit(each, FACTS);
		if (!verdict.admitted) throw new Error(verdict.reason);
		return { row: each, grant: verdict.grant };
	});
	const { samples } = buildSamples(admitted);
	return answersOf(samples[0], samples);
}
const studies = (table: ObservationRow[]) => answers(table).studies;

const CANINE = { tooth: 'mandibular-canine', root: 'whole', measure: 'canal-count' };
const MESIAL = { tooth: 'mandibular-first-molar', root: 'M' };
const TWO_CANALS = { scope: 'teeth with MB2', measure: 'confluence' };

describe('q1 (inference, section 2, what a sample answers)', () => {
	it('is the rest of class 1, also from a partial table', () => {
		expect(studies(rows({ '1': 40 }))).toEqual({ q1: { events: 60, total: 100 } });
	});

	it('has none of class 1 where three or more named classes sum to the total within 1 %', () => {
		expect(studies(rows({ '2': 50, '2-1': 40, '1-2': 9 })).q1).toEqual({ events: 100, total: 100 });
		expect(studies(rows({ '2': 50, '2-1': 50 })).q1).toBeUndefined();
		expect(studies(rows({ '2': 50, '2-1': 38, other: 12 })).q1).toBeUndefined();
		expect(studies(rows({ '2': 50, '2-1': 40, '1-2': 8 })).q1).toBeUndefined();
	});

	it('comes from canal-count 1, 2+, or a list that sums to its total', () => {
		const count = { measure: 'canal-count' };
		expect(studies(rows({ '1': 30, '2': 50 }, count)).q1).toEqual({ events: 70, total: 100 });
		expect(studies(rows({ '2+': 12 }, count)).q1).toEqual({ events: 12, total: 100 });
		expect(studies(rows({ '2': 90, '3': 10 }, count)).q1).toEqual({ events: 100, total: 100 });
		expect(answers(rows({ '2': 90 }, count)).reason).toMatch(/not how many roots have just one/);
	});

	it('takes category 2 alone only for incisors and canines', () => {
		expect(studies(rows({ '2': 9 }, CANINE)).q1).toEqual({ events: 9, total: 100 });
		expect(studies(rows({ '2': 9 }, { ...CANINE, tooth: 'mandibular-first-premolar' })).q1).toBeUndefined();
	});

	it('takes canal counts of whole teeth for premolars, not for molars', () => {
		const premolar = { ...CANINE, tooth: 'maxillary-first-premolar' };
		expect(studies(rows({ '1': 9 }, premolar)).q1).toEqual({ events: 91, total: 100 });
		expect(studies(rows({ '1': 9 }, { ...CANINE, tooth: 'mandibular-first-molar' })).q1).toBeUndefined();
	});

	it('takes mb2 for MB roots only', () => {
		const mb2 = { measure: 'feature' };
		expect(studies(rows({ mb2: 62 }, mb2)).q1).toEqual({ events: 62, total: 100 });
		expect(studies(rows({ mb2: 62 }, { ...mb2, root: 'DB' }))).toEqual({});
	});
});

describe('q2 to q9 from a full table', () => {
	it('reads every question the classes reach', () => {
		const table = {
			'1': 10,
			'2': 20,
			'2-1': 30,
			'2-1-2': 5,
			'1-2-1': 7,
			'1-2-1-2': 2,
			'1-2': 3,
			'3': 4,
			'3-1': 6,
			'3-2': 13
		};
		expect(studies(rows(table))).toEqual({
			q1: { events: 90, total: 100 },
			q2: { events: 78, total: 90 },
			q3: { events: 23, total: 78 },
			q4: { events: 35, total: 55 },
			q5: { events: 5, total: 35 },
			q6: { events: 7, total: 12 },
			q7: { events: 2, total: 5 },
			q8: { events: 19, total: 23 },
			q9: { events: 6, total: 19 }
		});
	});

	it('takes a class not mentioned as none, and asks no question no root reached', () => {
		expect(studies(rows({ '1': 70, '1-2-1': 30 }))).toEqual({
			q1: { events: 30, total: 100 },
			q2: { events: 0, total: 30 },
			q6: { events: 30, total: 30 }
		});
	});

	it('leaves at most one root, or 2 % of those with more than one canal, unnamed', () => {
		const full = (missing: number) => studies(rows({ '1': 100, '2': 300 - missing }, { total: 400 })).q2;
		expect(full(6)).toEqual({ events: 294, total: 294 });
		expect(full(7)).toBeUndefined();
		const small = (missing: number) => studies(rows({ '1': 80, '2': 20 - missing })).q2;
		expect(small(1)).toEqual({ events: 19, total: 19 });
		expect(small(2)).toBeUndefined();
	});

	it('counts `other` as unnamed', () => {
		expect(studies(rows({ '1': 40, '2': 50, other: 10 })).q2).toBeUndefined();
		expect(studies(rows({ '1': 40, '2': 59, other: 1 })).q2).toEqual({ events: 59, total: 59 });
	});

	it('sends a rare sequence to the leaf of its start and fate', () => {
		const table = studies(rows({ '1': 10, '2-1-2-1': 20, '2-3': 30, '4-1': 40 }));
		expect(table.q4).toEqual({ events: 20, total: 50 });
		expect(table.q9).toEqual({ events: 40, total: 40 });
	});

	it('answers only q2 and q4 to q7 for roots known to have two canals', () => {
		const table = rows({ '2': 40, '2-1': 45, '2-1-2': 5, '1-2-1': 10 }, { scope: 'MB roots with MB2' });
		expect(Object.keys(studies(table))).toEqual(['q2', 'q4', 'q5', 'q6']);
	});

	it('refuses a table that sums to more than its total', () => {
		expect(studies(rows({ '1': 40, '2': 70 })).q2).toBeUndefined();
	});
});

describe('q4 from partial tables and confluence', () => {
	it('needs both 2 and 2-1, and unnamed multi-canal roots of at most 10 % of its two-orifice roots', () => {
		expect(studies(rows({ '1': 20, '2': 40, '2-1': 33 })).q4).toEqual({ events: 33, total: 73 });
		expect(studies(rows({ '1': 20, '2': 40, '2-1': 32 })).q4).toBeUndefined();
		expect(studies(rows({ '1': 20, '2': 75 })).q4).toBeUndefined();
	});

	it('knows the multi-canal roots by the canal count or mb2 of the same teeth', () => {
		const partial = rows({ '2': 40, '2-1': 33 });
		expect(studies(partial).q4).toBeUndefined();
		const joined = { events: 33, total: 73 };
		expect(studies([...partial, row({ measure: 'canal-count', category: '1', count: 20 })]).q4).toEqual(
			joined
		);
		expect(studies([...partial, row({ measure: 'feature', category: 'mb2', count: 80 })]).q4).toEqual(joined);
		expect(
			studies([...partial, row({ measure: 'feature', category: 'mb2', count: 80, total: 120 })]).q4
		).toBeUndefined();
		expect(studies([...partial, row({ measure: 'feature', category: 'mb2', count: 95 })]).q4).toBeUndefined();
	});

	it('knows them by a two-canal scope', () => {
		expect(studies(rows({ '2': 30, '2-1': 62 }, { scope: 'teeth with MB2' })).q4).toEqual({
			events: 62,
			total: 92
		});
	});

	it('sums joined and separate', () => {
		expect(studies(rows({ joined: 30, separate: 50 }, TWO_CANALS)).q4).toEqual({ events: 30, total: 80 });
	});

	it('takes the complement of one alone, unless the note says partial or undetermined', () => {
		expect(studies(rows({ joined: 61 }, TWO_CANALS)).q4).toEqual({ events: 61, total: 100 });
		expect(studies(rows({ separate: 61 }, TWO_CANALS)).q4).toEqual({ events: 39, total: 100 });
		expect(studies(rows({ joined: 61 }, { ...TWO_CANALS, note: 'partial' })).q4).toBeUndefined();
		expect(studies(rows({ joined: 61 }, { ...TWO_CANALS, note: '9 undetermined' })).q4).toBeUndefined();
		expect(studies(rows({ joined: 61 }, { ...TWO_CANALS, scope: 'all' })).q4).toBeUndefined();
	});
});

describe('M roots', () => {
	it('read q3 from middle-mesial and q8 from extra-canal-confluence', () => {
		expect(studies(rows({ 'middle-mesial': 9 }, { ...MESIAL, measure: 'feature' })).q3).toEqual({
			events: 9,
			total: 100
		});
		const extra = {
			...MESIAL,
			measure: 'extra-canal-confluence',
			scope: 'mesial roots with a middle mesial canal'
		};
		expect(studies(rows({ joined: 26, separate: 3 }, { ...extra, total: 48, note: 'partial' })).q8).toEqual({
			events: 26,
			total: 29
		});
	});
});

it('says in words why a sample answers nothing', () => {
	expect(answers(rows({ '2': 40 })).reason).toMatch(/partial table/i);
	expect(answers(rows({ '1': 40 }, { measure: 'foramen-count' })).reason).toMatch(/exits/);
	expect(answers(rows({ 'c-shape': 4 }, { measure: 'feature' })).reason).toMatch(/feature/);
});
