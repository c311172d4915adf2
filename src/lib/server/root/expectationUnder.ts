import type { Root, Tooth } from '$lib/anatomy/teeth';
import type { FilterFields } from '$lib/filterQuery';
import type { ExpectationDto } from '$lib/schemas/expectation';
import { readFilters } from '../api/filters';
import { Problem, type FieldError } from '../api/problem';
import { expectationOf } from '../inference/expectationRequest';

/**
 * What to expect of a root under filters as an address writes them. A page still answers when they cannot be used:
 * unfiltered, with what is wrong at which field.
 *
 * @throws what is no fault of the filters
 */
export async function expectationUnder(
	tooth: Tooth,
	root: Root,
	filters: FilterFields
): Promise<{ expectation: ExpectationDto; errors: FieldError[] }> {
	try {
		return { expectation: await expectationOf(tooth, root, readFilters(filters)), errors: [] };
	} catch (problem) {
		if (!(problem instanceof Problem) || problem.status !== 422) throw problem;
		return { expectation: await expectationOf(tooth, root, {}), errors: problem.errors };
	}
}
