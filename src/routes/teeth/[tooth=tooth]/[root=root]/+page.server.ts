import { error } from '@sveltejs/kit';
import { placeAddress } from '$lib/addresses';
import { rootOf, toothOf } from '$lib/anatomy/teeth';
import { readFilterFields } from '$lib/filterQuery';
import { readFilters } from '$lib/server/api/filters';
import { Problem } from '$lib/server/api/problem';
import { expectationOf } from '$lib/server/inference/expectationRequest';
import { countriesOf } from '$lib/server/table/places';
import { rootShapeOf } from '$lib/server/table/rootShape';
import { sourcesById } from '$lib/server/table/sources';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ params, url }) => {
	const tooth = toothOf(params.tooth);
	const root = rootOf(params.tooth, params.root);
	if (!tooth || !root) error(404, 'Unknown root.');

	const filters = readFilterFields(url.searchParams);
	let filterErrors: { path: string; message: string }[] = [];
	let expectation;
	try {
		expectation = await expectationOf(tooth, root, readFilters(filters));
	} catch (problem) {
		if (!(problem instanceof Problem) || problem.status !== 422) throw problem;
		// The page still answers, unfiltered, and says at which field the filters went wrong.
		filterErrors = problem.errors;
		expectation = await expectationOf(tooth, root, {});
	}
	const shape = await rootShapeOf(tooth.id, root.id);
	const cited = [
		...expectation.questions.flatMap(({ studies }) => studies),
		...expectation.features.flatMap(({ studies }) => studies),
		...expectation.notPooled,
		...expectation.reviews
	].map(({ source }) => source);
	for (const [name, value] of filters) if (name === 'exclude') cited.push(value);
	for (const placed of [shape.length, shape.confluence]) if (placed?.source) cited.push(placed.source);
	return {
		tooth: { id: tooth.id, name: tooth.name },
		root: { id: root.id, name: root.name },
		expectation,
		wholeAddress:
			tooth.roots.includes('whole') && root.id !== 'whole' ? placeAddress(tooth.id, 'whole') : null,
		filters,
		filterErrors,
		countries: await countriesOf(tooth.id),
		shape,
		sources: await sourcesById([...new Set(cited)])
	};
};
