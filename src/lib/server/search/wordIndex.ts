/** Finds things by words of theirs, in any order, accented or not, misspelt or unfinished. Pure. */
import Fuse from 'fuse.js';

/** A word of a thing; the smaller the penalty, the more it says to have hit it. */
interface IndexedWord {
	word: string;
	/** 0 or more: an author's name 0, a word of a title more. */
	penalty: number;
}

/** A thing found. */
export interface WordHit<Item> {
	item: Item;
	/** Sum over the words typed of how far each is from the word hit; 0 is best. */
	distance: number;
	/** True where every word typed is a word of the thing, or begins one. */
	literal: boolean;
}

/** A word typed and unfinished: `vertu`. */
const PREFIX_DISTANCE = 0.1;
/** A misspelt word is never better than an unfinished one. */
const FUZZY_DISTANCE = 0.3;
/** Fuse's score runs from 0 (the same) to 1. */
const FUZZY_THRESHOLD = 0.4;
const MIN_FUZZY_CHARACTERS = 4;
const MIN_PREFIX_CHARACTERS = 2;
/** From here on two letters may be wrong, before only one. */
const LONG_WORD_CHARACTERS = 8;

/** Words of a text as they are compared: lower case, without accents. */
export function wordsOf(text: string): string[] {
	const plain = text
		.normalize('NFKD')
		.replace(/[\p{M}'’]/gu, '')
		.toLowerCase()
		.replaceAll('ı', 'i')
		.replaceAll('ø', 'o')
		.replaceAll('ł', 'l')
		.replaceAll('ß', 'ss');
	return plain.match(/[\p{L}\p{N}]+/gu) ?? [];
}

/** An index of things by their words. */
export class WordIndex<Item> {
	readonly #things: readonly { item: Item; words: ReadonlyMap<string, number> }[];
	readonly #vocabulary: readonly string[];
	readonly #near: Fuse<string>;

	/** @param wordsOfItem the words of a thing, as `wordsOf` gives them */
	constructor(items: readonly Item[], wordsOfItem: (item: Item) => readonly IndexedWord[]) {
		this.#things = items.map((item) => {
			const words = new Map<string, number>();
			for (const { word, penalty } of wordsOfItem(item))
				words.set(word, Math.min(penalty, words.get(word) ?? Infinity));
			return { item, words };
		});
		this.#vocabulary = [...new Set(this.#things.flatMap(({ words }) => [...words.keys()]))];
		this.#near = new Fuse(this.#vocabulary, { threshold: FUZZY_THRESHOLD, includeScore: true });
	}

	/** The things that have all of the words, the nearest first. */
	search(typed: readonly string[]): WordHit<Item>[] {
		if (typed.length === 0) return [];
		const meant = typed.map((word) => this.#meant(word));
		return this.#things
			.flatMap(({ item, words }) => {
				const each = meant.map((candidates) => nearest(candidates, words));
				if (each.some((hit) => hit === null)) return [];
				const hits = each.filter((hit) => hit !== null);
				return {
					item,
					distance: hits.reduce((sum, { distance, penalty }) => sum + distance + penalty, 0),
					literal: hits.every(({ distance }) => distance <= PREFIX_DISTANCE)
				};
			})
			.sort((a, b) => a.distance - b.distance);
	}

	/** Words of the index near to what was typed, for "did you mean". */
	near(typed: string, most: number): string[] {
		return this.#near.search(typed, { limit: most }).map(({ item }) => item);
	}

	/** The words a typed one may stand for, with their distances. */
	#meant(typed: string): Map<string, number> {
		const found = new Map<string, number>();
		if (typed.length >= MIN_FUZZY_CHARACTERS && !/\d/.test(typed))
			for (const { item, score = 1 } of this.#near.search(typed))
				if (isMisspelling(typed, item)) found.set(item, FUZZY_DISTANCE + score);
		if (typed.length >= MIN_PREFIX_CHARACTERS)
			for (const word of this.#vocabulary) if (word.startsWith(typed)) found.set(word, PREFIX_DISTANCE);
		found.set(typed, 0);
		return found;
	}
}

/** A word misspelt has nearly the letters of the right one; Fuse alone finds `zz` in many. */
function isMisspelling(typed: string, word: string): boolean {
	const most = typed.length < LONG_WORD_CHARACTERS ? 1 : 2;
	return lettersLacking(typed, word) <= most && lettersLacking(word, typed) <= most;
}

/** How many letters of the first text the second does not have, each counted as often as it comes. */
function lettersLacking(text: string, other: string): number {
	const left = [...other];
	let lacking = 0;
	for (const letter of text) {
		const at = left.indexOf(letter);
		if (at < 0) lacking += 1;
		else left.splice(at, 1);
	}
	return lacking;
}

function nearest(candidates: ReadonlyMap<string, number>, words: ReadonlyMap<string, number>) {
	let best: { distance: number; penalty: number } | null = null;
	for (const [word, distance] of candidates) {
		const penalty = words.get(word);
		if (penalty === undefined) continue;
		if (best === null || distance + penalty < best.distance + best.penalty) best = { distance, penalty };
	}
	return best;
}
