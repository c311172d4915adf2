/** Names that published classifications give to canal sequences. A class is a label on a sequence, never stored. */
import { parseSequence, formatSequence } from './sequence';

/** Labels of one sequence; null where a classification has no class for it. */
export interface ClassLabels {
	/** Vertucci 1984: I to VIII. */
	vertucci: string | null;
	/** Weine 1969: I to IV. */
	weine: string | null;
	/** The supplement of Sert and Bayirli 2004 to Vertucci's classes: IX to XXIII. */
	sertBayirli: string | null;
	/** Ahmed and others 2017: the sequence as a superscript, as it stands beside a root. Every sequence has one. */
	ahmed: string;
}

/**
 * A root as it is written in a tooth's code.
 * @public
 */
export interface CodedRoot {
	/** Short name of the root, for example `MB`; not printed for a tooth with one root. */
	label: string;
	sequence: string;
}

const VERTUCCI_1984: Readonly<Record<string, string>> = {
	'1': 'I',
	'2-1': 'II',
	'1-2-1': 'III',
	'2': 'IV',
	'1-2': 'V',
	'2-1-2': 'VI',
	'1-2-1-2': 'VII',
	'3': 'VIII'
};

const WEINE_1969: Readonly<Record<string, string>> = { '1': 'I', '2-1': 'II', '2': 'III', '1-2': 'IV' };

/** Recalled from memory, not seen in the source; to be confirmed by an editor. */
const SERT_BAYIRLI_2004: Readonly<Record<string, string>> = {
	'1-3': 'IX',
	'1-2-3-2': 'X',
	'1-2-3-4': 'XI',
	'2-3-1': 'XII',
	'1-2-1-3': 'XIII',
	'4-2': 'XIV',
	'3-2': 'XV',
	'2-3': 'XVI',
	'1-3-1': 'XVII',
	'3-1': 'XVIII',
	'2-1-2-1': 'XIX',
	'4': 'XX',
	'4-1': 'XXI',
	'5-4': 'XXII',
	'3-4': 'XXIII'
};

const SUPERSCRIPT_DIGITS = '⁰¹²³⁴⁵⁶⁷⁸⁹';

/**
 * The labels of a sequence in the published classifications.
 *
 * @throws SequenceError when the text is no canal sequence
 */
export function classLabels(sequence: string): ClassLabels {
	const canonical = formatSequence(parseSequence(sequence));
	return {
		vertucci: VERTUCCI_1984[canonical] ?? null,
		weine: WEINE_1969[canonical] ?? null,
		sertBayirli: SERT_BAYIRLI_2004[canonical] ?? null,
		ahmed: superscript(canonical)
	};
}

/**
 * A whole tooth in the code of Ahmed and others 2017: the number of roots as a left superscript of the tooth
 * number, then each root with its canal sequence as a right superscript, for example `²46 M² D¹`. The one root of
 * a single-rooted tooth carries no letter: `¹44 ¹⁻²`.
 *
 * @param toothNumber the tooth's number as the person writes it, for example `46`
 * @param roots every root of the tooth, in the order to print; at least one
 * @throws RangeError without a tooth number or a root, or with an unnamed root of several
 * @throws SequenceError when a root's text is no canal sequence
 * @public the room's face: the third way a whole tooth is written
 */
export function ahmedCode(toothNumber: string, roots: readonly CodedRoot[]): string {
	if (toothNumber.trim() === '') throw new RangeError('The code of a tooth needs a tooth number.');
	if (roots.length === 0) throw new RangeError('The code of a tooth needs at least one root.');
	const lettered = roots.length > 1;
	if (lettered && roots.some((root) => root.label.trim() === '')) {
		throw new RangeError('Every root of a tooth with several roots needs a letter.');
	}
	const parts = roots.map((root) => {
		const course = superscript(formatSequence(parseSequence(root.sequence)));
		return lettered ? `${root.label.trim()}${course}` : course;
	});
	return [`${superscript(String(roots.length))}${toothNumber.trim()}`, ...parts].join(' ');
}

function superscript(text: string): string {
	return text.replace(/\d/g, (digit) => SUPERSCRIPT_DIGITS[Number(digit)]).replaceAll('-', '⁻');
}
