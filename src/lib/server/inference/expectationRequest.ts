import { classLabels } from '$lib/anatomy/classes';
import { leafFacts, type Leaf } from '$lib/anatomy/sequence';
import type { Root, Tooth } from '$lib/anatomy/teeth';
import type { FiltersInForce } from '$lib/schemas/common';
import type { ExpectationDto } from '$lib/schemas/expectation';
import type { FeatureDto } from '$lib/schemas/teeth';
import { featureName } from '$lib/strings/features';
import { questionText } from '$lib/strings/questions';
import { checkFilters } from './checkFilters';
import { estimator } from './estimator';
import type { PooledFeature, RootAnswer } from './tasks';

/**
 * What to expect of a root under some filters, in the API's shape.
 * @throws Problem 422 for a filter that names a country or source the table does not have
 */
export async function expectationOf(tooth: Tooth, root: Root, filters: FiltersInForce): Promise<ExpectationDto> {
	await checkFilters(filters, { countries: 'country', exclude: 'exclude' });
	const current = await estimator();
	return toDto(await current.root(tooth.id, root.id, filters), filters, current.revision);
}

function toDto(answer: RootAnswer, filters: FiltersInForce, tableRevision: number): ExpectationDto {
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
			fate: leafFacts(sequence as Leaf).fate,
			...estimate,
			observed: observedOf(named, sequence)
		})),
		orifices: expectation.orifices,
		exits: expectation.exits,
		fates: expectation.fates,
		features: features.map(toFeatureDto),
		questions: model.questions.map(({ id, borrowed, evidence, pooled, predictive, tau, observed }) => ({
			id,
			text: questionText[id],
			borrowed,
			studies: evidence,
			pooled,
			predictive,
			tau,
			observed
		})),
		reviews: model.reviews,
		notPooled: model.notPooled,
		coverage: null
	};
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
