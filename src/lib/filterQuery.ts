import { FILTER_FIELDS } from '$lib/schemas/terms';

/** Filters as an address writes them: names and values as typed, blanks left out. */
export type FilterFields = [string, string][];

/** The filters of an address, in a fixed order of their names; whatever else stands in it is left out. */
export function readFilterFields(query: URLSearchParams): FilterFields {
	return FILTER_FIELDS.flatMap((name) =>
		query
			.getAll(name)
			.map((value) => value.trim())
			.filter((value) => value !== '')
			.map((value): [string, string] => [name, value])
	);
}

/** An address with fields as its query; without fields the bare address. */
export function withQuery(address: string, fields: FilterFields): string {
	return fields.length > 0 ? `${address}?${new URLSearchParams(fields)}` : address;
}
