import { rootOf, toothOf, type Root, type Tooth } from '$lib/anatomy/teeth';
import { readFilterFields, withQuery, type FilterFields } from '$lib/filterQuery';
import { FILTER_FIELDS } from '$lib/schemas/terms';

/** The two sides of a comparison as addresses name them. */
export const SIDES = ['a', 'b'] as const;
export type SideName = (typeof SIDES)[number];

/** One side as the address writes it. */
export interface SideState {
	/** `maxillary-first-molar/MB`, as typed. */
	place: string;
	filters: FilterFields;
}

/** What stands there before anybody chose: a pair that is often asked about. */
const FIRST_PLACES: Record<SideName, string> = {
	a: 'maxillary-first-molar/MB',
	b: 'maxillary-second-molar/MB'
};

/** The name of a side's field in the address: `a-method`. */
export const sideField = (side: SideName, field: string) => `${side}-${field}`;

/** The place of a root as the address writes it. */
export const placeOf = (tooth: string, root: string) => `${tooth}/${root}`;

/** The root a place names, or undefined. */
export function rootAt(place: string): { tooth: Tooth; root: Root } | undefined {
	const [toothId = '', rootId = ''] = place.split('/');
	const [tooth, root] = [toothOf(toothId), rootOf(toothId, rootId)];
	return tooth && root && { tooth, root };
}

/** Reads one side of an address: `?a=maxillary-first-molar/MB&a-method=cbct`. */
export function readSide(query: URLSearchParams, side: SideName): SideState {
	const own = new URLSearchParams(
		FILTER_FIELDS.flatMap((field) => query.getAll(sideField(side, field)).map((value) => [field, value]))
	);
	return { place: query.get(side)?.trim() || FIRST_PLACES[side], filters: readFilterFields(own) };
}

/** The fields of both sides as an address writes them. */
function sideFields(state: SideState, side: SideName): FilterFields {
	return [
		[side, state.place],
		...state.filters.map(([field, value]): [string, string] => [sideField(side, field), value])
	];
}

/** Address of the page that sets two sides beside each other. */
export function compareAddress(a: SideState, b: SideState, more: FilterFields = []): string {
	return withQuery('/compare', [...sideFields(a, 'a'), ...sideFields(b, 'b'), ...more]);
}
