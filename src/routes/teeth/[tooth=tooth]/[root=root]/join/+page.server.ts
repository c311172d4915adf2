import { error, redirect } from '@sveltejs/kit';
import { joinAddress } from '$lib/addresses';
import { rootOf, toothOf } from '$lib/anatomy/teeth';
import { errorsAtFields, questionOf, type LevelErrors } from '$lib/components/join/levelState';
import {
	isFormAddress,
	readState,
	writeState,
	type DecisionLine,
	type JoinState,
	type UnsetLine
} from '$lib/components/join/state';
import { confluenceRequestSchema, type ConfluenceDto } from '$lib/schemas/confluence';
import { FILTER_FIELDS, USUAL_THRESHOLD } from '$lib/schemas/terms';
import { levelRequestSchema, type LevelDto } from '$lib/schemas/level';
import { validate } from '$lib/server/api/endpoint';
import { readFilters } from '$lib/server/api/filters';
import { Problem } from '$lib/server/api/problem';
import { confluenceOf } from '$lib/server/inference/confluenceRequest';
import { levelOf } from '$lib/server/inference/levelRequest';
import { countriesOf } from '$lib/server/table/places';
import { rootShapeOf } from '$lib/server/table/rootShape';
import { sourcesById } from '$lib/server/table/sources';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ params, url, locals }) => {
	const tooth = toothOf(params.tooth);
	const root = rootOf(params.tooth, params.root);
	if (!tooth || !root) error(404, 'Unknown root.');

	const state = readState(url.searchParams);
	// So that what a form without JavaScript made is shared and bookmarked as the page itself would write it.
	if (isFormAddress(url.searchParams))
		redirect(303, `${joinAddress(tooth.id, root.id)}?${writeState(state)}`);
	const line = lineOf(state, locals.preferences.threshold);
	let answer: ConfluenceDto | null = null;
	let errors: { path: string; message: string }[] = [];
	if (state.asked) {
		try {
			const { asked: _, level: __, filters: typed, ...question } = state;
			const filters = readFilters(typed);
			answer = await confluenceOf(
				validate(confluenceRequestSchema, {
					tooth: tooth.id,
					root: root.id,
					...question,
					filters,
					threshold: line.value
				})
			);
		} catch (problem) {
			if (!(problem instanceof Problem)) throw problem;
			errors = problem.errors;
		}
	}
	const level = await levelFor(tooth.id, root.id, state);
	const shape = await rootShapeOf(tooth.id, root.id);
	const cited = [shape.length.source, shape.confluence?.source].filter((id) => typeof id === 'string');
	for (const [name, value] of state.filters) if (name === 'exclude') cited.push(value);
	cited.push(...(answer?.evidence.sources ?? []));
	for (const { expected } of answer?.steps ?? []) cited.push(...(expected?.sources ?? []));
	return {
		tooth: { id: tooth.id, name: tooth.name, kind: tooth.kind },
		root: { id: root.id, name: root.name, canals: root.canals },
		state,
		line,
		unset: unsetLine(locals.preferences.threshold),
		answer,
		errors: errors.filter(({ path }) => !isFilterError(path)),
		filterErrors: errors.filter(({ path }) => isFilterError(path)),
		countries: await countriesOf(tooth.id),
		level,
		shape,
		sources: await sourcesById([...new Set(cited)]),
		/** For the record; the same on the server and in the browser. */
		today: new Date().toISOString().slice(0, 'yyyy-mm-dd'.length)
	};
};

/** The decision line in force: the address wins over the preference of the device, that over the usual one. */
function lineOf({ threshold }: JoinState, preferred: number): DecisionLine {
	return threshold === undefined ? unsetLine(preferred) : { value: threshold, from: 'address' };
}

/** The line that holds while the address gives none. */
function unsetLine(preferred: number): UnsetLine {
	return { value: preferred, from: preferred === USUAL_THRESHOLD ? 'usual' : 'device' };
}

/** The estimator names the filters as a request body does, the address as its fields. */
const isFilterError = (path: string) =>
	path.startsWith('filters.') || FILTER_FIELDS.some((field) => path.split('.')[0] === field);

/** The level of the confluence, if anything was typed of it and two canals can join at all. */
async function levelFor(
	tooth: string,
	root: string,
	state: JoinState
): Promise<{ answer: LevelDto | null; errors: LevelErrors } | null> {
	if (!(state.canals && state.canals >= 2) || state.rootsSeen === 'two') return null;
	const question = questionOf(state.level);
	if (!question) return { answer: null, errors: {} };
	// A premolar seen to have one root is answered as such, as the question of joining is.
	const place = { tooth, root: state.rootsSeen === 'one' ? 'single' : root };
	try {
		const request = validate(levelRequestSchema, { ...place, ...question.request });
		return { answer: await levelOf(request), errors: {} };
	} catch (problem) {
		if (!(problem instanceof Problem)) throw problem;
		return { answer: null, errors: errorsAtFields(question, problem.errors) };
	}
}
