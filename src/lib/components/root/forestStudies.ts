import { sourceAddress } from '$lib/addresses';
import { METHODS, type StudySort } from '$lib/schemas/terms';
import type { SourceSummary } from '$lib/schemas/table';
import type { StudyDto } from '$lib/schemas/teeth';
import { root as words } from '$lib/strings/root';
import { sourceName } from '$lib/strings/source';

/** A study as the forest plot lists it, named by its source. */
export interface StudyRow {
	/** Stable key of the sample: its entry. */
	id: number;
	label: string;
	href: string;
	locator: string;
	country: string;
	/** Method in words. */
	method: string;
	events: number;
	total: number;
	/** Share of the information, 0..1; absent where none is worked out. */
	weight?: number;
	year: number | null;
	/** Not seen in the source itself: quoted by another, or recalled; absent: read. */
	mark?: 'secondary' | 'unverified';
}

/** Rows of one method, or all rows under no name. */
export interface StudyGroup {
	name: string | null;
	rows: StudyRow[];
}

type Study = StudyDto & { weight?: number };

/** Studies as the forest plot takes them. */
export function toForestStudies(
	studies: readonly Study[],
	sources: Record<string, SourceSummary>,
	standings: Record<number, 'read' | 'secondary' | 'unverified'> = {}
): StudyRow[] {
	return studies.map(({ source, entry, locator, country, method, events, total, weight }) => {
		const standing = standings[entry];
		return {
			id: entry,
			label: sourceName(source, sources[source]),
			href: sourceAddress(source),
			locator,
			country,
			method: words.methods[method] ?? method,
			events,
			total,
			...(weight !== undefined && { weight }),
			year: sources[source]?.year ?? null,
			...((standing === 'secondary' || standing === 'unverified') && { mark: standing })
		};
	});
}

const byLabel = (a: StudyRow, b: StudyRow) => a.label.localeCompare(b.label, 'en') || a.id - b.id;

const ORDERS: Record<StudySort, (a: StudyRow, b: StudyRow) => number> = {
	share: (a, b) => b.events / b.total - a.events / a.total,
	// An unknown year comes last.
	year: (a, b) => (b.year ?? -Infinity) - (a.year ?? -Infinity) || 0,
	size: (a, b) => b.total - a.total,
	weight: (a, b) => (b.weight ?? 0) - (a.weight ?? 0),
	source: byLabel,
	country: (a, b) =>
		Number(a.country === '') - Number(b.country === '') || a.country.localeCompare(b.country, 'en')
};

/**
 * Rows in an order: highest share, newest, largest or heaviest first; sources and countries by the alphabet, unknown
 * ones last. Ties stand by source.
 */
export function sortRows(rows: readonly StudyRow[], sort: StudySort): StudyRow[] {
	return [...rows].sort((a, b) => ORDERS[sort](a, b) || byLabel(a, b));
}

/** Rows as they are listed: of one method together, in the order methods are named everywhere; or all in one. */
export function groupRows(rows: readonly StudyRow[], byMethod: boolean): StudyGroup[] {
	if (!byMethod) return [{ name: null, rows: [...rows] }];
	const names: string[] = METHODS.map((method) => words.methods[method] ?? method);
	const place = (name: string) => (names.includes(name) ? names.indexOf(name) : names.length);
	return [...new Set(rows.map(({ method }) => method))]
		.sort((a, b) => place(a) - place(b) || a.localeCompare(b, 'en'))
		.map((name) => ({ name, rows: rows.filter(({ method }) => method === name) }));
}
