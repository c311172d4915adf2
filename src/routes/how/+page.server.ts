import { rootOf, toothOf } from '$lib/anatomy/teeth';
import { coverageOfTable } from '$lib/server/inference/coverageRequest';
import { expectationOf } from '$lib/server/inference/expectationRequest';
import { questionTree } from '$lib/server/inference/tree';
import { findingCharacteristics } from '$lib/server/table/characteristics';
import { rootShapeOf } from '$lib/server/table/rootShape';
import { sourcesById } from '$lib/server/table/sources';
import type { PageServerLoad } from './$types';

/** The root that serves as the example throughout. */
const EXAMPLE = { tooth: 'maxillary-first-molar', root: 'MB' } as const;

export const load: PageServerLoad = async () => {
	const tooth = toothOf(EXAMPLE.tooth)!;
	const root = rootOf(EXAMPLE.tooth, EXAMPLE.root)!;
	const [expectation, shape, characteristics, coverage] = await Promise.all([
		expectationOf(tooth, root, {}),
		rootShapeOf(tooth.id, root.id),
		findingCharacteristics(),
		coverageOfTable()
	]);
	const betas = characteristics.flatMap(
		({ finding, parameter, toothGroup, betaA, betaB, basis, sourceIds }) =>
			betaA === null || betaB === null
				? []
				: [{ finding, parameter, toothGroup, mean: betaA / (betaA + betaB), basis, sourceIds }]
	);
	return {
		tree: questionTree(),
		example: { tooth: tooth.name, root: root.name, expectation, shape },
		betas,
		coverage: {
			...coverage,
			roots: coverage.roots.map((one) => ({
				...one,
				name: `${toothOf(one.tooth)?.name ?? one.tooth}, ${rootOf(one.tooth, one.root)?.name.toLowerCase() ?? one.root}`
			}))
		},
		sources: await sourcesById([...new Set(betas.flatMap(({ sourceIds }) => sourceIds))])
	};
};
