import { leafFacts } from '$lib/anatomy/sequence';
import type { Leaf } from '$lib/anatomy/sequence';
import type { Test } from './confluenceQuestion';
import { PATHS } from './distribution';
import type { Step } from './distribution';
import { betaTable, gridTable } from './inverseTables';
import { choose, updated } from './likelihoods';
import type { Evidence, FindingLikelihood } from './likelihoods';
import type { State } from './posterior';
import { quantilesInPlace } from './quantile';
import { sobolCoordinate, SOBOL_POINTS } from './sobol';
import { QUESTION_IDS } from './types';
import type { QuestionId, RootModel } from './types';

/** Every random quantity has its own Sobol dimension, whatever else is entered, so that findings do not shift it. */
const STATE_DIMENSION = 0;
const FIRST_QUESTION_DIMENSION = 1;
const SEARCH_DIMENSION = 10;
const ISTHMUS_DIMENSION = 11;
/** First of a test's dimensions (two, the draw test three). Of file contact and two files only one ever counts. */
const TEST_DIMENSIONS: Record<Test, number> = {
	'cone-mark': 12,
	draw: 14,
	'file-contact': 17,
	'two-files': 17,
	'angled-radiograph': 19,
	'cbct-reading': 21
};

/** A random quantity: the table of its inverse distribution function in each state, and its coordinates. */
interface Column {
	tables: Float64Array[];
	at: Uint16Array;
}

function column(dimension: number, tables: Float64Array[]): Column {
	return { tables, at: sobolCoordinate(dimension) };
}

/** A question's draws: weighted by its answer where it lies on the path to the state's leaf. */
function questionColumn(model: RootModel, id: QuestionId, states: State[]): Column {
	const index = QUESTION_IDS.indexOf(id);
	const { grid } = model.questions[index];
	const tables = states.map(({ leaf }) => {
		const step = PATHS[leaf].find(({ question }) => question === id);
		return gridTable(grid, !step ? 'plain' : step.answer ? 'yes' : 'no');
	});
	return column(FIRST_QUESTION_DIMENSION + index, tables);
}

/** A test's draws: the parameter that the state's result bears on is updated, the others keep their prior. */
function testColumns(likelihood: FindingLikelihood, states: State[]): Column[] {
	const { test, result, meet, never, neverIsthmus } = likelihood;
	const first = TEST_DIMENSIONS[test];
	const tables = (beta: { a: number; b: number }, bears: (state: State) => boolean) =>
		states.map((state) => betaTable(bears(state) ? updated(beta, result) : beta));
	const stepsDown = ({ leaf }: State) => leafFacts(leaf).stepsDown;
	// The draw test's states tell the isthmus where the number never steps down.
	const neverTables = tables(
		never,
		(state) => !stepsDown(state) && (!neverIsthmus || state.isthmus === false)
	);
	const columns = [column(first, tables(meet, stepsDown)), column(first + 1, neverTables)];
	if (neverIsthmus)
		columns.push(
			column(
				first + 2,
				tables(neverIsthmus, ({ isthmus }) => isthmus === true)
			)
		);
	return columns;
}

function searchColumn({ search }: Evidence, states: State[]): Column | null {
	if (!search) return null;
	const { beta, known } = search;
	const tables = states.map(({ leaf }) =>
		betaTable({ a: beta.a + known - 1, b: beta.b + leafFacts(leaf).width - known })
	);
	return column(SEARCH_DIMENSION, tables);
}

function isthmusColumn(model: RootModel, { isthmus }: Evidence, states: State[]): Column {
	const tables = states.map((state) => {
		if (isthmus.beta) {
			const { a, b } = isthmus.beta;
			if (state.isthmus === null) return betaTable({ a, b });
			return betaTable(state.isthmus ? { a: a + 1, b } : { a, b: b + 1 });
		}
		const { grid } = model.isthmus!;
		return gridTable(grid, state.isthmus === null ? 'plain' : state.isthmus ? 'yes' : 'no');
	});
	return column(ISTHMUS_DIMENSION, tables);
}

/** The state of each draw: by its exact posterior probability, the states in a fixed order. */
function drawStates(states: State[]): Uint16Array {
	const total = states.reduce((sum, { weight }) => sum + weight, 0);
	const byCoordinate = new Uint16Array(SOBOL_POINTS);
	let state = 0;
	let upTo = states[0].weight;
	for (let n = 0; n < SOBOL_POINTS; n++) {
		while ((n + 0.5) / SOBOL_POINTS >= upTo / total && state < states.length - 1)
			upTo += states[++state].weight;
		byCoordinate[n] = state;
	}
	const at = sobolCoordinate(STATE_DIMENSION);
	const drawn = new Uint16Array(SOBOL_POINTS);
	for (let i = 0; i < SOBOL_POINTS; i++) drawn[i] = byCoordinate[at[i]];
	return drawn;
}

/** The draws of a column: a value for each of the 4,096 points. */
function drawsOf({ tables, at }: Column, state: Uint16Array): Float64Array {
	const draws = new Float64Array(SOBOL_POINTS);
	for (let i = 0; i < SOBOL_POINTS; i++) draws[i] = tables[state[i]][at[i]];
	return draws;
}

/** Multiplies `product` by the draws of P(positive), or by what is left of 1. */
function multiply(product: Float64Array, positive: Float64Array, result: boolean): void {
	if (result) for (let i = 0; i < SOBOL_POINTS; i++) product[i] *= positive[i];
	else for (let i = 0; i < SOBOL_POINTS; i++) product[i] *= 1 - positive[i];
}

/** A draw-by-draw mixture: prevalence * present + (1 - prevalence) * absent. */
function mixture(prevalence: Float64Array, present: Float64Array, absent: Float64Array): Float64Array {
	const mixed = new Float64Array(SOBOL_POINTS);
	for (let i = 0; i < SOBOL_POINTS; i++) mixed[i] = absent[i] + prevalence[i] * (present[i] - absent[i]);
	return mixed;
}

/** What the findings make of each draw: P(results | the number steps down) and P(results | it never does). */
function likelihoodDraws(
	model: RootModel,
	evidence: Evidence,
	states: State[],
	state: Uint16Array
): { meet: Float64Array; never: Float64Array } {
	const meet = new Float64Array(SOBOL_POINTS).fill(1);
	const never = new Float64Array(SOBOL_POINTS).fill(1);
	for (const likelihood of evidence.likelihoods) {
		const positive = likelihood.result === 'positive';
		const [ifMeet, ifNever, ifIsthmus] = testColumns(likelihood, states).map((one) => drawsOf(one, state));
		multiply(meet, ifMeet, positive);
		const prevalence = ifIsthmus && drawsOf(isthmusColumn(model, evidence, states), state);
		multiply(never, prevalence ? mixture(prevalence, ifIsthmus, ifNever) : ifNever, positive);
	}
	return { meet, never };
}

/**
 * Multiplies each draw's weight of a leaf by P(f canals found | width), without s^(f - 1), which all leaves share:
 * C(w - 1, f - 1) (1 - s)^(w - f).
 */
function weighSearch(weight: Float64Array, s: Float64Array, width: number, known: number): void {
	const ways = choose(width - 1, known - 1);
	if (ways !== 1) for (let i = 0; i < SOBOL_POINTS; i++) weight[i] *= ways;
	for (let missed = known; missed < width; missed++) multiply(weight, s, false);
}

/** The steps of each leaf's path, without those that all the leaves share: these cancel. */
function tellingSteps(leaves: Leaf[]): Step[][] {
	const sharedByAll = ({ question, answer }: Step) =>
		leaves.every((leaf) => PATHS[leaf].some((step) => step.question === question && step.answer === answer));
	return leaves.map((leaf) => PATHS[leaf].filter((step) => !sharedByAll(step)));
}

/**
 * Equal-tailed intervals of sums of leaf probabilities (inference, section 3): states are drawn from their exact
 * posterior, parameters from their densities given the state, and each probability is computed given these and
 * the findings; type-7 quantiles of 4,096 Sobol points.
 * @param leaves the possible leaves
 * @param states the possible states with their exact posterior weights (any scale, not all 0)
 * @param level e.g. 0.95
 * @returns a function from places in `leaves`, whose probabilities are added up, to [lower, upper]
 */
export function intervalsOf(
	model: RootModel,
	evidence: Evidence,
	leaves: Leaf[],
	states: State[],
	level: number
): (places: number[]) => [number, number] {
	const weights = weightDraws(model, evidence, leaves, states);
	const total = sumOf(weights);
	const tail = (1 - level) / 2;
	// Several figures are often the same sum, as "one exit" and "shared exit" are.
	const known = new Map<string, number[]>();
	return (places) => {
		const key = places.join();
		if (!known.has(key)) {
			const shares = sumOf(places.map((place) => weights[place]));
			for (let i = 0; i < SOBOL_POINTS; i++) shares[i] /= total[i];
			known.set(key, quantilesInPlace(shares, [tail, 1 - tail]));
		}
		const [lower, upper] = known.get(key)!;
		return [lower, upper];
	};
}

/** P(leaf | parameters) P(findings | leaf, parameters) of each draw, by leaf; what all leaves share is left out. */
function weightDraws(model: RootModel, evidence: Evidence, leaves: Leaf[], states: State[]): Float64Array[] {
	const state = drawStates(states);
	const steps = tellingSteps(leaves);
	const asked = new Set(steps.flat().map(({ question }) => question));
	const questions = new Map(
		[...asked].map((id) => [id, drawsOf(questionColumn(model, id, states), state)] as const)
	);
	const { meet, never } = likelihoodDraws(model, evidence, states, state);
	const search = searchColumn(evidence, states);
	const s = search && drawsOf(search, state);
	return leaves.map((leaf, index) => {
		const { width, stepsDown } = leafFacts(leaf);
		const weight = (stepsDown ? meet : never).slice();
		if (s && evidence.search) weighSearch(weight, s, width, evidence.search.known);
		for (const { question, answer } of steps[index]) multiply(weight, questions.get(question)!, answer);
		return weight;
	});
}

/** Draw by draw sums. */
function sumOf(terms: Float64Array[]): Float64Array {
	if (terms.length === 0) return new Float64Array(SOBOL_POINTS);
	const [first, ...others] = terms;
	const sum = first.slice();
	for (const term of others) for (let i = 0; i < SOBOL_POINTS; i++) sum[i] += term[i];
	return sum;
}
