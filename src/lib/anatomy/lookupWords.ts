/** The words a person may type to find a tooth, and what each one says. */
import { FEATURE_PHRASES, FEATURE_WORDS, type FeatureWord } from './lookupFeatures';
import type { NumberingSystem, Side } from './numbers';
import type { Arch, RootId, ToothKind } from './teeth';

/** One way to read the name of a root or a canal. */
export interface RootReading {
	root: RootId;
	/** Holds for the teeth of this arch alone; absent: for every tooth that has the root. */
	arch?: Arch;
	/** How to say it in a reason: `MB2 is a canal of the mesiobuccal root`. */
	why: string;
}

/** What one word says. A word may say several things (`ul` an arch and a side). */
export interface Meaning {
	arch?: Arch;
	side?: Side;
	kind?: ToothKind;
	/** First, second or third of its kind. */
	ordinal?: number;
	/** Central 1, lateral 2: places of incisors. */
	place?: number;
	/** A Palmer digit in words. */
	digit?: number;
	system?: NumberingSystem;
	/** A root or canal: the first reading that holds for a tooth is meant. */
	root?: readonly RootReading[];
	feature?: FeatureWord;
	/** A word that belongs to a query and narrows nothing. */
	filler?: true;
}

const UPPER: Meaning = { arch: 'maxillary' };
const LOWER: Meaning = { arch: 'mandibular' };
const FILLER: Meaning = { filler: true };
const FIRST: Meaning = { ordinal: 1 };
const SECOND: Meaning = { ordinal: 2 };
const THIRD: Meaning = { ordinal: 3 };
const INCISOR: Meaning = { kind: 'incisor' };
const CENTRAL: Meaning = { kind: 'incisor', place: 1 };
const LATERAL: Meaning = { kind: 'incisor', place: 2 };
const CANINE: Meaning = { kind: 'canine' };
const PREMOLAR: Meaning = { kind: 'premolar' };
const MOLAR: Meaning = { kind: 'molar' };
const WISDOM: Meaning = { kind: 'molar', ordinal: 3 };

function rootWord(root: RootId, why: string, ...others: RootReading[]): Meaning {
	return { root: [{ root, why }, ...others] };
}

const MESIOBUCCAL = rootWord('MB', 'mesiobuccal root', {
	root: 'M',
	why: 'the mesiobuccal canal is in the mesial root'
});
const DISTOBUCCAL = rootWord('DB', 'distobuccal root', {
	root: 'D',
	why: 'a distobuccal canal is in the distal root'
});
const PALATAL = rootWord('P', 'palatal root');
const BUCCAL = rootWord('B', 'buccal root');
const LINGUAL = rootWord('L', 'lingual root', {
	root: 'single',
	arch: 'mandibular',
	why: 'a lingual canal is in the single root'
});
const MESIAL = rootWord('M', 'mesial root');
const DISTAL = rootWord('D', 'distal root');
const DISTOLINGUAL = rootWord('DL', 'distolingual root');
const RADIX = rootWord('DL', 'the radix entomolaris is the distolingual root');
const MESIOLINGUAL = rootWord('M', 'the mesiolingual canal is in the mesial root');
const MIDDLE_MESIAL = rootWord('M', 'the middle mesial canal is in the mesial root');
const MIDDLE_DISTAL = rootWord('D', 'the middle distal canal is in the distal root');

function mesiobuccalCanal(number: number): Meaning {
	return rootWord('MB', `MB${number} is a canal of the mesiobuccal root`);
}

/** Spellings of several words that say one thing, turned into the one word that `WORDS` knows. */
export const PHRASES: readonly (readonly [pattern: RegExp, word: string])[] = [
	[/(upper|lower|maxillary|mandibular|left|right|first|second|third|central|lateral)(?=\p{L}{3})/gu, '$1 '],
	[/\bpre molar/g, 'premolar'],
	// A count of roots or canals is no tooth number.
	[/\b(?:one|two|three|four|five) (?=canals\b|roots\b|rooted\b)/g, ''],
	[/\b(mesio|disto) (buccal|lingual|palatal)\b/g, '$1$2'],
	[/\b(?:middle|mid) mesial\b/g, 'middlemesial'],
	[/\b(?:middle|mid) distal\b/g, 'middledistal'],
	[/\b(?:second|2nd) mesiobuccal\b/g, 'mbtwo'],
	[/\b(?:mb|mesiobuccal) 1\b/g, 'mbone'],
	[/\b(?:mb|mesiobuccal) 2\b/g, 'mbtwo'],
	[/\b(?:mb|mesiobuccal) 3\b/g, 'mbthree'],
	[/mb1(?!\d)/g, ' mbone '],
	[/mb2(?!\d)/g, ' mbtwo '],
	[/mb3(?!\d)/g, ' mbthree '],
	[/\bradix entomolaris\b/g, 'radix'],
	...FEATURE_PHRASES,
	[/\beye (tooth|teeth)\b/g, 'canine']
];

/** Every word the look-up knows, in lower case and the singular. */
export const WORDS: ReadonlyMap<string, Meaning> = new Map<string, Meaning>([
	['upper', UPPER],
	['maxillary', UPPER],
	['maxilla', UPPER],
	['top', UPPER],
	['lower', LOWER],
	['mandibular', LOWER],
	['mandible', LOWER],
	['bottom', LOWER],
	['right', { side: 'right' }],
	['left', { side: 'left' }],
	['ur', { arch: 'maxillary', side: 'right' }],
	['ul', { arch: 'maxillary', side: 'left' }],
	['ll', { arch: 'mandibular', side: 'left' }],
	['lr', { arch: 'mandibular', side: 'right' }],
	['first', FIRST],
	['1st', FIRST],
	['second', SECOND],
	['2nd', SECOND],
	['third', THIRD],
	['3rd', THIRD],
	['one', { digit: 1 }],
	['two', { digit: 2 }],
	['three', { digit: 3 }],
	['four', { digit: 4 }],
	['five', { digit: 5 }],
	['six', { digit: 6 }],
	['seven', { digit: 7 }],
	['eight', { digit: 8 }],
	['incisor', INCISOR],
	['central', CENTRAL],
	['lateral', LATERAL],
	['canine', CANINE],
	['cuspid', CANINE],
	['premolar', PREMOLAR],
	['bicuspid', PREMOLAR],
	['molar', MOLAR],
	['wisdom', WISDOM],
	['iso', { system: 'iso' }],
	['fdi', { system: 'iso' }],
	['universal', { system: 'universal' }],
	['ada', { system: 'universal' }],
	['palmer', { system: 'palmer' }],
	['mb', MESIOBUCCAL],
	['mesiobuccal', MESIOBUCCAL],
	['mbone', mesiobuccalCanal(1)],
	['mbtwo', mesiobuccalCanal(2)],
	['mbthree', mesiobuccalCanal(3)],
	['db', DISTOBUCCAL],
	['distobuccal', DISTOBUCCAL],
	['p', PALATAL],
	['palatal', PALATAL],
	['b', BUCCAL],
	['buccal', BUCCAL],
	['l', LINGUAL],
	['lingual', LINGUAL],
	['m', MESIAL],
	['mesial', MESIAL],
	['d', DISTAL],
	['distal', DISTAL],
	['dl', DISTOLINGUAL],
	['distolingual', DISTOLINGUAL],
	['radix', RADIX],
	['entomolaris', RADIX],
	['ml', MESIOLINGUAL],
	['mesiolingual', MESIOLINGUAL],
	['mm', MIDDLE_MESIAL],
	['middlemesial', MIDDLE_MESIAL],
	['middledistal', MIDDLE_DISTAL],
	['single', rootWord('single', 'single root')],
	...FEATURE_WORDS.map(([word, feature]): [string, Meaning] => [word, { feature }]),
	...[
		'tooth',
		'teeth',
		'root',
		'canal',
		'rooted',
		'permanent',
		'quadrant',
		'the',
		'of',
		'in',
		'a',
		'an',
		'and',
		'on',
		'no',
		'nr',
		'number',
		'notation'
	].map((word): [string, Meaning] => [word, FILLER])
]);
