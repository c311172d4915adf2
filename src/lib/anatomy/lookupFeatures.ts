/** Words for features that are no root and no canal of their own, and the ids under which the table records them. */

/** What a feature word says. */
export interface FeatureWord {
	/** Ids of the evidence files, any of which is meant. */
	ids: readonly string[];
	/** How to say it in a reason: `C-shaped canals are recorded here`. */
	why: string;
}

const word = (ids: string, why: string): FeatureWord => ({
	ids: ids.split(' '),
	why: `${why} recorded here`
});

const FUSED = word('fused-roots root-fusion', 'fused roots are');
const GROOVE = word('radicular-groove deep-radicular-groove', 'a groove along the root is');
const LINKED = word('intercanal-communication connecting-canal', 'communications between canals are');
const DENS = word('dens-invaginatus', 'dens invaginatus is');

/** Spellings of several words, turned into the one word that `FEATURE_WORDS` knows; the longer ones first. */
export const FEATURE_PHRASES: readonly (readonly [pattern: RegExp, word: string])[] = [
	[/\bc shaped? roots?\b/g, 'cshapedroot'],
	[/\bc shaped?\b/g, 'cshape'],
	[/\bradix paramolaris\b/g, 'paramolaris'],
	[/\b(?:extra|additional|supernumerary) (?:disto ?lingual )?roots?\b/g, 'extraroot'],
	[/\b(?:fused roots?|roots? fus(?:ed|ion)|fusion of roots)\b/g, 'fusedroots'],
	[/\bdens (?:invaginatus|in dente)\b/g, 'densinvaginatus'],
	[/\blateral canals?\b/g, 'lateralcanal'],
	[/\baccessory canals?\b/g, 'accessorycanal'],
	[/\baccessory (?:foramen|foramina)\b/g, 'accessoryforamen'],
	[/\bfurca(?:l|tion) canals?\b/g, 'furcationcanal'],
	[/\bapical deltas?\b/g, 'apicaldelta'],
	[/\bconnecting canals?\b/g, 'communication'],
	[/\b(?:radicular|root) grooves?\b/g, 'groove']
];

/** Feature words in lower case and the singular. */
export const FEATURE_WORDS: readonly (readonly [word: string, feature: FeatureWord])[] = [
	['cshape', word('c-shape', 'C-shaped canals are')],
	['cshaped', word('c-shape', 'C-shaped canals are')],
	['cshapedroot', word('c-shaped-root', 'C-shaped roots are')],
	['paramolaris', word('radix-paramolaris', 'the radix paramolaris, an extra buccal root, is')],
	['extraroot', word('radix-entomolaris radix-paramolaris', 'an extra root is')],
	['isthmus', word('isthmus', 'an isthmus between two canals is')],
	['isthmi', word('isthmus', 'an isthmus between two canals is')],
	['fusedroots', FUSED],
	['fusedroot', FUSED],
	['fused', FUSED],
	['fusion', FUSED],
	['communication', LINKED],
	['anastomosis', LINKED],
	['lateralcanal', word('lateral-canal', 'lateral canals are')],
	['accessorycanal', word('accessory-canal', 'accessory canals are')],
	['accessoryforamen', word('accessory-foramen', 'accessory foramina are')],
	['furcationcanal', word('furcation-canal', 'canals in the furcation are')],
	['apicaldelta', word('apical-delta', 'an apical delta is')],
	['delta', word('apical-delta', 'an apical delta is')],
	['groove', GROOVE],
	['invagination', word('mesial-invagination', 'a mesial invagination of the root is')],
	['densinvaginatus', DENS],
	['invaginatus', DENS]
];
