import { error } from '@sveltejs/kit';
import { placeAddress } from '$lib/addresses';
import { rootOf, toothOf } from '$lib/anatomy/teeth';
import { comparisonsOf } from '$lib/components/root/comparisons';
import { sortRows, toForestStudies } from '$lib/components/root/forestStudies';
import { readView } from '$lib/components/root/rootView';
import { readFilterFields } from '$lib/filterQuery';
import { expectationUnder } from '$lib/server/root/expectationUnder';
import { citedBy } from '$lib/server/root/cited';
import { expectationOf } from '$lib/server/inference/expectationRequest';
import { countriesOf } from '$lib/server/table/places';
import { rootShapeOf } from '$lib/server/table/rootShape';
import { sourcesById } from '$lib/server/table/sources';
import { standingsOf } from '$lib/server/table/standings';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ params, url }) => {
	const tooth = toothOf(params.tooth);
	const root = rootOf(params.tooth, params.root);
	if (!tooth || !root) error(404, 'Unknown root.');

	const view = readView(url.searchParams);
	const filters = readFilterFields(url.searchParams);
	const { expectation, errors } = await expectationUnder(tooth, root, filters);
	const narrowed = filters.length > 0 && errors.length === 0;
	const shape = await rootShapeOf(tooth.id, root.id);
	const sources = await sourcesById(citedBy(expectation, shape, filters));
	const standings = await standingsOf(
		expectation.questions.flatMap(({ studies }) => studies.map(({ entry }) => entry))
	);
	const methods = expectation.questions.flatMap(({ studies }) => studies.map(({ method }) => method));
	return {
		tooth: { id: tooth.id, name: tooth.name },
		root: { id: root.id, name: root.name },
		expectation,
		/** The figures over all samples, where filters narrowed them. */
		unfiltered: narrowed ? await expectationOf(tooth, root, {}) : null,
		rows: Object.fromEntries(
			expectation.questions.map(({ id, studies }) => [
				id,
				sortRows(toForestStudies(studies, sources, standings), view.sort)
			])
		),
		wholeAddress:
			tooth.roots.includes('whole') && root.id !== 'whole' ? placeAddress(tooth.id, 'whole') : null,
		view,
		filters,
		filterErrors: errors,
		countries: await countriesOf(tooth.id),
		comparisons: comparisonsOf(tooth.id, root.id, narrowed ? filters : [], methods),
		shape,
		sources
	};
};
