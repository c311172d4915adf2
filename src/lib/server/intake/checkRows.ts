/** From the rows of a file to entries, with every problem by row and column. Pure. */
import { createHash } from 'node:crypto';
import { checkEntry } from '$lib/entry/checks';
import type { Remark } from '$lib/entry/remarks';
import type { EntryContent, EntryText } from '$lib/entry/content';
import type { Problem, ProblemList } from '$lib/schemas/intake';
import { intake as words } from '$lib/strings/intake';
import { originalCell } from '../table/harmlessCells';
import type { Delimiter, Encoding, Sheet } from './decode';
import { MOST_PROBLEMS } from './limits';
import { COLUMNS, faultsOf, useHeadings, type Column, type HeadingUse } from './mapping';
import { DATE_MARK } from './spreadsheet';

/** An entry as the file has it: which rows, and what they say. */
export interface PlannedEntry {
	/** Same sample, measure, locator and provenance: the same entry. */
	key: string;
	rows: number[];
	content: EntryContent;
}

export interface CheckedRows {
	headings: HeadingUse[];
	missing: Column[];
	twice: Column[];
	encoding: Encoding | null;
	delimiter: Delimiter | null;
	/** Rows with anything in them. */
	rows: number;
	problems: ProblemList;
	warnings: ProblemList;
	/** Empty if there is any problem: all or nothing. */
	entries: PlannedEntry[];
}

/** What the table has, as far as rows are compared with it. */
export interface TableContext {
	sources: ReadonlySet<string>;
	/** Canal sequences of published entries, by `tooth|root`. */
	shown: ReadonlyMap<string, ReadonlySet<string>>;
}

type Cells = Record<Column, string>;

const LONGEST_SHOWN = 80;
/** Fields of an entry by the column they come from. */
const COLUMN_OF: Record<string, Column> = { source: 'source_id', countDerived: 'count_derived' };

/** Columns that say which entry a row belongs to. */
const OF_ENTRY = COLUMNS.filter(
	(column) => !['category', 'count', 'percent', 'count_derived', 'note'].includes(column)
);

class Problems {
	private readonly first: Problem[] = [];
	private readonly byColumn = new Map<string, number>();
	private readonly rows = new Set<number>();
	private total = 0;
	add(row: number, column: string, value: string, message: string) {
		this.total += 1;
		this.rows.add(row);
		this.byColumn.set(column, (this.byColumn.get(column) ?? 0) + 1);
		if (this.first.length < MOST_PROBLEMS)
			this.first.push({ row, column, value: value.slice(0, LONGEST_SHOWN), message });
	}
	get list(): ProblemList {
		const byColumn = [...this.byColumn].sort((a, b) => b[1] - a[1]);
		const first = [...this.first].sort((a, b) => a.row - b.row);
		return { total: this.total, rows: this.rows.size, first, byColumn };
	}
}

/** What makes two entries the same one, whatever their figures say. */
export function entryKey(content: Omit<EntryContent, 'figures'>): string {
	const { source, tooth, root, scope, country, method, subgroup, total, measure, locator, provenance } =
		content;
	const parts = [source, tooth, root, scope, country, method, subgroup, total, measure, locator, provenance];
	return createHash('sha256').update(JSON.stringify(parts)).digest('base64url').slice(0, 27);
}

/**
 * Checks the rows of a file with the checks of the entry form, and gathers rows of one entry.
 * @param chosen what a person said of headings (`useHeadings`)
 */
export function checkRows(
	sheet: Sheet,
	chosen: Readonly<Record<string, string>>,
	table: TableContext
): CheckedRows {
	const [head = [], ...body] = sheet.rows;
	const headings = useHeadings(
		head.map((heading) => originalCell(heading).trim()),
		chosen
	);
	const { twice, missing } = faultsOf(headings);
	const problems = new Problems();
	const warnings = new Problems();
	const result = {
		...{ headings, missing, twice, encoding: sheet.encoding, delimiter: sheet.delimiter },
		rows: body.filter((row) => row.length > 0).length
	};
	for (const column of missing) problems.add(1, column, '', words.missingColumn(column));
	for (const column of twice) problems.add(1, column, '', words.columnTwice(column));
	if (result.rows === 0) problems.add(2, '', '', words.noRows);
	if (missing.length > 0 || twice.length > 0 || result.rows === 0)
		return { ...result, problems: problems.list, warnings: warnings.list, entries: [] };

	const groups = groupRows(body, headings, problems);
	const headingOf = (column: Column) => headings.find((use) => use.column === column)?.heading ?? column;
	const entries: PlannedEntry[] = [];
	for (const { rows, cells } of groups) {
		const { content, remarks } = checkEntry(entryOf(cells), {
			hasSource: (id) => table.sources.has(id),
			shown: (tooth, root) => table.shown.get(`${tooth}|${root}`) ?? null
		});
		for (const remark of remarks) {
			if (remark.level === 'note') continue;
			const list = remark.level === 'error' ? problems : warnings;
			place(remark, rows.length).forEach(({ index, column }) =>
				list.add(rows[index], column && headingOf(column), column ? cells[index][column] : '', remark.message)
			);
		}
		if (content) entries.push({ key: entryKey(content), rows, content: asWritten(content, cells) });
	}
	const failed = problems.list.total > 0;
	return { ...result, problems: problems.list, warnings: warnings.list, entries: failed ? [] : entries };
}

/** Rows that say the same of their sample, measure, place and provenance, together. */
function groupRows(body: string[][], headings: readonly HeadingUse[], problems: Problems) {
	const groups = new Map<string, { rows: number[]; cells: Cells[] }>();
	for (const [index, row] of body.entries()) {
		if (row.length === 0) continue;
		const number = index + 2;
		if (row.length > headings.length && row.slice(headings.length).some((cell) => cell.trim() !== ''))
			problems.add(number, '', '', words.tooManyCells(row.length, headings.length));
		else if (row.length === 1 && headings.length > 2) problems.add(number, '', row[0], words.tooFewCells);
		const cells = readCells(row, headings, number, problems);
		const key = JSON.stringify(OF_ENTRY.map((column) => cells[column].trim()));
		const group = groups.get(key) ?? { rows: [], cells: [] };
		group.rows.push(number);
		group.cells.push(cells);
		groups.set(key, group);
	}
	return groups.values();
}

function readCells(
	row: string[],
	headings: readonly HeadingUse[],
	number: number,
	problems: Problems
): Cells {
	const cells: Partial<Record<Column, string>> = {};
	for (const [at, { column, heading }] of headings.entries()) {
		if (column === null) continue;
		const cell = row[at] ?? '';
		const date = cell.startsWith(DATE_MARK) ? cell.slice(DATE_MARK.length) : null;
		if (date !== null) problems.add(number, heading, date, words.turnedIntoDate);
		cells[column] = date ?? originalCell(cell);
	}
	if (cells.count_derived !== undefined && !['', 'yes', 'no'].includes(cells.count_derived.trim()))
		problems.add(
			number,
			headings.find(({ column }) => column === 'count_derived')!.heading,
			cells.count_derived,
			words.yesOrNo
		);
	return Object.fromEntries(COLUMNS.map((column) => [column, cells[column] ?? ''])) as Cells;
}

function entryOf(cells: readonly Cells[]): EntryText {
	const [{ source_id, locator, tooth, root, scope, country, method, subgroup, total, measure, provenance }] =
		cells;
	return {
		...{
			source: source_id,
			locator,
			tooth,
			root,
			scope,
			country,
			method,
			subgroup,
			total,
			measure,
			provenance
		},
		figures: cells.map(({ category, count, percent, count_derived, note }) => ({
			...{ category, count, percent, note },
			countDerived: count_derived
		}))
	};
}

/** Where a remark of the entry stands in the file: one of a figure in its row; one of the sample in every row that says the same. */
function place({ path, level }: Remark, rows: number): { index: number; column: Column | '' }[] {
	const figure = /^figures\.(\d+)\.(\w+)$/.exec(path);
	if (figure) return [{ index: Number(figure[1]), column: COLUMN_OF[figure[2]] ?? (figure[2] as Column) }];
	if (path === 'figures') return [{ index: 0, column: '' }];
	const column = COLUMN_OF[path] ?? (path as Column);
	const indexes = level === 'error' ? Array.from({ length: rows }, (_, index) => index) : [0];
	return indexes.map((index) => ({ index, column }));
}

/** A count that the check worked out from a percentage stays out: a table that is imported is the table that was exported. */
function asWritten(content: EntryContent, cells: readonly Cells[]): EntryContent {
	return {
		...content,
		figures: content.figures.map((figure, index) => {
			const none = cells[index].count.trim() === '';
			return {
				...figure,
				count: none ? null : figure.count,
				countDerived: cells[index].count_derived.trim() === 'yes'
			};
		})
	};
}
