/** The sixteen types of permanent tooth, by the slugs of the evidence files. */
import {
	LOWER_FRONT_ROOTS,
	LOWER_MOLAR_ROOTS,
	LOWER_PREMOLAR_ROOTS,
	UPPER_FRONT_ROOTS,
	UPPER_MOLAR_ROOTS,
	UPPER_PREMOLAR_ROOTS
} from './roots';
import type { Root, RootId } from './roots';

export type { Root, RootId } from './roots';

export type Arch = 'maxillary' | 'mandibular';
export type ToothKind = 'incisor' | 'canine' | 'premolar' | 'molar';

type ToothSlug =
	| 'central-incisor'
	| 'lateral-incisor'
	| 'canine'
	| 'first-premolar'
	| 'second-premolar'
	| 'first-molar'
	| 'second-molar'
	| 'third-molar';

/** A type of tooth, also its slug in the evidence files, the API and addresses. */
export type ToothId = `${Arch}-${ToothSlug}`;

/** How often a form of the roots is met (common practice, no source; the figures are in the table). */
interface RootForm {
	/** Letters of the roots that stand apart; one root is written `single`. */
	roots: readonly string[];
	frequency: 'usual' | 'common' | 'rare';
}

/** A type of tooth; left and right are one type. */
export interface Tooth {
	id: ToothId;
	arch: Arch;
	kind: ToothKind;
	/** Place in the quadrant from the midline, 1 to 8: the second digit of ISO 3950 and the digit of Palmer. */
	place: number;
	/** Plain trade English: `Upper first molar`. */
	name: string;
	/** ISO 3950 two-digit numbers of the right and the left tooth. */
	iso: readonly [right: string, left: string];
	/** Roots the product answers for, in the order screens list them. */
	roots: readonly RootId[];
	/** Forms of the roots, the most usual first. */
	rootForms: readonly RootForm[];
	/** One sentence for the reader, marked as common practice. */
	usualForms: string;
}

const SLUGS: readonly ToothSlug[] = [
	'central-incisor',
	'lateral-incisor',
	'canine',
	'first-premolar',
	'second-premolar',
	'first-molar',
	'second-molar',
	'third-molar'
];

const ONE_ROOT: RootForm = { roots: ['single'], frequency: 'usual' };
const UPPER_THREE: RootForm = { roots: ['MB', 'DB', 'P'], frequency: 'usual' };
const LOWER_TWO: RootForm = { roots: ['M', 'D'], frequency: 'usual' };
const ONE_ROOT_COMMON: RootForm = { roots: ['single'], frequency: 'common' };
const LOWER_THREE_RARE: RootForm = { roots: ['M', 'D', 'DL'], frequency: 'rare' };
const RARE_BUCCAL_AND_LINGUAL: RootForm = { roots: ['B', 'L'], frequency: 'rare' };
const RARE_UPPER_PREMOLAR_THREE: RootForm = { roots: ['MB', 'DB', 'P'], frequency: 'rare' };

/** Root forms as generally taught (common practice, no source). */
const FORMS: Readonly<Record<ToothId, readonly [sentence: string, forms: readonly RootForm[]]>> = {
	'maxillary-central-incisor': ['Usually one root', [ONE_ROOT]],
	'maxillary-lateral-incisor': ['Usually one root', [ONE_ROOT]],
	'maxillary-canine': ['Usually one root', [ONE_ROOT]],
	'maxillary-first-premolar': [
		'Usually two roots, buccal and palatal, often one; rarely three',
		[{ roots: ['B', 'P'], frequency: 'usual' }, ONE_ROOT_COMMON, RARE_UPPER_PREMOLAR_THREE]
	],
	'maxillary-second-premolar': [
		'Usually one root, sometimes two, buccal and palatal; rarely three',
		[ONE_ROOT, { roots: ['B', 'P'], frequency: 'common' }, RARE_UPPER_PREMOLAR_THREE]
	],
	'maxillary-first-molar': ['Usually three roots: mesiobuccal, distobuccal and palatal', [UPPER_THREE]],
	'maxillary-second-molar': [
		'Usually three roots, mesiobuccal, distobuccal and palatal, at times fused',
		[UPPER_THREE]
	],
	'maxillary-third-molar': [
		'Three roots, mesiobuccal, distobuccal and palatal, often fused; the form varies widely',
		[UPPER_THREE, ONE_ROOT_COMMON]
	],
	'mandibular-central-incisor': ['Usually one root, flattened from mesial to distal', [ONE_ROOT]],
	'mandibular-lateral-incisor': ['Usually one root, flattened from mesial to distal', [ONE_ROOT]],
	'mandibular-canine': [
		'Usually one root, rarely two, buccal and lingual',
		[ONE_ROOT, RARE_BUCCAL_AND_LINGUAL]
	],
	'mandibular-first-premolar': [
		'Usually one root, rarely two, buccal and lingual',
		[ONE_ROOT, RARE_BUCCAL_AND_LINGUAL]
	],
	'mandibular-second-premolar': [
		'Usually one root, rarely two, buccal and lingual',
		[ONE_ROOT, RARE_BUCCAL_AND_LINGUAL]
	],
	'mandibular-first-molar': [
		'Usually two roots, mesial and distal; in some populations often a third, distolingual root',
		[LOWER_TWO, { roots: ['M', 'D', 'DL'], frequency: 'common' }]
	],
	'mandibular-second-molar': [
		'Usually two roots, mesial and distal; fused to one, often with a C-shaped canal, in some populations',
		[LOWER_TWO, ONE_ROOT_COMMON, LOWER_THREE_RARE]
	],
	'mandibular-third-molar': [
		'Usually two roots, mesial and distal, often fused; the form varies widely',
		[LOWER_TWO, ONE_ROOT_COMMON, LOWER_THREE_RARE]
	]
};

function kindAt(place: number): ToothKind {
	if (place <= 2) return 'incisor';
	if (place === 3) return 'canine';
	return place <= 5 ? 'premolar' : 'molar';
}

function rootsAt(arch: Arch, kind: ToothKind): readonly Root[] {
	const upper = arch === 'maxillary';
	if (kind === 'molar') return upper ? UPPER_MOLAR_ROOTS : LOWER_MOLAR_ROOTS;
	if (kind === 'premolar') return upper ? UPPER_PREMOLAR_ROOTS : LOWER_PREMOLAR_ROOTS;
	return upper ? UPPER_FRONT_ROOTS : LOWER_FRONT_ROOTS;
}

function describeTooth(arch: Arch, slug: ToothSlug): Tooth {
	const id: ToothId = `${arch}-${slug}`;
	const place = SLUGS.indexOf(slug) + 1;
	const kind = kindAt(place);
	const upper = arch === 'maxillary';
	const [sentence, rootForms] = FORMS[id];
	return {
		id,
		arch,
		kind,
		place,
		name: `${upper ? 'Upper' : 'Lower'} ${slug.replace('-', ' ')}`,
		iso: upper ? [`1${place}`, `2${place}`] : [`4${place}`, `3${place}`],
		roots: rootsAt(arch, kind).map((root) => root.id),
		rootForms,
		usualForms: `${sentence} (common practice).`
	};
}

/** The sixteen types: upper then lower, each from the midline backwards. */
export const teeth: readonly Tooth[] = (['maxillary', 'mandibular'] as const).flatMap((arch) =>
	SLUGS.map((slug) => describeTooth(arch, slug))
);

/** The teeth by their slug. */
export const teethById: ReadonlyMap<string, Tooth> = new Map(teeth.map((tooth) => [tooth.id, tooth]));

/** The tooth of a slug, or undefined for any other text. */
export function toothOf(id: string): Tooth | undefined {
	return teethById.get(id);
}

/**
 * A root of a tooth.
 *
 * @param toothId slug of the tooth
 * @param rootId id of the root, for example `MB`
 * @returns undefined when the tooth is unknown or the product does not answer for that root of it
 */
export function rootOf(toothId: string, rootId: string): Root | undefined {
	const tooth = toothOf(toothId);
	return tooth && rootsAt(tooth.arch, tooth.kind).find((root) => root.id === rootId);
}

/** Groups of teeth over which a finding's characteristics are kept. */
export type ToothGroup =
	'maxillary-molar-MB' | 'premolar' | 'mandibular-molar' | 'mandibular-canine-incisor' | 'any';

/**
 * The groups of `finding-characteristics.csv` that hold for a root, the most specific first; `any` is always last.
 *
 * @param toothId slug of the tooth
 * @param rootId id of the root
 */
export function toothGroupOf(toothId: string, rootId: string): readonly ToothGroup[] {
	const tooth = toothOf(toothId);
	if (!tooth) return ['any'];
	if (tooth.kind === 'premolar') return ['premolar', 'any'];
	if (tooth.arch === 'maxillary') {
		return tooth.kind === 'molar' && rootId === 'MB' ? ['maxillary-molar-MB', 'any'] : ['any'];
	}
	return [tooth.kind === 'molar' ? 'mandibular-molar' : 'mandibular-canine-incisor', 'any'];
}
