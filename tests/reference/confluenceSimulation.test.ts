/**
 * The exact posterior and its intervals against a simulation (or, for rare answers, an enumeration) that was
 * written apart from them: tests/support/confluenceSimulation.ts.
 */
import { describe, expect, it } from 'vitest';
import { characteristicsFor } from '$lib/server/inference/characteristics';
import { answerConfluence } from '$lib/server/inference/confluence';
import type { ConfluenceAnswer } from '$lib/server/inference/confluence';
import type { Estimate } from '$lib/server/inference/estimates';
import { validateQuestion } from '$lib/server/inference/confluenceQuestion';
import type { ConfluenceQuestion, Finding, Test } from '$lib/server/inference/confluenceQuestion';
import type { RootModel } from '$lib/server/inference/types';
import { enumerate, simulate } from '../support/confluenceSimulation';
import type { Scenario } from '../support/confluenceSimulation';
import { shippedCharacteristics } from '../support/inventedRoot';
import { SeededRandom } from '../support/random';
import { shippedRoot } from '../support/shippedRoots';

const KEPT = 20_000;
const MEANS_WITHIN = 0.005;
const ENDS_WITHIN = 0.02;

/** Roots, each with the tooth groups of the characteristics that hold for it, the most specific first. */
const ROOTS = [
	{ tooth: 'maxillary-first-molar', root: 'MB', groups: ['maxillary-molar-MB', 'any'] },
	{ tooth: 'maxillary-second-molar', root: 'MB', groups: ['maxillary-molar-MB', 'any'] },
	{ tooth: 'mandibular-first-molar', root: 'M', groups: ['mandibular-molar', 'any'] },
	{ tooth: 'mandibular-first-molar', root: 'D', groups: ['mandibular-molar', 'any'] },
	{ tooth: 'maxillary-first-premolar', root: 'whole', groups: ['premolar', 'any'] }
];

const rows = shippedCharacteristics();

function betaOf(groups: string[], finding: string, parameter: string): readonly [number, number] {
	for (const group of groups) {
		const row = rows.find(
			(one) => one.finding === finding && one.parameter === parameter && one.toothGroup === group
		);
		if (row) return [row.betaA!, row.betaB!];
	}
	throw new Error(`no ${parameter} of ${finding}`);
}

function scenarioOf(model: RootModel, groups: string[], question: ConfluenceQuestion): Scenario {
	const { canals, orifices, search, findings } = question;
	return {
		grids: model.questions.map(({ grid }) => grid),
		isthmus: model.isthmus?.grid ?? null,
		canals,
		orifices,
		search: search && betaOf(groups, `search-${search}`, 'each-further-canal-found'),
		findings: findings
			.filter(({ result }) => result !== 'unclear')
			.map(({ test, result }) => ({
				test,
				positive: result === 'positive',
				meet: betaOf(groups, test, 'positive-if-meet'),
				never: betaOf(
					groups,
					test,
					test === 'draw' ? 'positive-if-never-meet-no-isthmus' : 'positive-if-never-meet'
				),
				...(test === 'draw' && { neverIsthmus: betaOf(groups, test, 'positive-if-never-meet-isthmus') })
			}))
	};
}

const SEARCHED: ConfluenceQuestion['search'][] = [
	undefined,
	'unaided',
	'loupes',
	'microscope',
	'microscope-troughing',
	'cbct'
];
const TESTED: Test[] = [
	'cone-mark',
	'draw',
	'file-contact',
	'two-files',
	'angled-radiograph',
	'cbct-reading'
];

function randomQuestion(random: SeededRandom): ConfluenceQuestion {
	const canals = random.pick([1, 2, 2, 2, 3]);
	const orifices = random.pick([undefined, undefined, 1, 2, 3]);
	const findings = TESTED.filter(() => canals > 1 && random.happens(0.4)).map((test): Finding => ({
		test,
		result: random.pick(['positive', 'positive', 'negative', 'negative', 'unclear']),
		pair: 'one-other'
	}));
	return { canals, orifices, search: random.pick(SEARCHED), findings };
}

const found = (test: Test, result: Finding['result']): Finding => ({ test, result, pair: 'MB-ML' });

/** What must be among the questions, whatever chance picks: the draw test, both of one mechanism, three canals. */
const CHOSEN: { at: number; question: ConfluenceQuestion }[] = [
	{ at: 0, question: { canals: 2, search: 'loupes', findings: [found('draw', 'positive')] } },
	{
		at: 1,
		question: { canals: 2, findings: [found('file-contact', 'negative'), found('two-files', 'positive')] }
	},
	{ at: 2, question: { canals: 3, findings: [found('draw', 'negative'), found('cone-mark', 'positive')] } },
	{
		at: 2,
		question: { canals: 2, orifices: 2, search: 'microscope', findings: [found('draw', 'negative')] }
	},
	{ at: 3, question: { canals: 1, search: 'cbct', findings: [] } },
	{ at: 4, question: { canals: 2, orifices: 1, findings: [found('two-files', 'negative')] } }
];

const random = new SeededRandom(20_261_201);
const QUESTIONS = [
	...CHOSEN,
	...ROOTS.flatMap((_, at) =>
		[randomQuestion(random), randomQuestion(random)].map((question) => ({ at, question }))
	)
];

/** The answer's figures under the names that the simulation gives them. */
function figuresOf({ posterior }: ConfluenceAnswer): Record<string, Estimate> {
	const named: [string, Estimate][] = [
		...Object.entries(posterior.fates).map(([fate, estimate]): [string, Estimate] => [
			`fate ${fate}`,
			estimate
		]),
		...posterior.exits.map((estimate): [string, Estimate] => [`exits ${estimate.count}`, estimate]),
		...posterior.sequences.map((estimate): [string, Estimate] => [`leaf ${estimate.sequence}`, estimate])
	];
	if (posterior.anotherCanal) named.push(['another canal', posterior.anotherCanal]);
	return Object.fromEntries(named);
}

const words = ({ canals, orifices, search, findings }: ConfluenceQuestion) =>
	`${canals} canals, ${orifices ?? '?'} orifices, ${search ?? 'no search'}: ` +
	findings.map(({ test, result }) => `${test} ${result}`).join(', ');

/** Those common enough to be simulated; the others are checked against the enumeration alone. */
const simulatedOnes: { at: number; question: ConfluenceQuestion }[] = [];

describe('answers to questions about real roots', () => {
	QUESTIONS.forEach(({ at, question }, index) => {
		const { tooth, root, groups } = ROOTS[at];
		it(`${index + 1}. ${tooth} ${root}, ${words(question)}`, { timeout: 120_000 }, () => {
			expect(validateQuestion(question)).toEqual([]);
			const model = shippedRoot(tooth, root);
			const answer = answerConfluence(model, characteristicsFor(rows, tooth, root), question);
			const figures = figuresOf(answer);
			const scenario = scenarioOf(model, groups, question);

			const listed = enumerate(scenario);
			for (const [name, value] of Object.entries(listed)) {
				expect(figures[name].mean, name).toBeCloseTo(value, 6);
			}
			const simulated = simulate(scenario, KEPT, 7 + index);
			if (!simulated) return;
			simulatedOnes.push({ at, question });
			for (const [name, { mean, interval }] of Object.entries(figures)) {
				const other = simulated[name] ?? { mean: 0, lower: 0, upper: 0, frequency: 0 };
				expect(Math.abs(mean - other.mean), `mean of ${name}`).toBeLessThan(MEANS_WITHIN);
				const chance = Math.sqrt((mean * (1 - mean)) / KEPT);
				expect(Math.abs(mean - other.frequency), `frequency of ${name}`).toBeLessThan(4 * chance + 1e-4);
				expect(Math.abs(interval[0] - other.lower), `lower end of ${name}`).toBeLessThan(ENDS_WITHIN);
				expect(Math.abs(interval[1] - other.upper), `upper end of ${name}`).toBeLessThan(ENDS_WITHIN);
			}
		});
	});

	// Without it, a simulation that gave up on every question would go unnoticed. It needs the whole file to have run.
	it('were simulated for every root, with a draw test and with three canals among them', () => {
		const roots = new Set(simulatedOnes.map(({ at }) => at));
		expect(
			ROOTS.filter((_, at) => !roots.has(at)).map(({ tooth, root }) => `${tooth} ${root}`),
			'roots without a simulated question'
		).toEqual([]);
		const drawn = ({ test, result }: Finding) => test === 'draw' && result !== 'unclear';
		expect(simulatedOnes.some(({ question }) => question.findings.some(drawn))).toBe(true);
		expect(simulatedOnes.some(({ question }) => question.canals === 3)).toBe(true);
	});
});
