import { rootOf, teeth } from '$lib/anatomy/teeth';
import { placeOf, readSide, rootAt, type SideName } from '$lib/components/compare/compareState';
import { readFilters } from '$lib/server/api/filters';
import { differencesOf } from '$lib/server/inference/compareRequest';
import { expectationUnder } from '$lib/server/root/expectationUnder';
import { rootShapeOf } from '$lib/server/table/rootShape';
import { sourcesById } from '$lib/server/table/sources';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ url }) => {
	const [a, b] = await Promise.all([loadSide(url, 'a'), loadSide(url, 'b')]);
	const cited = [a, b].flatMap(({ answer }) =>
		[answer?.shape.length.source, answer?.shape.confluence?.source].filter((id) => typeof id === 'string')
	);
	return {
		sides: { a: a.state, b: b.state },
		answers: a.answer && b.answer ? { a: a.answer, b: b.answer } : null,
		differences: a.side && b.side ? await differencesOf(a.side, b.side) : [],
		places: teeth.map((tooth) => ({
			name: tooth.name,
			roots: tooth.roots.flatMap((id) => {
				const root = rootOf(tooth.id, id);
				return root ? [{ place: placeOf(tooth.id, id), name: root.name }] : [];
			})
		})),
		sources: await sourcesById([...new Set(cited)])
	};
};

/** One side: what the address says of it, what is wrong with that, and the answer where its root is known. */
async function loadSide(url: URL, name: SideName) {
	const typed = readSide(url.searchParams, name);
	const found = rootAt(typed.place);
	if (!found) return { state: { ...typed, known: false, errors: [] }, side: null, answer: null };
	const { tooth, root } = found;
	const { expectation, errors } = await expectationUnder(tooth, root, typed.filters);
	const filters = errors.length > 0 ? {} : readFilters(typed.filters);
	return {
		state: { ...typed, known: true, errors },
		side: { tooth, root, filters },
		answer: {
			tooth: { id: tooth.id, name: tooth.name },
			root: { id: root.id, name: root.name },
			/** Filters in force. */
			filters: errors.length > 0 ? [] : typed.filters,
			expectation,
			shape: await rootShapeOf(tooth.id, root.id)
		}
	};
}
