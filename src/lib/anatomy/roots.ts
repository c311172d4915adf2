/** Roots as the product answers for them, and the names of the canals found in each. */

/**
 * Ids of the evidence files. `whole` stands for a tooth whose roots are unknown, `single` for the one root of a
 * tooth that has one.
 */
export type RootId = 'whole' | 'single' | 'B' | 'P' | 'L' | 'MB' | 'DB' | 'M' | 'D' | 'DL';

/** A canal by its position. */
interface Canal {
	/** Short name for labels and for naming the pair tested, for example `MB2` or `MM`. */
	id: string;
	/** Name in words, for example `middle mesial canal`. */
	name: string;
}

/** A root of one tooth. */
export interface Root {
	id: RootId;
	/** For headings: `Mesiobuccal root`. */
	name: string;
	/** For tables and drawings: `MB`, `Single`. */
	shortName: string;
	/** Usual names of the canals when 1, 2 or 3 were found, from buccal or mesial (common practice, no source). */
	canals: Readonly<Record<1 | 2 | 3, readonly Canal[]>>;
}

const CANAL_NAMES: Readonly<Record<string, string>> = {
	C: 'canal',
	B: 'buccal canal',
	L: 'lingual canal',
	P: 'palatal canal',
	M: 'mesial canal',
	D: 'distal canal',
	Mid: 'middle canal',
	MB: 'mesiobuccal canal',
	MB1: 'first mesiobuccal canal',
	MB2: 'second mesiobuccal canal',
	MB3: 'third mesiobuccal canal',
	ML: 'mesiolingual canal',
	MM: 'middle mesial canal',
	MP: 'mesiopalatal canal',
	DB: 'distobuccal canal',
	DB1: 'first distobuccal canal',
	DB2: 'second distobuccal canal',
	DB3: 'third distobuccal canal',
	DL: 'distolingual canal',
	DL1: 'first distolingual canal',
	DL2: 'second distolingual canal',
	DL3: 'third distolingual canal',
	DP: 'distopalatal canal',
	MD: 'middle distal canal'
};

function canalsNamed(one: string, two: string, three: string): Root['canals'] {
	const read = (ids: string): Canal[] => ids.split(' ').map((id) => ({ id, name: CANAL_NAMES[id] }));
	return { 1: read(one), 2: read(two), 3: read(three) };
}

function root(id: RootId, name: string, shortName: string, canals: Root['canals']): Root {
	return { id, name, shortName, canals };
}

const WHOLE_NAME = 'Whole tooth, roots unknown';

/** Upper incisors and canines. */
export const UPPER_FRONT_ROOTS: readonly Root[] = [
	root('single', 'Single root', 'Single', canalsNamed('C', 'B P', 'B Mid P'))
];

/** Lower incisors and canines. */
export const LOWER_FRONT_ROOTS: readonly Root[] = [
	root('single', 'Single root', 'Single', canalsNamed('C', 'B L', 'B Mid L'))
];

export const UPPER_PREMOLAR_ROOTS: readonly Root[] = [
	root('whole', WHOLE_NAME, 'Whole', canalsNamed('C', 'B P', 'MB DB P')),
	root('single', 'Single root', 'Single', canalsNamed('C', 'B P', 'MB DB P')),
	root('B', 'Buccal root', 'B', canalsNamed('B', 'MB DB', 'MB Mid DB')),
	root('P', 'Palatal root', 'P', canalsNamed('P', 'MP DP', 'MP Mid DP'))
];

export const LOWER_PREMOLAR_ROOTS: readonly Root[] = [
	root('whole', WHOLE_NAME, 'Whole', canalsNamed('C', 'B L', 'MB DB L')),
	root('single', 'Single root', 'Single', canalsNamed('C', 'B L', 'MB DB L')),
	root('B', 'Buccal root', 'B', canalsNamed('B', 'MB DB', 'MB Mid DB')),
	root('L', 'Lingual root', 'L', canalsNamed('L', 'ML DL', 'ML Mid DL'))
];

export const UPPER_MOLAR_ROOTS: readonly Root[] = [
	root('MB', 'Mesiobuccal root', 'MB', canalsNamed('MB1', 'MB1 MB2', 'MB1 MB2 MB3')),
	root('DB', 'Distobuccal root', 'DB', canalsNamed('DB', 'DB1 DB2', 'DB1 DB2 DB3')),
	root('P', 'Palatal root', 'P', canalsNamed('P', 'MP DP', 'MP Mid DP'))
];

export const LOWER_MOLAR_ROOTS: readonly Root[] = [
	root('M', 'Mesial root', 'M', canalsNamed('M', 'MB ML', 'MB MM ML')),
	root('D', 'Distal root', 'D', canalsNamed('D', 'DB DL', 'DB MD DL')),
	root('DL', 'Distolingual root (radix entomolaris)', 'DL', canalsNamed('DL', 'DL1 DL2', 'DL1 DL2 DL3'))
];
