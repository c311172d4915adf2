import { toothOf } from '$lib/anatomy/teeth';
import type { ExpectationDto } from '$lib/schemas/expectation';
import type { FeatureDto } from '$lib/schemas/teeth';
import { featureName } from '$lib/strings/features';
import { inWords, type Format } from '$lib/strings/format';
import { tooth as words } from '$lib/strings/tooth';

/** A root of a tooth with what to expect in it. */
export interface ExpectedRoot {
	root: { id: string; name: string };
	expectation: ExpectationDto;
}

/** One thing to look for, with the figure it follows from. */
interface LookForItem {
	what: string;
	figure: string;
	/** Samples it rests on. */
	samples: number;
	/** Middle probability in a new population, 0..1; what rests on enough samples is ordered by it. */
	mean: number;
}

/** A feature that is at least this frequent is worth a line. */
const WORTH_A_LINE = 0.03;
/** So is one that some populations may have this often, however rare it is on the whole. */
const WORTH_A_WARNING = 0.15;
/** Fewer samples than this say little of other populations: what rests on them stands last. */
export const FEW_SAMPLES = 3;
const EXPECTED_FROM = 0.5;
const LIKELY_FROM = 0.1;

/** Features a dentist asks about before opening a tooth, by its kind (common practice, no source). */
const ASKED: Record<'maxillary' | 'mandibular', Partial<Record<string, readonly string[]>>> = {
	maxillary: {
		molar: ['mb2', 'c-shape', 'root-fusion', 'isthmus'],
		premolar: ['isthmus'],
		incisor: ['dens-invaginatus']
	},
	mandibular: {
		molar: ['c-shape', 'radix-entomolaris', 'middle-mesial', 'isthmus'],
		premolar: ['c-shape', 'isthmus'],
		incisor: ['isthmus']
	}
};

/**
 * What to look for in a tooth, the likeliest first, what rests on few samples last: further canals of its roots and its features, from the pooled
 * figures alone. A root that no sample answers for is left out: its figures are borrowed and say nothing of it.
 */
export function lookFor(
	roots: readonly ExpectedRoot[],
	features: readonly (FeatureDto & { where?: string })[],
	format: Format
): LookForItem[] {
	const canals = roots.flatMap(({ root, expectation }): LookForItem[] => {
		const { predictive, borrowed, studies } = expectation.questions[0];
		if (borrowed || predictive.mean < WORTH_A_LINE) return [];
		return [
			{
				what: words.secondCanal(root.name, degreeOf(predictive.mean)),
				figure: words.withRange(inWords(predictive.mean), format.range(predictive.interval)),
				samples: studies.length,
				mean: predictive.mean
			}
		];
	});
	const others = features.flatMap(({ name, where, predictive, studies, id }): LookForItem[] => {
		// The second mesiobuccal canal is the second canal of its root, which stands above.
		const said = id === 'mb2' && canals.length > 0;
		const worth = predictive.mean >= WORTH_A_LINE || predictive.interval[1] >= WORTH_A_WARNING;
		if (said || !worth) return [];
		return [
			{
				what: where ? `${name} (${where.toLowerCase()})` : name,
				figure: words.withRange(inWords(predictive.mean), format.range(predictive.interval)),
				samples: studies.length,
				mean: predictive.mean
			}
		];
	});
	const thin = ({ samples }: LookForItem) => Number(samples < FEW_SAMPLES);
	return [...canals, ...others].sort((a, b) => thin(a) - thin(b) || b.mean - a.mean);
}

/** Names of features one would ask about in this tooth and of which the table has no sample. */
export function featuresWithoutEvidence(tooth: string, features: readonly FeatureDto[]): string[] {
	const known = toothOf(tooth);
	const asked = (known && ASKED[known.arch][known.kind]) ?? [];
	return asked.filter((id) => !features.some((feature) => feature.id === id)).map(featureName);
}

function degreeOf(mean: number): 'expect' | 'look' | 'uncommon' {
	if (mean >= EXPECTED_FROM) return 'expect';
	return mean >= LIKELY_FROM ? 'look' : 'uncommon';
}
