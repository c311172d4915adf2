import { describe, expect, it } from 'vitest';
import { teeth } from '$lib/anatomy/teeth';
import { borrowedPriors, gatherLenders } from '$lib/server/inference/borrowing';
import { questionCoverage, rootCoverage, sumCoverage } from '$lib/server/inference/coverage';
import { gatherEvidence } from '$lib/server/inference/evidence';
import type { MuPrior, QuestionId, QuestionStudy } from '$lib/server/inference/types';
import { shippedIndex } from '../support/literatureTable';

/*
 * The refit, written apart: both models on one fixed grid of (tau, mu), each random effect a plain sum, each sample's
 * predictive probability the ratio of the integrals with and without it. It shares no code with the product but the
 * reading of the table.
 */
const MU_STEP = 0.08;
const MU = Array.from({ length: 275 }, (_, i) => -11 + MU_STEP * (i + 0.5));
const TAU = Array.from({ length: 45 }, (_, j) => 0.01 + 6.5 * ((j + 0.5) / 45) ** 2);
const TAU_WEIGHT = TAU.map((_, j) => j + 0.5);
/** Of a random effect, in its standard deviations. */
const NODE_STEP = 0.25;
const GROUPS: Record<string, string> = {
	'micro-ct': 'laboratory',
	clearing: 'laboratory',
	sectioning: 'laboratory',
	clinical: 'clinical',
	microscope: 'clinical',
	radiograph: 'radiograph'
};

const lnChoose = (n: number, y: number) => {
	let sum = 0;
	for (let i = 0; i < y; i++) sum += Math.log((n - i) / (i + 1));
	return sum;
};

/** p(y | mu, tau) at every mu: over the random effect, or over the sample's own likelihood where that is narrower. */
function marginal({ events: y, total: n }: QuestionStudy, tau: number): number[] {
	const guess = (y + 0.5) / (n + 1);
	const error = 1 / Math.sqrt((n + 1) * guess * (1 - guess));
	const choose = lnChoose(n, y);
	const binomial = (eta: number) =>
		choose + y * eta - n * (Math.max(eta, 0) + Math.log1p(Math.exp(-Math.abs(eta))));
	const normal = (u: number) => Math.exp(-(u * u) / (2 * tau * tau)) / tau / Math.sqrt(2 * Math.PI);
	if (y === 0 || y === n || error > tau / 4) {
		const z = Array.from({ length: 57 }, (_, k) => -7 + NODE_STEP * k);
		return MU.map((mu) =>
			z.reduce((sum, x) => sum + NODE_STEP * tau * normal(tau * x) * Math.exp(binomial(mu + tau * x)), 0)
		);
	}
	const eta = Array.from(
		{ length: 57 },
		(_, k) => Math.log(guess / (1 - guess)) + error * (-7 + NODE_STEP * k)
	);
	const likelihood = eta.map((value) => Math.exp(binomial(value)));
	return MU.map((mu) =>
		eta.reduce((sum, value, k) => sum + error * NODE_STEP * likelihood[k] * normal(value - mu), 0)
	);
}

const OFFSET = MU.map((mu) =>
	MU.map((m) => (MU_STEP * Math.exp(-2 * (m - mu) ** 2) * 2) / Math.sqrt(2 * Math.PI))
);
const convolve = (likelihood: number[]) =>
	OFFSET.map((row) => row.reduce((sum, weight, k) => sum + weight * likelihood[k], 0));

/** ∫ likelihood of the samples kept × priors, up to a constant. */
function integral(
	studies: readonly QuestionStudy[],
	tables: number[][][],
	keep: (i: number) => boolean,
	prior: MuPrior,
	model: 'plain' | 'method'
): number {
	let sum = 0;
	TAU.forEach((tau, j) => {
		const groups = new Map<string, number[]>();
		studies.forEach(({ method }, i) => {
			if (!keep(i)) return;
			const group = model === 'method' ? (GROUPS[method] ?? 'cbct') : 'cbct';
			const before = groups.get(group);
			groups.set(group, before ? before.map((value, k) => value * tables[i][j][k]) : tables[i][j]);
		});
		const parts = [...groups].map(([group, values]) => (group === 'cbct' ? values : convolve(values)));
		MU.forEach((mu, k) => {
			const priors = Math.exp(-((mu - prior.mean) ** 2) / (2 * prior.sd ** 2) - (tau * tau) / 2);
			sum += TAU_WEIGHT[j] * parts.reduce((product, part) => product * part[k], priors);
		});
	});
	return sum;
}

function refitted(studies: readonly QuestionStudy[], prior: MuPrior, model: 'plain' | 'method'): number[] {
	const tables = studies.map((study) => TAU.map((tau) => marginal(study, tau)));
	const all = integral(studies, tables, () => true, prior, model);
	return studies.map((_, left) => all / integral(studies, tables, (i) => i !== left, prior, model));
}

const index = shippedIndex();
const lenders = gatherLenders(index, {});

/** Ten questions of all sizes from 3 to 16 samples; of some the method model is the one shown. */
const TEN: [string, string, QuestionId][] = [
	['maxillary-first-premolar', 'whole', 'q1'],
	['maxillary-second-premolar', 'whole', 'q1'],
	['maxillary-first-molar', 'MB', 'q2'],
	['maxillary-first-molar', 'MB', 'q4'],
	['maxillary-first-molar', 'DB', 'q1'],
	['maxillary-second-molar', 'MB', 'q1'],
	['mandibular-second-premolar', 'whole', 'q1'],
	['mandibular-first-premolar', 'whole', 'q1'],
	['mandibular-first-molar', 'M', 'q3'],
	['mandibular-first-molar', 'D', 'q4']
];

describe('coverage against a refit written apart', () => {
	it.each(TEN)('%s %s %s: predictive probability of every sample, by either model', (tooth, root, id) => {
		const studies = gatherEvidence(index, tooth, root, {}).questions[id];
		const prior = borrowedPriors(lenders, tooth, root)[id];
		for (const model of ['plain', 'method'] as const) {
			const wanted = refitted(studies, prior, model);
			const each = questionCoverage(id, studies, prior, model)!.each;
			expect(each).toHaveLength(studies.length);
			each.forEach(({ source, predictiveProbability }, i) => {
				const what = `${model}, ${source}: ${predictiveProbability}, refitted ${wanted[i]}`;
				// The bar of the issue.
				expect(Math.abs(predictiveProbability - wanted[i]), what).toBeLessThan(0.005);
				expect(Math.abs(Math.log(predictiveProbability / wanted[i])), what).toBeLessThan(0.06);
			});
		}
	});
});

describe('coverage over the shipped table', () => {
	// The bands of the issue; the design's own trial run gave 0.96 and 0.82 (of samples with at least one other).
	it('holds 0.93 to 0.98 in 95 % ranges and 0.76 to 0.88 in 80 % ranges', () => {
		const { figures, roots } = sumCoverage(
			teeth.flatMap((tooth) => tooth.roots.map((root) => rootCoverage(index, tooth.id, root, {}, lenders)))
		);
		const lines = roots.flatMap(({ tooth, root, questions }) =>
			questions.map(
				({ id, samples, level95, level80, flagged, method }) =>
					`${tooth} ${root} ${id}: ${samples} samples, ${level95.toFixed(2)} ${level80.toFixed(2)}, ${method.shown}${flagged ? ', flagged' : ''}`
			)
		);
		console.info(lines.join('\n'));
		console.info(`all: ${figures!.samples} samples, ${figures!.level95} ${figures!.level80}`);
		expect(figures!.level95).toBeGreaterThanOrEqual(0.93);
		expect(figures!.level95).toBeLessThanOrEqual(0.98);
		expect(figures!.level80).toBeGreaterThanOrEqual(0.76);
		expect(figures!.level80).toBeLessThanOrEqual(0.88);
		// Every sample with at least two others, as rootModel.test.ts counts them.
		expect(figures!.samples).toBe(245);
		expect(figures!.logScore).toBeLessThan(0);
	});
});
