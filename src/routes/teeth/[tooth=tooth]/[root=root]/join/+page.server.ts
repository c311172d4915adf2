import { error } from '@sveltejs/kit';
import { rootOf, toothOf } from '$lib/anatomy/teeth';
import { confluenceRequestSchema, type ConfluenceDto } from '$lib/schemas/confluence';
import { validate } from '$lib/server/api/endpoint';
import { Problem } from '$lib/server/api/problem';
import { confluenceOf } from '$lib/server/inference/confluenceRequest';
import { rootShapeOf } from '$lib/server/table/rootShape';
import { sourcesById } from '$lib/server/table/sources';
import type { PageServerLoad } from './$types';
import { readState } from '$lib/components/join/state';

export const load: PageServerLoad = async ({ params, url }) => {
	const tooth = toothOf(params.tooth);
	const root = rootOf(params.tooth, params.root);
	if (!tooth || !root) error(404, 'Unknown root.');

	const state = readState(url.searchParams);
	let answer: ConfluenceDto | null = null;
	let errors: { path: string; message: string }[] = [];
	if (state.asked) {
		try {
			const { asked: _, ...question } = state;
			answer = await confluenceOf(
				validate(confluenceRequestSchema, { tooth: tooth.id, root: root.id, ...question })
			);
		} catch (problem) {
			if (!(problem instanceof Problem)) throw problem;
			errors = problem.errors;
		}
	}
	const shape = await rootShapeOf(tooth.id, root.id);
	const shapeSources = [shape.length.source, shape.confluence?.source].filter((id) => typeof id === 'string');
	return {
		tooth: { id: tooth.id, name: tooth.name, kind: tooth.kind },
		root: { id: root.id, name: root.name, canals: root.canals },
		state,
		answer,
		errors,
		shape,
		sources: await sourcesById(shapeSources)
	};
};
