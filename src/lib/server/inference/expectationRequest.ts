import { classLabels } from '$lib/anatomy/classes';
import { describeSequence, leafFacts, LEAVES } from '$lib/anatomy/sequence';
import type { Root, Tooth } from '$lib/anatomy/teeth';
import type { FiltersInForce } from '$lib/schemas/common';
import type { ExpectationDto } from '$lib/schemas/expectation';
import type { FeatureDto } from '$lib/schemas/teeth';
import { featureName } from '$lib/strings/features';
import { questionText } from '$lib/strings/questions';
import { checkFilters } from './checkFilters';
import type { RootCoverage } from './coverage';
import { coverageDto } from './coverageRequest';
import { estimator } from './estimator';
import type { PooledFeature, RootAnswer } from './tasks';
import type { RootQuestion } from './types';
import { studyWeights } from './weights';

/**
 * What to expect of a root under some filters, in the API's shape.
 * @throws Problem 422 for a filter that names a country or source the table does not have
 */
export async function expectationOf(
	tooth: Tooth,
	root: Root,
	filters: FiltersInForce
): Promise<ExpectationDto> {
	await checkFilters(filters, { countries: 'country', exclude: 'exclude' });
	const current = await estimator();
	const answer = await current.root(tooth.id, root.id, filters);
	const coverage = current.coverageIfKnown(tooth.id, root.id, filters);
	return toDto(answer, coverage, filters, current.revision);
}

function toDto(
	answer: RootAnswer,
	coverage: RootCoverage | null,
	filters: FiltersInForce,
	tableRevision: number
): ExpectationDto {
	const { model, expectation, features, named } = answer;
	return {
		tooth: model.tooth,
		root: model.root,
		filters,
		tableRevision,
		evidence: evidenceOf(answer),
		sequences: expectation.sequences.map(({ sequence, ...estimate }) => ({
			sequence,
			labels: classLabels(sequence),
			fate: leafFacts(sequence).fate,
			...estimate,
			observed: observedOf(named, sequence)
		})),
		rareSequences: named.flatMap(({ sequence, ...observed }) => rareSequence(sequence, observed)),
		orifices: expectation.orifices,
		exits: expectation.exits,
		fates: expectation.fates,
		features: features.map(toFeatureDto),
		questions: model.questions.map(toQuestionDto),
		reviews: model.reviews,
		notPooled: model.notPooled.map(({ source, entry, reason }) => ({ source, entry, reason })),
		coverage: coverage && coverageDto(coverage)
	};
}

function toQuestionDto(question: RootQuestion): ExpectationDto['questions'][number] {
	const { id, borrowed, evidence, pooled, predictive, tau, observed, method, prior } = question;
	const weights = studyWeights(evidence, {
		middle: pooled.median,
		tau: tau.median,
		priorSd: prior.sd,
		model: method.shown
	});
	return {
		id,
		text: questionText[id],
		borrowed,
		studies: evidence.map((study, i) => ({ ...study, weight: weights.studies[i] })),
		borrowedShare: weights.borrowed,
		pooled,
		predictive,
		tau,
		observed,
		method
	};
}

/** A sequence that samples name and the tree does not; none for a sequence of the tree. */
function rareSequence(
	sequence: string,
	observed: ExpectationDto['rareSequences'][number]['observed']
): ExpectationDto['rareSequences'] {
	if ((LEAVES as readonly string[]).includes(sequence)) return [];
	const { leaf, fate } = describeSequence(sequence);
	return [{ sequence, countedWith: leaf, labels: classLabels(sequence), fate, observed }];
}

/** The range of a sequence over the samples that name it; null if none does. */
function observedOf(named: RootAnswer['named'], wanted: string) {
	const found = named.find(({ sequence }) => sequence === wanted);
	return found ? { min: found.min, max: found.max, studies: found.studies } : null;
}

/** Sources behind a root, and the roots they counted: of each source its largest sample, so that no root counts twice. */
function evidenceOf({ model }: RootAnswer): ExpectationDto['evidence'] {
	const largest = new Map<string, number>();
	for (const { evidence } of model.questions)
		for (const { source, total } of evidence) largest.set(source, Math.max(total, largest.get(source) ?? 0));
	return {
		studies: largest.size,
		roots: [...largest.values()].reduce((sum, total) => sum + total, 0),
		sources: [...largest.keys()].sort()
	};
}

/** A pooled feature in the API's shape. */
export function toFeatureDto({ id, evidence, pooled, predictive, observed }: PooledFeature): FeatureDto {
	return { id, name: featureName(id), pooled, predictive, observed, studies: evidence };
}
