import { describe, expect, it } from 'vitest';
import { row, source } from '../../../../tests/support/literatureTable';
import { admit } from './eligibility';
import type { ObservationRow } from './types';

const reasonOf = (change: Partial<ObservationRow>, facts = source('source-a')) => {
	const verdict = admit(row(change), facts);
	return verdict.admitted ? null : verdict.reason;
};

describe('which row may enter (inference, section 2)', () => {
	it('lets a read or secondary row of a citable source in', () => {
		expect(reasonOf({})).toBeNull();
		expect(reasonOf({ provenance: 'secondary' })).toBeNull();
	});

	it.each<[string, Partial<ObservationRow>, RegExp]>([
		['without a tooth', { tooth: '' }, /several kinds of teeth/],
		['without a count', { count: null }, /no count/],
		['without a total', { total: null }, /no total/],
		['with a percentage only', { count: null, total: null, percent: 12 }, /percentage/],
		['with more than all', { count: 101 }, /cannot both be right/],
		['with a total of none', { count: 0, total: 0 }, /cannot both be right/],
		['from memory', { provenance: 'memory' }, /memory/],
		['of a review', { method: 'review' }, /review/],
		['lowest of countries', { note: 'lowest of 44 countries; 300 teeth' }, /lowest or highest/],
		['highest region', { note: 'highest region; part of the 5250' }, /lowest or highest/],
		['second-distal', { root: 'D', measure: 'feature', category: 'second-distal' }, /second distal/],
		['marked by an editor', { poolable: false }, /editor/],
		['second-distal though marked poolable', { category: 'second-distal', poolable: true }, /second distal/],
		['with another scope', { scope: 'patients' }, /patients/]
	])('shuts out a row %s', (_, change, reason) => {
		expect(reasonOf(change)).toMatch(reason);
	});

	it('lets a row of memory in once an editor has confirmed it', () => {
		expect(reasonOf({ provenance: 'memory', verified: true })).toBeNull();
	});

	it('shuts out a source that is not citable, is unknown or was retracted', () => {
		expect(reasonOf({}, source('source-a', { citable: false }))).toMatch(/cited/);
		expect(admit(row(), undefined).admitted).toBe(false);
		expect(reasonOf({}, source('source-a', { retracted: true }))).toMatch(/retracted/);
	});

	it('does not take other extremes for those of countries', () => {
		expect(reasonOf({ note: 'lowest of the three kinds; country inferred' })).toBeNull();
		expect(reasonOf({ note: 'pooled over 44 countries' })).toBeNull();
	});
});

describe('scope (inference, section 2)', () => {
	const grantOf = (tooth: string, root: string, scope: string, change: Partial<ObservationRow> = {}) => {
		const verdict = admit(row({ tooth, root, scope, ...change }), source('source-a'));
		return verdict.admitted ? verdict.grant : 'none';
	};

	it.each([
		['maxillary-first-molar', 'MB', 'MB roots', 'every'],
		['maxillary-first-molar', 'DB', 'MB roots', 'none'],
		['mandibular-first-molar', 'M', 'mesial roots', 'every'],
		['maxillary-first-molar', 'MB', 'all roots', 'none'],
		['maxillary-second-molar', 'P', 'three-rooted', 'every'],
		['maxillary-second-molar', 'P', 'three separate roots', 'every'],
		['mandibular-first-molar', 'DL', 'three-rooted', 'every'],
		['mandibular-first-molar', 'M', 'three-rooted', 'none'],
		['mandibular-first-molar', 'D', 'two-rooted', 'every'],
		['maxillary-first-molar', 'MB', 'two-rooted', 'none'],
		['maxillary-first-premolar', 'B', 'two-rooted', 'every'],
		['mandibular-first-premolar', 'L', 'two-rooted', 'every'],
		['maxillary-first-premolar', 'whole', 'two-rooted', 'none'],
		['mandibular-canine', 'whole', 'two-rooted', 'none'],
		['maxillary-first-premolar', 'single', 'single-rooted', 'every'],
		['mandibular-canine', 'whole', 'single-rooted', 'every'],
		['maxillary-first-premolar', 'whole', 'single-rooted', 'none'],
		['maxillary-first-molar', 'MB', 'roots with two canals', 'two-canal'],
		['mandibular-first-premolar', 'whole', 'teeth with two canals', 'two-canal'],
		['mandibular-first-molar', 'M', 'mesial roots with two canals', 'two-canal'],
		['mandibular-first-molar', 'M', 'distal roots with two canals', 'none'],
		['maxillary-first-molar', 'MB', 'teeth with MB2 found', 'two-canal'],
		['maxillary-first-molar', 'MB', 'MB roots with MB2', 'two-canal'],
		['maxillary-first-molar', 'MB', 'with MB2', 'two-canal'],
		['maxillary-first-molar', 'P', 'teeth with MB2', 'none'],
		['maxillary-first-molar', 'MB', 'MB roots with MB2 negotiable to the apex', 'none'],
		['maxillary-first-molar', 'MB', '', 'none']
	])('of %s %s, "%s" answers: %s', (tooth, root, scope, grant) => {
		expect(grantOf(tooth, root, scope)).toBe(grant);
	});

	it('takes the extra-canal base for extra-canal-confluence alone', () => {
		const scope = 'mesial roots with a middle mesial canal';
		expect(grantOf('mandibular-first-molar', 'M', scope, { measure: 'extra-canal-confluence' })).toBe(
			'every'
		);
		expect(grantOf('mandibular-first-molar', 'M', scope)).toBe('none');
	});

	it('lets an editor override the list, but not what a two-canal total counts', () => {
		expect(grantOf('maxillary-first-molar', 'MB', 'four-rooted', { poolable: true })).toBe('every');
		expect(grantOf('maxillary-first-molar', 'MB', 'teeth with MB2', { poolable: true })).toBe('two-canal');
	});
});
