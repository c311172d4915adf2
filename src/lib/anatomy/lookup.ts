/**
 * Forgiving look-up of a tooth or a root from what a person typed: a number in any of three systems, words in any
 * order, the name of a root or a canal; misspelt words are read as the nearest known ones.
 */
import Fuse from 'fuse.js';
import { ordinalOf, readNumber, toothAt } from './lookupNumbers';
import type { NumberReading } from './lookupNumbers';
import type { FeatureWord } from './lookupFeatures';
import { PHRASES, WORDS } from './lookupWords';
import type { Meaning, RootReading } from './lookupWords';
import { positions } from './numbers';
import type { NumberingSystem, Position } from './numbers';
import type { RootId, Tooth, ToothId } from './teeth';

/** One answer to a query. */
export interface LookUpHit {
	tooth: ToothId;
	/** ISO 3950 number where the query tells the side. */
	iso?: string;
	/** Root where the query names one. */
	root?: RootId;
	/** Id of the feature that the query asks for, recorded at this place. */
	feature?: string;
	/** How the query was read, for the reader. */
	why: string;
	/** False after a misspelling or a word not understood. */
	understood: boolean;
	/**
	 * True when a person who numbers in the given system can mean nothing else, so that a page may go straight
	 * there. Never on any but the first hit, nor after a misspelling or a word not understood.
	 */
	exact: boolean;
}

/** Where the table records a feature. */
export interface FeaturePlace {
	/** Id of the evidence files: `c-shape`. */
	feature: string;
	tooth: ToothId;
	/** Absent: recorded of the whole tooth. */
	root?: RootId;
}

const MAX_HITS = 8;
/** Longer than any sensible query; keeps a pasted page from being searched word by word. */
const MAX_QUERY_CHARACTERS = 100;
/** Fuse's score runs from 0 (the same) to 1; two letters swapped in a word of five ("frist") score 0.4. */
const FUZZY_THRESHOLD = 0.45;
const MIN_FUZZY_CHARACTERS = 3;
const TOKENS =
	/#\s*\d+|[1-8][┘┐]|[└┌][1-8]|(?<!\p{L})(?:ur|ul|lr|ll)\s*[1-8](?!\d)|[123](?:st|nd|rd)(?!\p{L})|\d+|\p{L}+/gu;

interface Query {
	meanings: Meaning[];
	/** Numbers as typed: `16`, `#3`, `ur6`. */
	numbers: string[];
	/** True when a word was read as another, nearest one. */
	corrected: boolean;
	/** Words that nothing is near to. */
	unknown: string[];
}

interface Candidate {
	position: Position;
	tooth: Tooth;
	rootReadings: readonly RootReading[];
	place?: FeaturePlace;
}

/**
 * Finds the teeth and roots a person may mean.
 *
 * @param query what was typed, in any case and order: `16`, `#3`, `UL6`, `upper left first molar`, `16 mb2`
 * @param system the numbering the person has picked, in which a bare number is read first; default ISO 3950
 * @param recorded where features are recorded, the place with most samples first; a feature word finds these only
 * @returns at most eight hits, the likeliest first; empty for an empty query or one that names no tooth
 */
export function lookUp(
	query: string,
	system: NumberingSystem = 'iso',
	recorded: readonly FeaturePlace[] = []
): LookUpHit[] {
	const read = readQuery(query.slice(0, MAX_QUERY_CHARACTERS));
	if (read.numbers.length > 1) return [];
	if (read.numbers.length === 0 && !read.meanings.some(saysSomething)) return [];
	const readings = read.numbers.length === 0 ? [null] : readingsOf(read, system);
	const hits = readings.flatMap((reading) => hitsOf(read, reading, recorded));
	const distinct = hits.filter((hit, index) => hits.findIndex((other) => sameHit(hit, other)) === index);
	const oneAnswer = distinct.length === 1 || readings.some((reading) => reading?.tellsSide);
	return distinct
		.slice(0, MAX_HITS)
		.map((hit, index) => ({ ...hit, exact: hit.exact && index === 0 && oneAnswer }));
}

function readQuery(text: string): Query {
	const words = text
		.normalize('NFKD')
		.replace(/\p{M}/gu, '')
		.toLowerCase()
		.replace(/['’]/g, '')
		.replace(/[^\p{L}\p{N}#┘└┐┌]+/gu, ' ');
	const plain = PHRASES.reduce((phrase, [pattern, word]) => phrase.replace(pattern, word), words);
	const read: Query = { meanings: [], numbers: [], corrected: false, unknown: [] };
	for (const token of plain.match(TOKENS) ?? []) readToken(token, read);
	return read;
}

function readToken(token: string, read: Query): void {
	// The "s" left over from "6s" says no more than the number.
	if (token === 's') return;
	const known = knownWord(token);
	if (known) {
		if (known.digit === undefined) read.meanings.push(known);
		else read.numbers.push(String(known.digit));
	} else if (/\d/.test(token)) {
		read.numbers.push(token.replace(/\s/g, ''));
	} else {
		const nearest = nearestMeaning(token);
		if (nearest) {
			read.meanings.push(nearest);
			read.corrected = true;
		} else {
			read.unknown.push(token);
		}
	}
}

/** A word or its plural. */
function knownWord(token: string): Meaning | undefined {
	const singular = token.length > 3 ? token.replace(/(?<=x)es$|s$/, '') : token;
	return WORDS.get(token) ?? WORDS.get(singular);
}

/** Short words are too near to everything; words that narrow nothing would hide one that does (`can`: canine). */
const nearWords = new Fuse(
	[...WORDS].flatMap(([word, meaning]) =>
		word.length > MIN_FUZZY_CHARACTERS && saysSomething(meaning) && meaning.digit === undefined
			? [{ word, meaning }]
			: []
	),
	{ keys: ['word'], threshold: FUZZY_THRESHOLD }
);

/** What the known word says that is nearest to a misspelt or unfinished one. */
function nearestMeaning(token: string): Meaning | undefined {
	if (token.length < MIN_FUZZY_CHARACTERS) return undefined;
	return nearWords
		.search(token)
		.map((result) => result.item)
		.find(({ word }) => word.startsWith(token) || Math.abs(word.length - token.length) <= 2)?.meaning;
}

function readingsOf(read: Query, picked: NumberingSystem): NumberReading[] {
	return readNumber(read.numbers[0], {
		picked,
		stated: read.meanings.find((meaning) => meaning.system)?.system,
		hasQuadrantWord: read.meanings.some((meaning) => meaning.arch ?? meaning.side),
		kind: read.meanings.find((meaning) => meaning.kind)?.kind
	});
}

/** All hits under one reading of the number; without the root where no tooth that fits has it. */
function hitsOf(read: Query, reading: NumberReading | null, recorded: readonly FeaturePlace[]): LookUpHit[] {
	const rootWords = read.meanings.flatMap((meaning) => (meaning.root ? [meaning.root] : []));
	const fitting = positions
		.map((position): Candidate => ({ position, tooth: toothAt(position), rootReadings: [] }))
		.filter(
			({ position, tooth }) =>
				(reading?.matches(position) ?? true) &&
				read.meanings.every((meaning) => fits(meaning, position, tooth))
		);
	const features = read.meanings.flatMap((meaning) => meaning.feature ?? []);
	const rooted = fitting
		.flatMap((candidate) => withRoot(candidate, rootWords))
		.flatMap((candidate) => withFeature(candidate, features, recorded));
	const narrowed = reading !== null || read.meanings.some(narrowsTeeth);
	const rootless = rooted.length === 0 && narrowed && features.length === 0;
	const tellsSide = (reading?.tellsSide ?? false) || read.meanings.some((meaning) => meaning.side);
	const understood = !read.corrected && read.unknown.length === 0;
	const clear = !rootless && understood && (reading?.certain ?? true);
	return inOrder(rootless ? fitting : rooted, read.meanings, recorded).map((candidate) => ({
		tooth: candidate.tooth.id,
		...(tellsSide ? { iso: candidate.position.iso } : {}),
		...rootOfHit(candidate),
		...(candidate.place ? { feature: candidate.place.feature } : {}),
		understood,
		why: reasonFor(candidate, read, reading, tellsSide, rootless),
		exact: clear
	}));
}

function fits(meaning: Meaning, position: Position, tooth: Tooth): boolean {
	return (
		(meaning.arch === undefined || meaning.arch === tooth.arch) &&
		(meaning.side === undefined || meaning.side === position.side) &&
		(meaning.kind === undefined || meaning.kind === tooth.kind) &&
		(meaning.place === undefined || meaning.place === tooth.place) &&
		(meaning.ordinal === undefined || meaning.ordinal === ordinalOf(tooth))
	);
}

function narrowsTeeth(meaning: Meaning): boolean {
	return Boolean(meaning.arch ?? meaning.side ?? meaning.kind ?? meaning.ordinal ?? meaning.feature);
}

function saysSomething(meaning: Meaning): boolean {
	return narrowsTeeth(meaning) || meaning.root !== undefined || meaning.digit !== undefined;
}

/** The candidate with the root that every root word means on that tooth; nothing where they disagree. */
function withRoot(candidate: Candidate, words: readonly (readonly RootReading[])[]): Candidate[] {
	const { tooth } = candidate;
	const rootReadings = words.flatMap(
		(word) =>
			word.find(({ root, arch }) => tooth.roots.includes(root) && (arch ?? tooth.arch) === tooth.arch) ?? []
	);
	const agree = rootReadings.every(({ root }) => root === rootReadings[0].root);
	return rootReadings.length === words.length && agree ? [{ ...candidate, rootReadings }] : [];
}

/** The candidate at each place where one of the features is recorded; nothing where none is, or of another root alone. */
function withFeature(
	candidate: Candidate,
	features: readonly FeatureWord[],
	recorded: readonly FeaturePlace[]
): Candidate[] {
	if (features.length === 0) return [candidate];
	const asked = candidate.rootReadings[0]?.root;
	return recorded
		.filter(
			({ feature, tooth, root }) =>
				tooth === candidate.tooth.id &&
				features.every(({ ids }) => ids.includes(feature)) &&
				(asked === undefined || root === undefined || root === asked)
		)
		.map((place) => ({ ...candidate, place }));
}

/** The root that was named, else the root at which the feature is recorded. */
function rootOfHit({ rootReadings, place }: Candidate): { root?: RootId } {
	const root = place ? place.root : rootReadings.at(0)?.root;
	return root === undefined ? {} : { root };
}

/** By the order of a feature's places, then by the order of a root word's readings, else as they stand. */
function inOrder(
	candidates: readonly Candidate[],
	meanings: readonly Meaning[],
	recorded: readonly FeaturePlace[]
): Candidate[] {
	const rootWord = meanings.find((meaning) => meaning.root)?.root;
	const rank = ({ place, rootReadings }: Candidate): number =>
		place ? recorded.indexOf(place) : (rootWord?.indexOf(rootReadings[0]) ?? 0);
	return [...candidates].sort((a, b) => rank(a) - rank(b));
}

function reasonFor(
	{ position, tooth, rootReadings }: Candidate,
	read: Query,
	reading: NumberReading | null,
	tellsSide: boolean,
	rootless: boolean
): string {
	const name = tellsSide ? tooth.name.replace(' ', ` ${position.side} `) : tooth.name;
	return [
		reading ? `${reading.why}: ${name}` : name,
		...rootReadings.map((rootReading) => rootReading.why),
		...read.meanings.flatMap((meaning) => meaning.feature?.why ?? []),
		...(rootless ? ['the table has no such root of this tooth'] : []),
		...(read.corrected ? ['nearest to what was typed'] : []),
		...(read.unknown.length > 0 ? [`not understood: ${read.unknown.join(', ')}`] : [])
	].join('; ');
}

function sameHit(a: LookUpHit, b: LookUpHit): boolean {
	return a.tooth === b.tooth && a.iso === b.iso && a.root === b.root && a.feature === b.feature;
}
