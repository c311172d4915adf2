/**
 * Rows into samples: one sample is what one source counted in one set of teeth for one measure (for features: one
 * feature). Male and female, or left and right, become their sum where the whole is not given.
 */
import { askedRoot } from './scope';
import type { ScopeGrant } from './scope';
import type { ObservationRow } from './types';

/** A row that may enter, with what its scope grants. */
export interface AdmittedRow {
	row: ObservationRow;
	grant: Exclude<ScopeGrant, 'none'>;
}

/** A row that entered nothing, and why. */
export interface ShutOut {
	row: ObservationRow;
	reason: string;
}

/** One sample: `counts` of `total` roots (or teeth) by category. */
export interface Sample {
	source: string;
	/** Entries its figures come from; the first is the one it is named by. */
	entries: number[];
	locator: string;
	tooth: string;
	/** As the source has it: an incisor's `whole` is kept apart from its `single` here. */
	root: string;
	/** The root it is asked about. */
	asked: string;
	scope: string;
	country: string;
	method: string;
	measure: string;
	grant: Exclude<ScopeGrant, 'none'>;
	total: number;
	counts: ReadonlyMap<string, number>;
	/** Notes of its rows, one a line. */
	note: string;
}

/** The two halves by which a sample may be given instead of as a whole, in the order they are tried. */
const HALVES = [
	['male', 'female'],
	['left', 'right']
] as const;

/** Rounding of printed percentages: a list of classes that misses its total by this share is still complete. */
export const ROUNDING_SHARE = 0.01;

/**
 * Groups rows that may enter into samples.
 *
 * @returns the samples in the order of their first row, and the rows no sample took, with the reason
 */
export function buildSamples(rows: readonly AdmittedRow[]): { samples: Sample[]; shutOut: ShutOut[] } {
	const samples: Sample[] = [];
	const shutOut: ShutOut[] = [];
	for (const group of groupBy(rows, ({ row }) => sampleKey(row)).values()) {
		const whole = group.filter(({ row }) => row.subgroup === 'all');
		const parts = group.filter(({ row }) => row.subgroup !== 'all');
		// A source may count the same teeth twice with different totals (canals in 300, roots in 435): two samples.
		for (const table of groupBy(whole, ({ row }) => String(row.total)).values())
			samples.push(sampleOf(table));
		const summed = whole.length > 0 ? null : sumOfHalves(parts);
		if (summed) samples.push(summed);
		const taken = new Set(summed?.entries);
		for (const { row } of parts) {
			if (taken.has(row.entry)) continue;
			shutOut.push({ row, reason: partReason(row, whole.length > 0 || summed !== null) });
		}
	}
	return { samples, shutOut };
}

function partReason(row: ObservationRow, wholeKnown: boolean): string {
	return wholeKnown
		? `Only a part of the sample (${row.subgroup}); the whole of it is used.`
		: `Only a part of a sample (${row.subgroup}), and the whole cannot be put together from it.`;
}

/** Everything that makes two figures figures of the same teeth, but for the subgroup and the total. */
function sampleKey(row: ObservationRow): string {
	const feature = row.measure === 'feature' ? row.category : '';
	return [row.source, row.tooth, row.root, row.scope, row.country, row.method, row.measure, feature].join(
		'|'
	);
}

function sampleOf(table: readonly AdmittedRow[]): Sample {
	const counts = new Map<string, number>();
	// Two rows for one category of one sample (an abstract and a table of one paper): the first stands.
	for (const { row } of table) if (!counts.has(row.category)) counts.set(row.category, row.count ?? 0);
	return describe(table, table[0].row.total ?? 0, counts);
}

function describe(table: readonly AdmittedRow[], total: number, counts: Map<string, number>): Sample {
	const { row, grant } = table[0];
	const distinct = <T>(values: T[]): T[] => [...new Set(values)];
	return {
		source: row.source,
		entries: distinct(table.map((each) => each.row.entry)),
		locator: distinct(table.map((each) => each.row.locator)).join('; '),
		tooth: row.tooth,
		root: row.root,
		asked: askedRoot(row.tooth, row.root),
		scope: row.scope,
		country: row.country,
		method: row.method,
		measure: row.measure,
		grant,
		total,
		counts,
		note: distinct(table.map((each) => each.row.note)).join('\n')
	};
}

/** The sum of male and female, or of left and right, where both are there and each has one total. */
function sumOfHalves(parts: readonly AdmittedRow[]): Sample | null {
	for (const [first, second] of HALVES) {
		const a = parts.filter(({ row }) => row.subgroup === first);
		const b = parts.filter(({ row }) => row.subgroup === second);
		if (!hasOneTotal(a) || !hasOneTotal(b)) continue;
		const left = sampleOf(a);
		const right = sampleOf(b);
		const counts = new Map<string, number>();
		for (const category of new Set([...left.counts.keys(), ...right.counts.keys()])) {
			const one = countIn(left, category);
			const other = countIn(right, category);
			if (one !== null && other !== null) counts.set(category, one + other);
		}
		if (counts.size > 0) return describe([...a, ...b], left.total + right.total, counts);
	}
	return null;
}

function hasOneTotal(rows: readonly AdmittedRow[]): boolean {
	return rows.length > 0 && rows.every(({ row }) => row.total === rows[0].row.total);
}

/** A category one half does not mention is none there if that half's list is complete; otherwise it is unknown. */
function countIn(half: Sample, category: string): number | null {
	const count = half.counts.get(category);
	if (count !== undefined) return count;
	const sum = [...half.counts.values()].reduce((total, each) => total + each, 0);
	return Math.abs(half.total - sum) <= Math.max(1, ROUNDING_SHARE * half.total) ? 0 : null;
}

/** Groups in the order of first appearance. */
export function groupBy<T>(items: readonly T[], key: (item: T) => string): Map<string, T[]> {
	const groups = new Map<string, T[]>();
	for (const item of items) {
		const name = key(item);
		const group = groups.get(name);
		if (group) group.push(item);
		else groups.set(name, [item]);
	}
	return groups;
}
