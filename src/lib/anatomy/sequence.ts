/**
 * The canal-sequence algebra. A sequence is the number of canals at each level of a root, read from orifice to
 * exit, a hyphen at each change: `1`, `2-1`, `1-2-1`. Everything else is derived from it and stored nowhere.
 */

/** Leaves of the tree of questions (inference, section 2), in the order screens list them. */
export const LEAVES = ['1', '2', '2-1', '2-1-2', '1-2-1', '1-2-1-2', '1-2', '3', '3-1', '3-2'] as const;
export type Leaf = (typeof LEAVES)[number];

/** What becomes of the canals of a root, read from orifice to exit. */
export const FATES = ['one-canal', 'shared-exit', 'meet-and-part', 'partly-shared', 'separate'] as const;
export type Fate = (typeof FATES)[number];

/** Everything that follows from a sequence. Counts are whole numbers of canals or of changes. */
export interface SequenceDescription {
	/** The sequence in its canonical form. */
	sequence: string;
	/** First number: canals that open from the chamber. */
	orifices: number;
	/** Last number: canals that leave the root. */
	exits: number;
	/** Largest number: canals side by side. */
	width: number;
	/** Steps down. */
	joins: number;
	/** Steps up. */
	splits: number;
	fate: Fate;
	/** The leaf of the tree that a root of this sequence is counted under. */
	leaf: Leaf;
}

/** What the estimator needs to know of a leaf. */
export interface LeafFacts {
	/** Orifices: 1, 2, or 3 standing for three or more. */
	orifices: 1 | 2 | 3;
	/** Canals side by side, 1 to 3 (3 stands for three or more). */
	width: 1 | 2 | 3;
	fate: Fate;
	exits: 1 | 2 | 3;
	/** True when the number of canals falls anywhere on the way to the exit. */
	stepsDown: boolean;
}

/**
 * A text is not a canal sequence; the message is a plain sentence that says what to write instead.
 * @public for callers that show the sentence
 */
export class SequenceError extends Error {
	override readonly name = 'SequenceError';
}

/**
 * Reads a canal sequence.
 *
 * @param text for example `1-2-1`; white space around it is ignored
 * @returns the counts from orifice to exit, each 1 to 9, neighbours different
 * @throws SequenceError with a sentence for the person who typed it
 */
export function parseSequence(text: string): readonly number[] {
	const trimmed = text.trim();
	if (trimmed === '') throw new SequenceError('A canal sequence is empty; write for example 2-1.');
	const counts = trimmed.split('-').map(readCount);
	const fault = faultOf(counts);
	if (fault !== null) throw new SequenceError(fault);
	return counts;
}

/**
 * Writes counts as a canal sequence: `[1, 2, 1]` becomes `1-2-1`. The inverse of `parseSequence`.
 *
 * @param counts from orifice to exit, each a whole number from 1 to 9, neighbours different
 * @throws SequenceError for counts that are no sequence
 */
export function formatSequence(counts: readonly number[]): string {
	const fault = faultOf(counts);
	if (fault !== null) throw new SequenceError(fault);
	return counts.join('-');
}

/**
 * Whether a text is a canal sequence in its canonical form. White space around it makes it false, so that a text
 * that passes may be stored and compared as it stands.
 */
export function isSequence(text: string): boolean {
	return /^[1-9](-[1-9])*$/.test(text) && faultOf(text.split('-').map(Number)) === null;
}

/**
 * Derives everything from a sequence, by the definitions of the domain.
 *
 * @param text a canal sequence; white space around it is ignored
 * @throws SequenceError when it is none
 */
export function describeSequence(text: string): SequenceDescription {
	const counts = parseSequence(text);
	const changes = counts.slice(1).map((count, index) => count - counts[index]);
	const orifices = counts[0];
	const exits = counts[counts.length - 1];
	const width = Math.max(...counts);
	const joins = changes.filter((change) => change < 0).length;
	const fate = fateOf(counts, changes);
	return {
		sequence: formatSequence(counts),
		orifices,
		exits,
		width,
		joins,
		splits: changes.length - joins,
		fate,
		leaf: leafOf(orifices, exits, width, joins, fate)
	};
}

const LEAF_FACTS: Readonly<Record<Leaf, LeafFacts>> = {
	'1': { orifices: 1, width: 1, fate: 'one-canal', exits: 1, stepsDown: false },
	'2': { orifices: 2, width: 2, fate: 'separate', exits: 2, stepsDown: false },
	'2-1': { orifices: 2, width: 2, fate: 'shared-exit', exits: 1, stepsDown: true },
	'2-1-2': { orifices: 2, width: 2, fate: 'meet-and-part', exits: 2, stepsDown: true },
	'1-2-1': { orifices: 1, width: 2, fate: 'shared-exit', exits: 1, stepsDown: true },
	'1-2-1-2': { orifices: 1, width: 2, fate: 'meet-and-part', exits: 2, stepsDown: true },
	'1-2': { orifices: 1, width: 2, fate: 'separate', exits: 2, stepsDown: false },
	'3': { orifices: 3, width: 3, fate: 'separate', exits: 3, stepsDown: false },
	'3-1': { orifices: 3, width: 3, fate: 'shared-exit', exits: 1, stepsDown: true },
	'3-2': { orifices: 3, width: 3, fate: 'partly-shared', exits: 2, stepsDown: true }
};

/**
 * The facts of a leaf. They are the leaf's own: a rare sequence counted under it may be wider (`4-1` is under
 * `3-1`) or have another fate (`2-3-2`, partly-shared, is under `2-1-2`).
 */
export function leafFacts(leaf: Leaf): LeafFacts {
	return LEAF_FACTS[leaf];
}

function readCount(part: string): number {
	if (/^[1-9]$/.test(part)) return Number(part);
	if (part === '0')
		throw new SequenceError('A canal sequence has a level with no canal; every level has at least one.');
	if (/^[1-9]\d+$/.test(part)) {
		throw new SequenceError(
			'A canal sequence has a level with more than nine canals; write a hyphen at each change.'
		);
	}
	throw new SequenceError(
		'A canal sequence is whole numbers from 1 to 9 joined by hyphens; write for example 1-2-1.'
	);
}

function faultOf(counts: readonly number[]): string | null {
	if (counts.length === 0) return 'A canal sequence is empty; write for example 2-1.';
	if (counts.some((count) => !Number.isInteger(count) || count < 1 || count > 9)) {
		return 'Every level of a canal sequence has a whole number of canals from 1 to 9.';
	}
	if (counts.some((count, index) => index > 0 && count === counts[index - 1])) {
		return 'A canal sequence names the same number twice running; write a number only where it changes.';
	}
	return null;
}

function fateOf(counts: readonly number[], changes: readonly number[]): Fate {
	if (Math.max(...counts) === 1) return 'one-canal';
	const lastStepDown = changes.findLastIndex((change) => change < 0);
	if (lastStepDown === -1) return 'separate';
	const exits = counts[counts.length - 1];
	if (exits === 1) return 'shared-exit';
	const widestBefore = Math.max(...counts.slice(0, lastStepDown + 1));
	return exits >= widestBefore ? 'meet-and-part' : 'partly-shared';
}

function leafOf(orifices: number, exits: number, width: number, joins: number, fate: Fate): Leaf {
	if (width === 1) return '1';
	if (orifices >= 3) return fate === 'separate' ? '3' : fate === 'shared-exit' ? '3-1' : '3-2';
	if (orifices === 2) return fate === 'separate' ? '2' : fate === 'shared-exit' ? '2-1' : '2-1-2';
	if (exits === 1) return '1-2-1';
	return joins > 0 ? '1-2-1-2' : '1-2';
}
