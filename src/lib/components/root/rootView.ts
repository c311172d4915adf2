import { isSequence } from '$lib/anatomy/sequence';
import { QUESTION_NAMES, STUDY_SORTS, type StudySort } from '$lib/schemas/terms';

/** How the page of a root is looked at, apart from its filters; the address holds it. */
export interface RootView {
	/** The sequence shown alone. */
	show: string | null;
	/** Order of the samples of every question. */
	sort: StudySort;
	/** Samples of one method together. */
	grouped: boolean;
	/** The question that stands open. */
	open: string | null;
}

/** The order without a choice: a forest plot reads best as a staircase. */
const DEFAULT_SORT: StudySort = 'share';

/** Reads the view of an address; what it cannot use is as if absent. */
export function readView(query: URLSearchParams): RootView {
	const show = query.get('show')?.trim() ?? '';
	const sort = query.get('sort')?.trim();
	const open = query.get('open')?.trim();
	return {
		show: isSequence(show) ? show : null,
		sort: STUDY_SORTS.find((name) => name === sort) ?? DEFAULT_SORT,
		grouped: query.get('group')?.trim() === 'method',
		open: QUESTION_NAMES.find((name) => name === open) ?? null
	};
}

/** The fields of a view as an address writes them; what is as it is without a choice is left out. */
export function viewFields({ show, sort, grouped, open }: RootView): [string, string][] {
	const fields: [string, string | null][] = [
		['show', show],
		['sort', sort === DEFAULT_SORT ? null : sort],
		['group', grouped ? 'method' : null],
		['open', open]
	];
	return fields.flatMap(([name, value]) =>
		value === null ? [] : [[name, value] satisfies [string, string]]
	);
}
