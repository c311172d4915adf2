/** Which teeth a sample's total counts, and what that lets it answer (inference, section 2, "Scope"). */
import { toothOf } from '$lib/anatomy/teeth';
import type { ObservationRow } from './types';

/**
 * What a sample may answer by its scope: `every` question, only those of roots known to have two canals (`two-canal`:
 * q2 and q4 to q7), or nothing (`none`).
 */
export type ScopeGrant = 'every' | 'two-canal' | 'none';

type Placed = Pick<ObservationRow, 'tooth' | 'root' | 'scope' | 'measure' | 'poolable'>;

/** Adjectives by which sources name a root, so that "mesial roots with two canals" is known to be root M. */
const ROOT_WORDS: Readonly<Record<string, string>> = {
	mesial: 'M',
	distal: 'D',
	buccal: 'B',
	palatal: 'P',
	lingual: 'L',
	mesiobuccal: 'MB',
	distobuccal: 'DB',
	distolingual: 'DL'
};

const TWO_CANALS = /^(?:(\S+) )?(?:roots|teeth) with (?:two canals|(MB2)(?: found)?)$/i;
const WITH_MB2 = /^with MB2(?: found)?$/i;

/**
 * Words by which a scope says that it counts roots (or canals) with a third mesial canal. Section 2 lists no scope for
 * `extra-canal-confluence`; a figure of that measure can only have this base, so it is accepted for it and nothing else.
 */
const EXTRA_CANAL = /\b(?:middle|third|accessory|extra|additional)\b.*\bcanals?\b/i;

/** The root a row is about: of incisors and canines `whole` and `single` are one root, called `single`. */
export function askedRoot(tooth: string, root: string): string {
	const kind = toothOf(tooth)?.kind;
	return root === 'whole' && (kind === 'incisor' || kind === 'canine') ? 'single' : root;
}

/**
 * Reads a scope against the root it is given for. An editor's mark overrides the list: `poolable` false shuts the
 * sample out, true lets it answer; a sample of two-canal roots so marked still answers only what such roots can, since
 * the mark vouches for the sample and does not change what its total counts.
 */
export function scopeGrant(row: Placed): ScopeGrant {
	if (row.poolable === false) return 'none';
	const listed = listedGrant(row);
	return row.poolable === true && listed === 'none' ? 'every' : listed;
}

function listedGrant(row: Placed): ScopeGrant {
	const scope = row.scope.trim();
	const root = askedRoot(row.tooth, row.root);
	if (scope === 'all') return 'every';
	if (row.measure === 'extra-canal-confluence') return EXTRA_CANAL.test(scope) ? 'every' : 'none';
	if (namesRoot(/^(\S+) roots$/.exec(scope)?.[1], root)) return 'every';
	if (rootsFitScope(scope, row.tooth, root)) return 'every';
	return countsTwoCanals(scope, root) ? 'two-canal' : 'none';
}

function namesRoot(word: string | undefined, root: string): boolean {
	return word !== undefined && (word === root || ROOT_WORDS[word.toLowerCase()] === root);
}

function rootsFitScope(scope: string, toothId: string, root: string): boolean {
	const tooth = toothOf(toothId);
	if (!tooth) return false;
	const molar = tooth.kind === 'molar';
	if (scope === 'single-rooted') return root === 'single';
	if (scope === 'two-rooted') {
		if (molar) return tooth.arch === 'mandibular' && (root === 'M' || root === 'D');
		return tooth.kind === 'premolar' && ['B', 'P', 'L'].includes(root);
	}
	if (scope === 'three-rooted' || scope === 'three separate roots') {
		return molar && (tooth.arch === 'maxillary' ? ['MB', 'DB', 'P'].includes(root) : root === 'DL');
	}
	return false;
}

/** "with MB2 negotiable to the apex" and the like are a choice within the two-canal roots, so they are not listed. */
function countsTwoCanals(scope: string, root: string): boolean {
	if (WITH_MB2.test(scope)) return root === 'MB';
	const match = TWO_CANALS.exec(scope);
	if (!match) return false;
	const [, word, mb2] = match;
	if (mb2 && root !== 'MB') return false;
	return word === undefined || namesRoot(word, root);
}
