import { stringify } from 'csv-stringify/sync';
import type { FilterFields } from '$lib/filterQuery';
import type { ExpectationDto } from '$lib/schemas/expectation';
import type { SourceSummary } from '$lib/schemas/table';
import { sourceName } from '$lib/strings/source';
import type { EntryStanding } from '../table/standings';

const COLUMNS = [
	'kind',
	'question',
	'text',
	'source',
	'citation',
	'entry',
	'locator',
	'standing',
	'country',
	'method',
	'events',
	'total',
	'weight',
	'mean',
	'median',
	'lower95',
	'upper95',
	'tooth',
	'root',
	'filters',
	'table_revision'
] as const;
type Row = Partial<Record<(typeof COLUMNS)[number], string | number>>;

/**
 * The samples and estimates of a root's nine questions, and its sequences, as CSV (RFC 4180, UTF-8 with a byte order
 * mark, so that spreadsheets read accents). Figures are unrounded. A cell that a spreadsheet would take for a formula
 * is made harmless by a leading apostrophe.
 */
export function samplesCsv(
	expectation: ExpectationDto,
	sources: Record<string, SourceSummary>,
	standings: Record<number, EntryStanding>,
	filters: FilterFields
): string {
	const every: Row = {
		tooth: expectation.tooth,
		root: expectation.root,
		filters: new URLSearchParams(filters).toString(),
		table_revision: expectation.tableRevision
	};
	const ends = ([lower95, upper95]: readonly [number, number]) => ({ lower95, upper95 });
	const rows = expectation.questions.flatMap(({ id, text, borrowed, studies, pooled, predictive }): Row[] => {
		const asked = { question: id, text };
		const borrowing = borrowed ? { standing: 'borrowed from other roots' } : {};
		return [
			...studies.map(({ source, entry, locator, country, method, events, total, weight }) => ({
				kind: 'sample',
				...asked,
				source,
				citation: sourceName(source, sources[source]),
				entry,
				locator,
				standing: standings[entry] ?? '',
				country,
				method,
				events,
				total,
				weight
			})),
			...[
				{ kind: 'middle population', summary: pooled },
				{ kind: 'new population', summary: predictive }
			].map(({ kind, summary: { mean, median, interval } }) => ({
				kind,
				...asked,
				...borrowing,
				mean,
				median,
				...ends(interval)
			}))
		];
	});
	const sequences = expectation.sequences.map(({ sequence, mean, interval }): Row => ({
		kind: 'sequence in a new population',
		text: sequence,
		mean,
		...ends(interval)
	}));
	return stringify(
		[...rows, ...sequences].map((row) => ({ ...every, ...row })),
		{ header: true, columns: [...COLUMNS], bom: true, escape_formulas: true, record_delimiter: 'windows' }
	);
}
