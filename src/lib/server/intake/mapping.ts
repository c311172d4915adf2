/** Which column of a file is which of ours. Pure. */
import { OBSERVATION_COLUMNS } from '$lib/schemas/table';

export type Column = (typeof OBSERVATION_COLUMNS)[number];
export const COLUMNS: readonly Column[] = OBSERVATION_COLUMNS;

/** Columns without which no row can be placed; of count and percent one is enough, and the others may be missing as they may be empty. */
export const NEEDED: readonly Column[] = [
	'source_id',
	'locator',
	'tooth',
	'root',
	'scope',
	'country',
	'method',
	'subgroup',
	'measure',
	'category',
	'total',
	'provenance'
];

/** Headings people give these columns. */
const OTHER_NAMES: Record<string, Column> = {
	source: 'source_id',
	sourceid: 'source_id',
	reference: 'source_id',
	place: 'locator',
	page: 'locator',
	tooth_type: 'tooth',
	teeth: 'tooth',
	nation: 'country',
	group: 'subgroup',
	class: 'category',
	sequence: 'category',
	configuration: 'category',
	n: 'count',
	number: 'count',
	percentage: 'percent',
	'%': 'percent',
	derived: 'count_derived',
	notes: 'note',
	comment: 'note',
	remarks: 'note'
};

/** A heading for comparison: small letters, blanks and hyphens as underscores. */
const plainHeading = (heading: string): string =>
	heading
		.trim()
		.toLowerCase()
		.replace(/[\s-]+/g, '_');

/** One column of the file. */
export interface HeadingUse {
	heading: string;
	/** Which of ours it is, or null: it is left out. */
	column: Column | null;
	/** Whether its heading is the column's own name; a person may want to look at the others. */
	exact: boolean;
}

const isColumn = (text: string): text is Column => (COLUMNS as readonly string[]).includes(text);

/**
 * Which column each heading names.
 * @param chosen what a person said of headings; an empty text leaves the column out. A heading not in it is guessed by its name
 */
export function useHeadings(
	headings: readonly string[],
	chosen: Readonly<Record<string, string>>
): HeadingUse[] {
	return headings.map((heading) => {
		const plain = plainHeading(heading);
		const said = Object.hasOwn(chosen, heading) ? chosen[heading] : undefined;
		if (said !== undefined) return { heading, column: isColumn(said) ? said : null, exact: said === plain };
		if (isColumn(plain)) return { heading, column: plain, exact: true };
		return { heading, column: OTHER_NAMES[plain] ?? null, exact: false };
	});
}

/** Columns that stand twice, and those that are missing. */
export function faultsOf(uses: readonly HeadingUse[]): { twice: Column[]; missing: Column[] } {
	const named = uses.flatMap(({ column }) => (column === null ? [] : [column]));
	const missing = NEEDED.filter((column) => !named.includes(column));
	if (!named.includes('count') && !named.includes('percent')) missing.push('count');
	return { twice: COLUMNS.filter((column) => named.filter((one) => one === column).length > 1), missing };
}
