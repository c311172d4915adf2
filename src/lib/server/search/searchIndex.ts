/** What the search knows of one revision of the table: sources, countries, and where features are recorded. */
import { QueryTypes, type Sequelize } from 'sequelize';
import { rootOf, teeth, type RootId } from '$lib/anatomy/teeth';
import type { FeaturePlace } from '$lib/anatomy/lookup';
import { everyNameOf } from '$lib/strings/countries';
import { gatherFeatures } from '../inference/features';
import { indexTable, type TableIndex } from '../inference/tableIndex';
import { yearOf } from '../table/citable';
import type { CslSource } from '../table/literatureFiles';
import { readSnapshot } from '../table/snapshot';
import { WordIndex, wordsOf } from './wordIndex';

const TITLE_PENALTY = 0.15;
/** "Smith and others": a later author says a little less than the first, who names the work. */
const LATER_AUTHOR_PENALTY = 0.05;

/** A source as it is searched. */
interface SearchedSource {
	id: string;
	year: number | null;
}

/** A country as it is searched. */
interface SearchedCountry {
	code: string;
	/** Published entries with teeth from there. */
	entries: number;
}

/** Everything the search looks through. */
export interface SearchIndex {
	sources: WordIndex<SearchedSource>;
	countries: WordIndex<SearchedCountry>;
	/** Places of features, the one with most samples first. */
	features: FeaturePlace[];
}

/** Reads the table and indexes it; some tenths of a second, once a revision. */
export async function readSearchIndex(db: Sequelize): Promise<SearchIndex> {
	const rows = await db.query<{ id: string; csl: string }>('SELECT id, csl FROM source ORDER BY id', {
		type: QueryTypes.SELECT
	});
	const counts = await db.query<{ country: string; entries: number }>(
		`SELECT sample.country, COUNT(*) AS entries FROM entry JOIN sample ON sample.id = entry.sample_id
			WHERE entry.state = 'published' GROUP BY sample.country`,
		{ type: QueryTypes.SELECT }
	);
	const snapshot = await readSnapshot(db);
	return {
		sources: indexSources(rows.map(({ id, csl }) => ({ id, csl: JSON.parse(csl) as CslSource }))),
		countries: indexCountries(counts),
		features: featurePlaces(indexTable(snapshot.rows, snapshot.sources))
	};
}

/** Sources by authors, year and title. */
function indexSources(sources: readonly { id: string; csl: CslSource }[]): WordIndex<SearchedSource> {
	const searched = sources.map(({ id, csl }) => ({ id, csl, year: yearOf(csl) }));
	return new WordIndex(searched, ({ csl, year }) => {
		const authors = (csl.author ?? []).flatMap(({ family, literal, given }, place) =>
			wordsOf(family ?? literal ?? given ?? '').map((word) => ({
				word,
				penalty: place === 0 ? 0 : LATER_AUTHOR_PENALTY
			}))
		);
		const title = wordsOf(csl.title ?? '').map((word) => ({ word, penalty: TITLE_PENALTY }));
		return [...authors, ...title, ...(year === null ? [] : [{ word: String(year), penalty: 0 }])];
	});
}

/** Countries by their names in several languages; a sample of several countries counts for each. */
function indexCountries(counts: readonly { country: string; entries: number }[]): WordIndex<SearchedCountry> {
	const byCode = new Map<string, number>();
	for (const { country, entries } of counts)
		for (const code of country.split('+'))
			if (/^[A-Z]{3}$/.test(code)) byCode.set(code, (byCode.get(code) ?? 0) + entries);
	return new WordIndex(
		[...byCode].map(([code, entries]) => ({ code, entries })),
		({ code }) => everyNameOf(code).flatMap((name) => wordsOf(name).map((word) => ({ word, penalty: 0 })))
	);
}

/** Where the pages of teeth and roots show a feature, by the number of samples. */
function featurePlaces(index: TableIndex): FeaturePlace[] {
	const found = teeth.flatMap((tooth) =>
		[null, ...tooth.roots].flatMap((root) =>
			gatherFeatures(index, tooth.id, root, {}).map(({ id, studies }) => ({
				feature: id,
				tooth: tooth.id,
				...(root === null || isWhole(tooth.id, root) ? {} : { root }),
				samples: studies.length
			}))
		)
	);
	return found
		.sort((a, b) => b.samples - a.samples)
		.map(({ samples: _, ...place }) => place)
		.filter((place, at, all) => all.findIndex((other) => samePlace(other, place)) === at);
}

/** Of teeth with one root, and of the whole premolar, the tooth's own page shows the same figures. */
function isWhole(tooth: string, root: RootId): boolean {
	return root === 'whole' || (root === 'single' && rootOf(tooth, 'whole') === undefined);
}

function samePlace(a: FeaturePlace, b: FeaturePlace): boolean {
	return a.feature === b.feature && a.tooth === b.tooth && a.root === b.root;
}
