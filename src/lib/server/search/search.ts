import { lookUp, type LookUpHit } from '$lib/anatomy/lookup';
import { formatToothNumber, positionOfIso, type NumberingSystem } from '$lib/anatomy/numbers';
import { rootOf, toothOf } from '$lib/anatomy/teeth';
import { countryAddress, featureAddress, placeAddress, sourceAddress } from '$lib/addresses';
import type { SearchHit } from '$lib/schemas/search';
import type { SourceSummary } from '$lib/schemas/table';
import { countryName } from '$lib/strings/countries';
import { featureName } from '$lib/strings/features';
import { find } from '$lib/strings/find';
import { sourceName } from '$lib/strings/source';
import { serverDatabase } from '../db/server';
import { tableRevision } from '../table/snapshot';
import { sourcesById } from '../table/sources';
import { readSearchIndex, type SearchIndex } from './searchIndex';
import { wordsOf, type WordHit } from './wordIndex';

/** What a search found. */
interface SearchResult {
	hits: SearchHit[];
	/** The address to go to at once, where the phrase can mean one thing only. */
	exact: string | null;
}

/** A group of hits of one way of searching, not yet dressed. */
interface Group {
	literal: boolean;
	size: number;
	dress: (most: number) => SearchHit[] | Promise<SearchHit[]>;
}

/** Words of citations that name nothing. */
const IDLE = new Set(['and', 'et', 'al', 'others', 'of', 'the', 'in', 'a', 'an', 'study', 'paper']);
const MOST_NEAR = 4;

/**
 * Finds teeth, roots, features, sources and countries.
 *
 * @param query what was typed, in any case and order
 * @param numbers the system in which a bare number is read first
 * @param limit most hits; where several kinds answer, each gets its share
 */
export async function search(query: string, numbers: NumberingSystem, limit: number): Promise<SearchResult> {
	const index = await currentIndex();
	const places = lookUp(query, numbers, index.features);
	const sources = findSources(index, query);
	const countries = index.countries.search(wordsOf(query).filter((word) => !IDLE.has(word)));
	const groups: Group[] = [
		{
			literal: places.some(({ understood }) => understood),
			size: places.length,
			dress: (most) => byKind(places.slice(0, most).map((hit) => placeHit(hit, numbers)))
		},
		{
			literal: countries.some(({ literal }) => literal),
			size: countries.length,
			dress: (most) => countries.slice(0, most).map(countryHit)
		},
		{
			literal: sources.some(({ literal }) => literal),
			size: sources.length,
			dress: (most) => sourceHits(sources.slice(0, most).map(({ item }) => item.id))
		}
	];
	const exact = places.at(0)?.exact ? addressOf(places[0]) : null;
	return { hits: await shared(groups, limit), exact };
}

/** Words near to those typed, for somebody whose phrase found nothing. */
export async function nearWords(query: string): Promise<string[]> {
	const index = await currentIndex();
	const near = wordsOf(query)
		.filter((word) => !/\d/.test(word))
		.flatMap((word) => [...index.countries.near(word, 1), ...index.sources.near(word, MOST_NEAR)]);
	return [...new Set(near)].slice(0, MOST_NEAR);
}

/** Literal groups first; a group that guesses beside one that does not is left out. */
async function shared(groups: readonly Group[], limit: number): Promise<SearchHit[]> {
	const answering = groups.filter(({ size }) => size > 0);
	const sure = answering.filter(({ literal }) => literal);
	const shown = sure.length > 0 ? sure : answering;
	const hits: SearchHit[] = [];
	for (const [at, group] of shown.entries()) {
		// What the groups to come could use at least: a third of the list, or all they have.
		const reserved = shown
			.slice(at + 1)
			.reduce((sum, { size }) => sum + Math.min(size, Math.ceil(limit / 3)), 0);
		const most = Math.max(Math.ceil(limit / 3), limit - hits.length - reserved);
		hits.push(...(await group.dress(Math.min(most, limit - hits.length))));
	}
	return hits;
}

/** A year in two digits beside a word ("vertucci 84") is a year; a number alone is a tooth's. */
function findSources(index: SearchIndex, query: string): WordHit<{ id: string; year: number | null }>[] {
	const words = wordsOf(query).filter((word) => !IDLE.has(word));
	const years = words.filter((word) => /^(\d\d|(19|20)\d\d)$/.test(word));
	const others = words.filter((word) => !/^\d+$/.test(word));
	if (others.length === 0) return index.sources.search(years.filter((year) => year.length === 4));
	const named = index.sources.search(others);
	const ofYears = named.filter(({ item }) => years.every((year) => String(item.year).endsWith(year)));
	// A wrong year still finds the author.
	return years.length > 0 && ofYears.length > 0 ? ofYears : named;
}

function placeHit(hit: LookUpHit, numbers: NumberingSystem): SearchHit {
	const tooth = toothOf(hit.tooth)!;
	const side = hit.iso ? positionOfIso(hit.iso)?.side : undefined;
	const name = side ? tooth.name.replace(' ', ` ${side} `) : tooth.name;
	const number = hit.iso ? ` (${formatToothNumber(hit.iso, numbers)})` : '';
	const root = hit.root ? `, ${rootOf(tooth.id, hit.root)!.name.toLowerCase()}` : '';
	return {
		kind: hit.feature ? 'feature' : hit.root ? 'root' : 'tooth',
		title: `${name}${number}${root}`,
		detail: hit.feature ? featureName(hit.feature) : hit.why === name ? '' : hit.why,
		address: addressOf(hit)
	};
}

function addressOf(hit: LookUpHit): string {
	return hit.feature ? featureAddress(hit.tooth, hit.root, hit.feature) : placeAddress(hit.tooth, hit.root);
}

/** Hits of one kind together, in the order in which each kind first comes. */
function byKind(hits: readonly SearchHit[]): SearchHit[] {
	const kinds = [...new Set(hits.map(({ kind }) => kind))];
	return kinds.flatMap((kind) => hits.filter((hit) => hit.kind === kind));
}

function countryHit({ item: { code, entries } }: WordHit<{ code: string; entries: number }>): SearchHit {
	return {
		kind: 'country',
		title: countryName(code),
		detail: find.countryEntries(entries),
		address: countryAddress(code)
	};
}

async function sourceHits(ids: string[]): Promise<SearchHit[]> {
	const summaries: Record<string, SourceSummary | undefined> = await sourcesById(ids);
	return ids.map((id) => ({
		kind: 'source' as const,
		title: sourceName(id, summaries[id]),
		// A source without authors is named by its title already.
		detail: summaries[id]?.authors ? (summaries[id].title ?? '') : '',
		address: sourceAddress(id)
	}));
}

// One index a revision; hot reload evaluates this module again and makes a new one.
let held: { revision: number; ready: Promise<SearchIndex> } | null = null;

async function currentIndex(): Promise<SearchIndex> {
	const revision = await tableRevision();
	if (held && held.revision >= revision) return held.ready;
	const ready = serverDatabase().then(readSearchIndex);
	held = { revision, ready };
	ready.catch(() => {
		if (held?.ready === ready) held = null;
	});
	return ready;
}
