import { readFileSync } from 'node:fs';
import { parse } from 'csv-parse/sync';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
	FATES,
	LEAVES,
	SequenceError,
	describeSequence,
	formatSequence,
	isSequence,
	leafFacts,
	parseSequence
} from './sequence';
import type { Leaf } from './sequence';

/** Any sequence: counts 1 to 9 with equal neighbours merged. */
const anySequence = fc
	.array(fc.integer({ min: 1, max: 9 }), { minLength: 1, maxLength: 12 })
	.map((counts) => counts.filter((count, index) => index === 0 || count !== counts[index - 1]));

/** The leaf by walking the nine questions of the tree (inference, section 2), a second definition of it. */
function leafByQuestions(counts: readonly number[]): Leaf {
	const steps = counts.slice(1).map((count, index) => count - counts[index]);
	const down = steps.some((step) => step < 0);
	const exits = counts[counts.length - 1];
	if (counts.every((count) => count === 1)) return '1';
	if (counts[0] === 1) {
		if (exits === 1) return '1-2-1';
		return down ? '1-2-1-2' : '1-2';
	}
	if (counts[0] === 2) {
		if (!down) return '2';
		return exits >= 2 ? '2-1-2' : '2-1';
	}
	if (!down) return '3';
	return exits === 1 ? '3-1' : '3-2';
}

describe('parseSequence', () => {
	it('reads the counts and ignores white space around them', () => {
		expect(parseSequence('1-2-1')).toEqual([1, 2, 1]);
		expect(parseSequence('  3\n')).toEqual([3]);
	});

	it.each([
		['', 'empty'],
		['   ', 'empty'],
		['0', 'no canal'],
		['2-0', 'no canal'],
		['10', 'more than nine'],
		['2-12', 'more than nine'],
		['2-2', 'same number twice'],
		['1-2-2-1', 'same number twice'],
		['1.5', 'whole numbers'],
		['-1', 'whole numbers'],
		['2-', 'whole numbers'],
		['2--1', 'whole numbers'],
		['2 - 1', 'whole numbers'],
		['2–1', 'whole numbers'],
		['02', 'whole numbers'],
		['other', 'whole numbers'],
		['II', 'whole numbers'],
		['٢-١', 'whole numbers']
	])('refuses %j and says why', (text, words) => {
		expect(() => parseSequence(text)).toThrow(SequenceError);
		expect(() => parseSequence(text)).toThrow(words);
		expect(isSequence(text)).toBe(false);
	});

	it('gives back what formatSequence wrote, for every sequence', () => {
		fc.assert(
			fc.property(anySequence, (counts) => {
				const text = formatSequence(counts);
				expect(parseSequence(text)).toEqual(counts);
				expect(isSequence(text)).toBe(true);
			})
		);
	});

	it('agrees with isSequence on any text without white space around it', () => {
		const text = fc.oneof(fc.string(), fc.stringMatching(/^[0-9-]{0,8}$/)).map((any) => any.trim());
		const parses = (any: string): boolean => {
			try {
				parseSequence(any);
				return true;
			} catch (error) {
				expect(error).toBeInstanceOf(SequenceError);
				return false;
			}
		};
		fc.assert(
			fc.property(text, (any) => {
				expect(isSequence(any)).toBe(parses(any));
			})
		);
	});
});

describe('formatSequence', () => {
	it.each([[[]], [[0]], [[10]], [[1.5]], [[NaN]], [[2, 2]], [[-1]]])('refuses the counts %j', (counts) => {
		expect(() => formatSequence(counts)).toThrow(SequenceError);
	});
});

describe('isSequence', () => {
	it('is false for a text that is not canonical, so that what passes may be stored as it stands', () => {
		expect(isSequence('2-1')).toBe(true);
		expect(isSequence(' 2-1')).toBe(false);
		expect(isSequence('2-1\n')).toBe(false);
	});
});

describe('describeSequence', () => {
	it('derives every number of a sequence', () => {
		expect(describeSequence(' 1-2-3-2 ')).toEqual({
			sequence: '1-2-3-2',
			orifices: 1,
			exits: 2,
			width: 3,
			joins: 1,
			splits: 2,
			fate: 'partly-shared',
			leaf: '1-2-1-2'
		});
	});

	// The examples of the project's page on the domain ("A canal sequence is the whole alphabet").
	it.each([
		['1', 'one-canal'],
		['2', 'separate'],
		['3', 'separate'],
		['1-2', 'separate'],
		['2-3', 'separate'],
		['2-1-2', 'meet-and-part'],
		['1-2-1-2', 'meet-and-part'],
		['2-1', 'shared-exit'],
		['1-2-1', 'shared-exit'],
		['2-1-2-1', 'shared-exit'],
		['3-1', 'shared-exit'],
		['3-2', 'partly-shared']
	])('%s has the fate %s', (sequence, fate) => {
		expect(describeSequence(sequence).fate).toBe(fate);
	});

	// Worked by hand from the definition: exits against the largest count before the last step down.
	it.each([
		['3-2-3', 'meet-and-part', '3-2'],
		['2-1-3', 'meet-and-part', '2-1-2'],
		['1-2-1-3', 'meet-and-part', '1-2-1-2'],
		['2-3-2', 'partly-shared', '2-1-2'],
		['1-3-2', 'partly-shared', '1-2-1-2'],
		['3-1-2', 'partly-shared', '3-2'],
		['2-1-3-2', 'partly-shared', '2-1-2'],
		['2-3-1', 'shared-exit', '2-1'],
		['1-3-1', 'shared-exit', '1-2-1'],
		['4-1', 'shared-exit', '3-1'],
		['5-4', 'partly-shared', '3-2'],
		['3-4', 'separate', '3'],
		['1-2-3-4', 'separate', '1-2'],
		['1-2-1-2-1', 'shared-exit', '1-2-1']
	])('the rare sequence %s has the fate %s and is counted under %s', (sequence, fate, leaf) => {
		expect(describeSequence(sequence)).toMatchObject({ fate, leaf });
	});

	it('gives every sequence one fate and one leaf, the one that the nine questions lead to', () => {
		fc.assert(
			fc.property(anySequence, (counts) => {
				const described = describeSequence(formatSequence(counts));
				expect(FATES).toContain(described.fate);
				expect(LEAVES).toContain(described.leaf);
				expect(described.leaf).toBe(leafByQuestions(counts));
			})
		);
	});

	it('gives a sequence without a step down the fate separate, or one-canal at width 1', () => {
		fc.assert(
			fc.property(anySequence, (counts) => {
				const { joins, width, fate } = describeSequence(formatSequence(counts));
				const apart = width === 1 ? 'one-canal' : 'separate';
				if (joins === 0) expect(fate).toBe(apart);
				else expect(['shared-exit', 'meet-and-part', 'partly-shared']).toContain(fate);
			})
		);
	});

	it('counts a sequence under a leaf with the same start, 3 standing for three or more', () => {
		fc.assert(
			fc.property(anySequence, (counts) => {
				const { orifices, leaf, joins, exits } = describeSequence(formatSequence(counts));
				const facts = leafFacts(leaf);
				expect(facts.orifices).toBe(Math.min(orifices, 3));
				// With one orifice and one exit the number must have fallen again if it ever rose.
				expect(facts.stepsDown).toBe(joins > 0);
				expect(facts.exits === 1).toBe(exits === 1);
			})
		);
	});

	it('reads every configuration of the shipped table except "other"', () => {
		const file = new URL('../../../data/literature/observations.csv', import.meta.url);
		const rows: { measure: string; category: string }[] = parse(readFileSync(file), { columns: true });
		const categories = new Set(
			rows.filter((row) => row.measure === 'configuration').map((row) => row.category)
		);
		expect(categories.delete('other')).toBe(true);
		expect(categories.size).toBeGreaterThanOrEqual(10);
		expect([...categories].filter((category) => !isSequence(category))).toEqual([]);
	});
});

describe('leafFacts', () => {
	it.each(LEAVES)('holds for %s what the sequence itself says', (leaf) => {
		const { orifices, width, fate, exits, joins, leaf: own } = describeSequence(leaf);
		expect(own).toBe(leaf);
		expect(leafFacts(leaf)).toEqual({ orifices, width, fate, exits, stepsDown: joins > 0 });
	});
});
