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
 * Its ranges are its own, too: the chance of a count as low and as high as the one seen, over the population it predicts.
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

/** The likelihood of the samples kept at every mu, one factor for each group of methods, at one tau. */
function groupParts(
	studies: readonly QuestionStudy[],
	tables: number[][][],
	keep: (i: number) => boolean,
	model: Model,
	j: number
): Map<string, number[]> {
	const groups = new Map<string, number[]>();
	studies.forEach((study, i) => {
		if (!keep(i)) return;
		const group = groupOf(study, model);
		const before = groups.get(group);
		groups.set(group, before ? before.map((value, k) => value * tables[i][j][k]) : tables[i][j]);
	});
	return groups;
}

type Model = 'plain' | 'method';
const groupOf = ({ method }: QuestionStudy, model: Model) =>
	model === 'method' ? (GROUPS[method] ?? 'cbct') : 'cbct';
const priorsAt = (mu: number, tau: number, prior: MuPrior) =>
	Math.exp(-((mu - prior.mean) ** 2) / (2 * prior.sd ** 2) - (tau * tau) / 2);

/** ∫ likelihood of the samples kept × priors, up to a constant. */
function integral(
	studies: readonly QuestionStudy[],
	tables: number[][][],
	keep: (i: number) => boolean,
	prior: MuPrior,
	model: Model
): number {
	let sum = 0;
	TAU.forEach((tau, j) => {
		const groups = groupParts(studies, tables, keep, model, j);
		const parts = [...groups].map(([group, values]) => (group === 'cbct' ? values : convolve(values)));
		MU.forEach((mu, k) => {
			sum += TAU_WEIGHT[j] * parts.reduce((product, part) => product * part[k], priorsAt(mu, tau, prior));
		});
	});
	return sum;
}

/** Logits of a population, finely. */
const ETA_STEP = 0.02;
const ETA = Array.from({ length: 2001 }, (_, k) => -20 + ETA_STEP * k);

/** The predictive masses of the logit of the population of the sample left out, on ETA. */
function population(
	studies: readonly QuestionStudy[],
	tables: number[][][],
	left: number,
	prior: MuPrior,
	model: Model
): number[] {
	const masses = ETA.map(() => 0);
	const own = groupOf(studies[left], model);
	TAU.forEach((tau, j) => {
		const groups = groupParts(studies, tables, (i) => i !== left, model, j);
		const ofOwn = groups.get(own);
		groups.delete(own);
		const others = [...groups].map(([group, values]) => (group === 'cbct' ? values : convolve(values)));
		let weights = MU.map((mu, k) =>
			others.reduce((product, part) => product * part[k], priorsAt(mu, tau, prior))
		);
		// The middle of a group is an offset away from that of CBCT. OFFSET is the same read either way.
		if (own !== 'cbct') weights = convolve(weights);
		if (ofOwn) weights = weights.map((weight, k) => weight * ofOwn[k]);
		MU.forEach((mu, k) => {
			for (let node = -24; node <= 24; node++) {
				const z = node * NODE_STEP;
				const at = Math.round((mu + tau * z - ETA[0]) / ETA_STEP);
				masses[Math.min(Math.max(at, 0), ETA.length - 1)] +=
					TAU_WEIGHT[j] * weights[k] * Math.exp(-(z * z) / 2);
			}
		});
	});
	const total = masses.reduce((sum, mass) => sum + mass, 0);
	return masses.map((mass) => mass / total);
}

/** P(Y ≤ y) and P(Y ≥ y) of the sample left out, each count's probability summed. */
function tailsOf({ events: y, total: n }: QuestionStudy, masses: number[]): { low: number; high: number } {
	const choose = Array.from({ length: n + 1 }, () => 0);
	for (let count = 1; count <= n; count++)
		choose[count] = choose[count - 1] + Math.log((n - count + 1) / count);
	const tails = { low: 0, high: 0 };
	ETA.forEach((eta, k) => {
		if (masses[k] < 1e-12) return;
		const lnYes = -Math.log1p(Math.exp(-eta));
		const lnNo = -Math.log1p(Math.exp(eta));
		for (let count = 0; count <= n; count++) {
			const chance = masses[k] * Math.exp(choose[count] + count * lnYes + (n - count) * lnNo);
			if (count <= y) tails.low += chance;
			if (count >= y) tails.high += chance;
		}
	});
	return tails;
}

/** Of each sample, left out: the probability of its count, and of one as low and as high. */
function refitted(studies: readonly QuestionStudy[], prior: MuPrior, model: Model) {
	const tables = studies.map((study) => TAU.map((tau) => marginal(study, tau)));
	const all = integral(studies, tables, () => true, prior, model);
	return studies.map((study, left) => ({
		at: all / integral(studies, tables, (i) => i !== left, prior, model),
		...tailsOf(study, population(studies, tables, left, prior, model))
	}));
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

/** A sample whose tail is this near to the edge of a range may fall to either side of it. */
const NEAR_EDGE = 0.005;

describe('coverage against a refit written apart', () => {
	const compared = { inside: 0, outside: 0, nearEdge: 0 };

	it.each(TEN)('%s %s %s: every sample, by either model', { timeout: 120_000 }, (tooth, root, id) => {
		const studies = gatherEvidence(index, tooth, root, {}).questions[id];
		const prior = borrowedPriors(lenders, tooth, root)[id];
		for (const model of ['plain', 'method'] as const) {
			const wanted = refitted(studies, prior, model);
			const each = questionCoverage(id, studies, prior, model)!.each;
			expect(each).toHaveLength(studies.length);
			each.forEach(({ source, predictiveProbability, inside95, inside80 }, i) => {
				const { at, low, high } = wanted[i];
				const what = `${model}, ${source}: ${predictiveProbability}, refitted ${at}`;
				// The bar of the issue.
				expect(Math.abs(predictiveProbability - at), what).toBeLessThan(0.005);
				expect(Math.abs(Math.log(predictiveProbability / at)), what).toBeLessThan(0.06);

				// The refit's two ways to one probability agree: the tails overlap in the count seen.
				expect(Math.abs(low + high - 1 - at), `${what}, tails ${low} ${high}`).toBeLessThan(0.002);
				for (const [edge, said] of [
					[0.025, inside95],
					[0.1, inside80]
				] as const) {
					if (Math.abs(Math.min(low, high) - edge) < NEAR_EDGE) {
						compared.nearEdge++;
						continue;
					}
					const inside = low > edge && high > edge;
					expect(said, `${what}, edge ${edge}, tails ${low} ${high}`).toBe(inside);
					compared[inside ? 'inside' : 'outside']++;
				}
			});
		}
	});

	it('compared the ranges of many samples, inside and outside', () => {
		expect(compared.inside + compared.outside).toBeGreaterThan(50);
		expect(compared.outside).toBeGreaterThan(10);
		expect(compared.nearEdge).toBeLessThan(0.1 * (compared.inside + compared.outside));
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
