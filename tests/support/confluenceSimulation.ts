/**
 * The questions about a root answered by simulation and by enumeration, written from the design's words and
 * apart from the product: it shares no code with it and knows of a root only its grids.
 */
import { SeededRandom } from './random';

type Grid = { p: ArrayLike<number>; mass: ArrayLike<number> };
type Beta = readonly [number, number];

/** A root, a question about it, and the Betas that apply (by finding and parameter). */
export interface Scenario {
	/** q1 … q9. */
	grids: Grid[];
	isthmus: Grid | null;
	canals: number;
	orifices?: number;
	search?: Beta;
	findings: { test: string; positive: boolean; meet: Beta; never: Beta; neverIsthmus?: Beta }[];
}

/** Means and 95 % intervals by leaf, fate and number of exits, and of another canal. */
export type Described = Record<string, { mean: number; lower: number; upper: number; frequency: number }>;

/** The tree of the design, section 2: asks what it needs and names the leaf. */
function walk(yes: (question: number) => boolean): string {
	if (!yes(1)) return '1';
	if (!yes(2)) {
		if (yes(6)) return '1-2-1';
		return yes(7) ? '1-2-1-2' : '1-2';
	}
	if (yes(3)) {
		if (!yes(8)) return '3';
		return yes(9) ? '3-1' : '3-2';
	}
	if (!yes(4)) return '2';
	return yes(5) ? '2-1-2' : '2-1';
}

const LEAVES = ['1', '2', '2-1', '2-1-2', '1-2-1', '1-2-1-2', '1-2', '3', '3-1', '3-2'];
const FATE: Record<string, string> = {
	'1': 'one-canal',
	'2': 'separate',
	'3': 'separate',
	'1-2': 'separate',
	'2-1': 'shared-exit',
	'1-2-1': 'shared-exit',
	'3-1': 'shared-exit',
	'2-1-2': 'meet-and-part',
	'1-2-1-2': 'meet-and-part',
	'3-2': 'partly-shared'
};
const numbers = (leaf: string) => leaf.split('-').map(Number);
const widthOf = (leaf: string) => Math.max(...numbers(leaf));
const fallsSomewhere = (leaf: string) => numbers(leaf).some((n, i, all) => i > 0 && n < all[i - 1]);

/** Names of the figures that a leaf counts towards. */
function figuresOf(leaf: string, canals: number): string[] {
	const exits = numbers(leaf).at(-1);
	return [
		`leaf ${leaf}`,
		`fate ${FATE[leaf]}`,
		`exits ${exits}`,
		...(widthOf(leaf) > canals ? ['another canal'] : [])
	];
}

/** Whether the canals and orifices leave a leaf possible, before any search is weighed. */
function fits(leaf: string, { canals, orifices }: Scenario): boolean {
	const known = Math.max(canals, orifices ?? 0);
	const spare = widthOf(leaf) - known;
	if (spare < 0) return false;
	const start = numbers(leaf)[0];
	return orifices === undefined || known >= 3 || (orifices <= start && start <= orifices + spare);
}

const mean = ([a, b]: Beta) => a / (a + b);
const gridMean = ({ p, mass }: Grid) => Array.from(p).reduce((sum, value, i) => sum + value * mass[i], 0);

/** P(result | meets) and P(result | never), on average. */
function averages({ positive, meet, never, neverIsthmus }: Scenario['findings'][number], isthmus: number) {
	const flip = (p: number) => (positive ? p : 1 - p);
	const ifNever = neverIsthmus ? isthmus * mean(neverIsthmus) + (1 - isthmus) * mean(never) : mean(never);
	return { meet: flip(mean(meet)), never: flip(ifNever) };
}

const isthmusMean = ({ isthmus }: Scenario) => (isthmus ? gridMean(isthmus) : 0.5);

/** Without the weaker of file contact and two files. */
function countedFindings(scenario: Scenario): Scenario['findings'] {
	const rivals = scenario.findings.filter(({ test }) => test === 'file-contact' || test === 'two-files');
	if (rivals.length < 2) return scenario.findings;
	const strength = (finding: Scenario['findings'][number]) => {
		const { meet, never } = averages(finding, 0);
		return Math.abs(Math.log(meet / never));
	};
	const weaker = strength(rivals[0]) < strength(rivals[1]) ? rivals[0] : rivals[1];
	return scenario.findings.filter((finding) => finding !== weaker);
}

/** Draws from a grid's masses. */
function sampler({ p, mass }: Grid): (random: SeededRandom) => number {
	let sum = 0;
	const upTo = Array.from(mass, (value) => (sum += value));
	return (random) => {
		const u = random.uniform() * sum;
		let low = 0;
		let high = upTo.length - 1;
		while (low < high) {
			const middle = (low + high) >> 1;
			if (upTo[middle] > u) high = middle;
			else low = middle + 1;
		}
		return p[low];
	};
}

/** Probability of every leaf from the probabilities of a yes, by following each of the 2^9 sets of answers. */
const ANSWER_SETS = Array.from({ length: 512 }, (_, set) => {
	const asked: number[] = [];
	const leaf = walk((question) => {
		asked.push(question);
		return ((set >> (question - 1)) & 1) === 1;
	});
	return { leaf, key: asked.map((q) => [q, (set >> (q - 1)) & 1]).join(' '), asked, set };
}).filter(({ key }, index, all) => all.findIndex((other) => other.key === key) === index);

function leafProbabilities(yes: number[]): Record<string, number> {
	const probabilities: Record<string, number> = {};
	for (const { leaf, asked, set } of ANSWER_SETS) {
		let product = 1;
		for (const q of asked) product *= (set >> (q - 1)) & 1 ? yes[q] : 1 - yes[q];
		probabilities[leaf] = product;
	}
	return probabilities;
}

/** All the parameters of one simulated root; what is not drawn yet is drawn when asked for. */
class Parameters {
	readonly #kept = new Map<string, number>();
	readonly #random: SeededRandom;

	constructor(random: SeededRandom) {
		this.#random = random;
	}

	get(name: string, draw: (random: SeededRandom) => number): number {
		let value = this.#kept.get(name);
		if (value === undefined) this.#kept.set(name, (value = draw(this.#random)));
		return value;
	}
}

const binomialChance = (n: number, k: number, s: number) =>
	(n === 2 && k === 1 ? 2 : 1) * s ** k * (1 - s) ** (n - k);

/**
 * Simulates roots until `keep` of them show what the question says, or gives up.
 * @returns null when fewer than 1 in 500 do
 */
export function simulate(scenario: Scenario, keep: number, seed: number): Described | null {
	const random = new SeededRandom(seed);
	const draws = scenario.grids.map(sampler);
	const drawIsthmus = scenario.isthmus ? sampler(scenario.isthmus) : (r: SeededRandom) => r.uniform();
	const findings = countedFindings(scenario);
	const known = Math.max(scenario.canals, scenario.orifices ?? 0);
	const figures = Object.fromEntries(LEAVES.map((leaf) => [leaf, figuresOf(leaf, scenario.canals)]));
	const names = [...new Set(Object.values(figures).flat())];
	const values: Record<string, number[]> = Object.fromEntries(names.map((name) => [name, []]));
	const counts: Record<string, number> = Object.fromEntries(names.map((name) => [name, 0]));
	let kept = 0;
	for (let tried = 0; kept < keep; tried++) {
		if (tried === 20_000 && kept < tried / 500) return null;
		const parameters = new Parameters(random);
		const theta = (q: number) => parameters.get(`q${q}`, draws[q - 1]);
		const beta = (name: string, ab: Beta) => parameters.get(name, (r) => r.beta(ab));
		const prevalence = () => parameters.get('isthmus', drawIsthmus);

		const leaf = walk((q) => random.happens(theta(q)));
		if (!fits(leaf, scenario)) continue;
		if (scenario.search) {
			let found = 1;
			for (let i = 1; i < widthOf(leaf); i++) if (random.happens(beta('search', scenario.search))) found++;
			if (found !== known) continue;
		}
		const meets = fallsSomewhere(leaf);
		const isthmus = random.happens(prevalence());
		const shown = findings.every(({ test, positive, meet, never, neverIsthmus }) => {
			let p;
			if (meets) p = beta(`${test} meet`, meet);
			else if (neverIsthmus && isthmus) p = beta(`${test} isthmus`, neverIsthmus);
			else p = beta(`${test} never`, never);
			return random.happens(p) === positive;
		});
		if (!shown) continue;

		kept++;
		for (const name of figures[leaf]) counts[name]++;
		const prior = leafProbabilities([NaN, ...draws.map((_, index) => theta(index + 1))]);
		const given: Record<string, number> = {};
		let total = 0;
		for (const other of LEAVES) {
			if (!fits(other, scenario)) continue;
			let weight = prior[other];
			if (scenario.search)
				weight *= binomialChance(widthOf(other) - 1, known - 1, beta('search', scenario.search));
			for (const { test, positive, meet, never, neverIsthmus } of findings) {
				let p = fallsSomewhere(other) ? beta(`${test} meet`, meet) : beta(`${test} never`, never);
				if (neverIsthmus && !fallsSomewhere(other))
					p = prevalence() * beta(`${test} isthmus`, neverIsthmus) + (1 - prevalence()) * p;
				weight *= positive ? p : 1 - p;
			}
			given[other] = weight;
			total += weight;
		}
		const sums: Record<string, number> = {};
		for (const other of Object.keys(given))
			for (const name of figures[other]) sums[name] = (sums[name] ?? 0) + given[other] / total;
		for (const name of names) values[name].push(sums[name] ?? 0);
	}
	return Object.fromEntries(
		names.map((name) => {
			const sorted = Float64Array.from(values[name]).sort();
			return [
				name,
				{
					mean: sorted.reduce((sum, value) => sum + value, 0) / kept,
					lower: sorted[Math.round(0.025 * (kept - 1))],
					upper: sorted[Math.round(0.975 * (kept - 1))],
					frequency: counts[name] / kept
				}
			];
		})
	);
}

/** E[chance of finding k of n] over a Beta, by the midpoint rule. */
function expectedChance(n: number, k: number, [a, b]: Beta): number {
	let sum = 0;
	let weights = 0;
	for (let i = 0; i < 20_000; i++) {
		const s = (i + 0.5) / 20_000;
		const weight = s ** (a - 1) * (1 - s) ** (b - 1);
		weights += weight;
		sum += weight * binomialChance(n, k, s);
	}
	return sum / weights;
}

/** The exact means, by listing every leaf with and without an isthmus. */
export function enumerate(scenario: Scenario): Record<string, number> {
	const prior = leafProbabilities([NaN, ...scenario.grids.map(gridMean)]);
	const known = Math.max(scenario.canals, scenario.orifices ?? 0);
	const findings = countedFindings(scenario);
	const sums: Record<string, number> = {};
	let total = 0;
	for (const leaf of LEAVES.filter((one) => fits(one, scenario))) {
		for (const isthmus of [true, false]) {
			let weight = prior[leaf] * (isthmus ? isthmusMean(scenario) : 1 - isthmusMean(scenario));
			if (scenario.search) weight *= expectedChance(widthOf(leaf) - 1, known - 1, scenario.search);
			for (const { positive, meet, never, neverIsthmus } of findings) {
				const ab = fallsSomewhere(leaf) ? meet : neverIsthmus && isthmus ? neverIsthmus : never;
				weight *= positive ? mean(ab) : 1 - mean(ab);
			}
			total += weight;
			for (const name of figuresOf(leaf, scenario.canals)) sums[name] = (sums[name] ?? 0) + weight;
		}
	}
	return Object.fromEntries(Object.entries(sums).map(([name, sum]) => [name, sum / total]));
}
