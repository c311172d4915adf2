/**
 * The closed lists of words that requests and screens share. Apart from the schemas, because the browser needs the words and not zod,
 * which is large and tries at once whether it may evaluate code: the content security policy forbids that.
 */

/** Methods of the evidence files, in the order screens offer them. */
export const METHODS = [
	'micro-ct',
	'clearing',
	'sectioning',
	'cbct',
	'microscope',
	'clinical',
	'mixed',
	'radiograph',
	'review'
] as const;

/** Methods an estimate can be narrowed to: everything but published reviews, which are never pooled. */
export const POOLED_METHODS = METHODS.filter((method) => method !== 'review');

/** What an entry's figures count. */
export const MEASURES = [
	'configuration',
	'canal-count',
	'root-count',
	'foramen-count',
	'feature',
	'confluence',
	'extra-canal-confluence'
] as const;

/** What entries can be sorted by. A leading - reverses an order. */
export const ENTRY_SORTS = [
	'id',
	'source',
	'author',
	'year',
	'tooth',
	'root',
	'measure',
	'method',
	'country',
	'total'
] as const;
/** What sources can be sorted by. */
export const SOURCE_SORTS = ['id', 'author', 'title', 'year', 'entries'] as const;

/** Filters of the table's entries, by their names in an address. */
export const ENTRY_FILTERS = ['tooth', 'root', 'measure', 'method', 'country', 'source', 'q'] as const;

/** Names of the filters in an address. The lists among them may repeat. */
export const FILTER_FIELDS = ['method', 'country', 'yearFrom', 'yearTo', 'minTotal', 'exclude'] as const;

/** The tests that can tell whether two canals join, in the order answers list them. */
export const TESTS = [
	'cone-mark',
	'draw',
	'file-contact',
	'two-files',
	'angled-radiograph',
	'cbct-reading'
] as const;
export const RESULTS = ['positive', 'negative', 'unclear'] as const;
/** How a root was searched for further canals. */
export const SEARCHES = ['unaided', 'loupes', 'microscope', 'microscope-troughing', 'cbct'] as const;

/** What can be measured of the level of a confluence, in the order screens list them. */
export const MEASUREMENT_KINDS = ['cone-mark', 'cone-shortfall', 'file-contact', 'cbct'] as const;
/** How far the second canal was shaped. */
export const SHAPED_TO = ['full', 'confluence', 'unknown'] as const;
