/** Whether the table has a source already. */
import { QueryTypes, type Sequelize } from 'sequelize';
import { normaliseDoi } from './doi';
import type { CslSource } from './literatureFiles';

/** Titles this alike are taken for the same: a word misspelled or a hyphen lost, but not another tooth or country. */
const ALIKE = 0.9;

/** A source that may be the same, and what says so. */
export interface Duplicate {
	id: string;
	title: string | null;
	by: 'doi' | 'pmid' | 'title';
}

/** A text for comparison: small letters without accents, punctuation as blanks. */
export const plain = (text: string): string =>
	text
		.normalize('NFKD')
		.replace(/\p{M}/gu, '')
		.toLowerCase()
		.replace(/<[^>]*>/g, '')
		.replace(/[^\p{L}\p{N}]+/gu, ' ')
		.trim();

/**
 * How alike two plain texts are: Dice's coefficient over their pairs of letters, each pair as often as it occurs.
 * @returns 0 (nothing in common) to 1 (the same)
 * @internal for its test
 */
export function likeness(one: string, other: string): number {
	if (one === other) return 1;
	const pairs = pairsOf(one);
	const total = Math.max(0, one.length - 1) + Math.max(0, other.length - 1);
	if (total === 0) return 0;
	let shared = 0;
	for (const [pair, count] of pairsOf(other)) shared += Math.min(count, pairs.get(pair) ?? 0);
	return (2 * shared) / total;
}

function pairsOf(text: string): Map<string, number> {
	const pairs = new Map<string, number>();
	for (let at = 0; at + 1 < text.length; at++) {
		const pair = text.slice(at, at + 2);
		pairs.set(pair, (pairs.get(pair) ?? 0) + 1);
	}
	return pairs;
}

/** Words that tell two otherwise like titles apart: numbers and the words that name a tooth. */
const telling = (title: string): string =>
	title
		.split(' ')
		.filter((word) =>
			/^(\d+|maxillary|mandibular|upper|lower|first|second|third|molars?|premolars?|canines?|incisors?)$/.test(
				word
			)
		)
		.sort()
		.join(' ');

const firstAuthor = ({ author }: CslSource): string => {
	const [first] = author ?? [];
	return plain(first?.family ?? first?.literal ?? '');
};

/**
 * Whether two sources say by title and first author that they are one. A first author that is not known speaks neither for nor against.
 * @internal for its test
 */
export function sameByTitle(one: CslSource, other: CslSource): boolean {
	const [title, second] = [plain(one.title ?? ''), plain(other.title ?? '')];
	if (title === '' || second === '' || telling(title) !== telling(second)) return false;
	const [author, otherAuthor] = [firstAuthor(one), firstAuthor(other)];
	if (author !== '' && otherAuthor !== '' && author !== otherAuthor) return false;
	return likeness(title, second) >= ALIKE;
}

/** The sources of the table that may be the same one: by DOI, by PMID, or by title and first author. */
export async function findDuplicates(db: Sequelize, csl: CslSource, except?: string): Promise<Duplicate[]> {
	const doi = csl.DOI ? normaliseDoi(csl.DOI) : null;
	const rows = await db.query<{
		id: string;
		csl: string;
		title: string | null;
		doi: string | null;
		pmid: string | null;
	}>('SELECT id, csl, title, doi, pmid FROM source WHERE id <> $except ORDER BY id', {
		type: QueryTypes.SELECT,
		bind: { except: except ?? '' }
	});
	const found: Duplicate[] = [];
	for (const row of rows) {
		const { id, title } = row;
		if (doi !== null && row.doi && normaliseDoi(row.doi) === doi) found.push({ id, title, by: 'doi' });
		else if (csl.PMID && row.pmid === csl.PMID) found.push({ id, title, by: 'pmid' });
		else if (title && csl.title && sameByTitle(csl, JSON.parse(row.csl) as CslSource))
			found.push({ id, title, by: 'title' });
	}
	return found;
}
