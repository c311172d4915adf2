import { rootOf, toothOf } from '$lib/anatomy/teeth';
import type { FilterFields } from '$lib/filterQuery';
import { readFilters } from '../api/filters';
import { Problem } from '../api/problem';
import { expectationOf } from '../inference/expectationRequest';
import { rootShapeOf } from '../table/rootShape';
import { sourcesById } from '../table/sources';
import { citedBy } from './cited';

/**
 * What a file about a root is made of. Unlike a page, a file is refused when its filters cannot be used.
 * @throws Problem 404 for an unknown root, 422 naming each filter that cannot be used
 */
export async function rootForFile(params: Partial<Record<string, string>>, filters: FilterFields) {
	const tooth = toothOf(params.tooth ?? '');
	const root = rootOf(params.tooth ?? '', params.root ?? '');
	if (!tooth || !root) throw new Problem(404, 'There is no such root.');
	const expectation = await expectationOf(tooth, root, readFilters(filters));
	const shape = await rootShapeOf(tooth.id, root.id);
	const sources = await sourcesById(citedBy(expectation, shape, filters));
	return { tooth, root, name: `${tooth.id}-${root.id}`, expectation, shape, sources };
}
