import type { FilterFields } from '$lib/filterQuery';
import { FILTER_LISTS, filtersOfQuery, filtersQuerySchema, type FiltersInForce } from '$lib/schemas/common';
import { readQuery } from './endpoint';

/**
 * Validates filters as an address writes them.
 * @throws Problem 422 naming each field as the address names it
 */
export function readFilters(fields: FilterFields): FiltersInForce {
	return filtersOfQuery(readQuery(new URLSearchParams(fields), filtersQuerySchema, FILTER_LISTS));
}
