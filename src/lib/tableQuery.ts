import { withQuery, type FilterFields } from './filterQuery';
import { ENTRY_FILTERS } from './schemas/terms';

/** Where the table is. */
export const TABLE = '/table';

/** Columns a reader can choose, beside tooth and root, which lead to the entry and always stand. */
export const TABLE_COLUMNS = [
	'measure',
	'figures',
	'total',
	'source',
	'year',
	'method',
	'country',
	'scope',
	'subgroup',
	'locator',
	'standing'
] as const;
export type TableColumn = (typeof TABLE_COLUMNS)[number];

/**
 * What is shown to those who chose nothing.
 * @internal exported for tests
 */
export const USUAL_COLUMNS: readonly TableColumn[] = [
	'measure',
	'figures',
	'total',
	'source',
	'method',
	'country',
	'standing'
];
export const USUAL_SORT = 'author';
export const USUAL_LIMIT = '50';

const NAMES = [...ENTRY_FILTERS, 'sort', 'limit', 'column', 'cursor'];

/**
 * What the table's page reads from its address, in a fixed order, without blanks and without what is usual anyway: the shortest address
 * of the same page.
 */
export function readTableFields(query: URLSearchParams): FilterFields {
	const fields = NAMES.flatMap((name) =>
		query
			.getAll(name)
			.map((value) => value.trim())
			.filter((value) => value !== '')
			.map((value): [string, string] => [name, value])
	);
	const columns = columnsOf(fields);
	const usual =
		columns.length === USUAL_COLUMNS.length && USUAL_COLUMNS.every((one) => columns.includes(one));
	return fields.filter(
		([name, value]) =>
			!(name === 'column' && usual) &&
			!(name === 'sort' && value === USUAL_SORT) &&
			!(name === 'limit' && value === USUAL_LIMIT)
	);
}

/** Whether an address says more than it need: the blanks and usual values that a form sends. */
export function isLonger(query: URLSearchParams): boolean {
	return [...query.keys()].filter((name) => NAMES.includes(name)).length > readTableFields(query).length;
}

/** Chosen columns in their fixed order; words that name none are passed over. */
export function columnsOf(fields: FilterFields): readonly TableColumn[] {
	const chosen = new Set(all(fields, 'column'));
	const columns = TABLE_COLUMNS.filter((column) => chosen.has(column));
	return columns.length > 0 ? columns : USUAL_COLUMNS;
}

/** Values of a name. */
export const all = (fields: FilterFields, name: string): string[] =>
	fields.flatMap(([field, value]) => (field === name ? [value] : []));

/** Address of a page with some fields changed (null takes one out). Any change but that of the cursor starts at the first page again. */
export function changed(
	address: string,
	fields: FilterFields,
	changes: Record<string, string | null>
): string {
	const kept = fields.filter(([name]) => !(name in changes) && name !== 'cursor');
	const added = Object.entries(changes).filter((field): field is [string, string] => field[1] !== null);
	return withQuery(address, [...kept, ...added]);
}

/** Address of a download that holds what the filters of a page leave. */
export function downloadAddress(address: string, fields: FilterFields): string {
	return withQuery(
		address,
		fields.filter(([name]) => (ENTRY_FILTERS as readonly string[]).includes(name))
	);
}
