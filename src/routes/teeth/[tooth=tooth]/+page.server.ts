import { error } from '@sveltejs/kit';
import { rootOf, toothOf } from '$lib/anatomy/teeth';
import { expectationOf } from '$lib/server/inference/expectationRequest';
import { sourcesById } from '$lib/server/table/sources';
import { rootShapeOf } from '$lib/server/table/rootShape';
import { describeTooth } from '$lib/server/table/teeth';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ params }) => {
	const tooth = toothOf(params.tooth);
	if (!tooth) error(404, 'Unknown tooth.');
	const [described, roots] = await Promise.all([
		describeTooth(tooth),
		Promise.all(
			tooth.roots.map(async (id) => {
				const root = rootOf(tooth.id, id)!;
				const [expectation, shape] = await Promise.all([
					expectationOf(tooth, root, {}),
					rootShapeOf(tooth.id, id)
				]);
				return { root: { id, name: root.name }, expectation, shape };
			})
		)
	]);
	const cited = [
		...described.rootCounts,
		...described.canalCounts,
		...described.lengths,
		...described.features.flatMap(({ studies }) => studies),
		...roots.flatMap(({ expectation }) => [
			...expectation.features.flatMap(({ studies }) => studies),
			...expectation.questions[0].studies
		])
	].map(({ source }) => source);
	return { tooth: described, kind: tooth.kind, roots, sources: await sourcesById([...new Set(cited)]) };
};
