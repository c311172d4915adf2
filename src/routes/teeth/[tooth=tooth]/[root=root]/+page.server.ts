import { error } from '@sveltejs/kit';
import { rootOf, toothOf } from '$lib/anatomy/teeth';
import { FILTER_LISTS, filtersOfQuery, filtersQuerySchema } from '$lib/schemas/common';
import { readQuery } from '$lib/server/api/endpoint';
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

	let filters = {};
	let filterErrors: { path: string; message: string }[] = [];
	let expectation;
	try {
		filters = filtersOfQuery(readQuery(withoutBlanks(url), filtersQuerySchema, FILTER_LISTS));
		expectation = await expectationOf(tooth, root, filters);
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
	for (const placed of [shape.length, shape.confluence]) if (placed?.source) cited.push(placed.source);
	return {
		tooth: { id: tooth.id, name: tooth.name },
		root: { id: root.id, name: root.name },
		expectation,
		typed: Object.fromEntries(
			[...new Set(url.searchParams.keys())].map((name) => [name, url.searchParams.getAll(name)])
		),
		filterErrors,
		countries: await countriesOf(tooth.id),
		shape,
		sources: await sourcesById([...new Set(cited)])
	};
};

/** A form sends its empty fields too; they filter nothing. */
function withoutBlanks(url: URL): URL {
	const kept = new URL(url);
	for (const [name, value] of url.searchParams)
		if (value.trim() === '') kept.searchParams.delete(name, value);
	return kept;
}
