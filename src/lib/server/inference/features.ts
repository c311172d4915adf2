/** Features of a tooth or root (C-shape, extra root, isthmus…) as samples of a plain prevalence. Pure. */
import { toothOf } from '$lib/anatomy/teeth';
import { samplesLeft } from './filters';
import { onePerSource, toQuestionStudy } from './questions';
import type { Candidate } from './questions';
import { groupBy } from './samples';
import { rootTable } from './tableIndex';
import type { TableIndex } from './tableIndex';
import type { Filters, QuestionStudy } from './types';

/** A feature and the samples that say how often it is there, one a source. */
interface FeatureEvidence {
	id: string;
	studies: QuestionStudy[];
}

/**
 * Features whose figure is a plain "so many of all teeth (or of all such roots) have it", in the order shown. Left out,
 * and only listed with the table: places of a feature (isthmus-at-3mm, confluence-apical-third), shapes of orifices,
 * foramina and sections, what was found or missed in treatment (mb2-located, mb2-negotiable, missed-canal,
 * periapical-lesion), left beside right, counts written as features (no-accessory-canal, two-canals-one-foramen,
 * three-roots) and second-distal, which counts one root or two.
 */
const PLAIN_PREVALENCES = [
	'mb2',
	'middle-mesial',
	'middle-distal',
	'lingual-canal',
	'c-shape',
	'c-shaped-root',
	'radix-entomolaris',
	'radix-paramolaris',
	'root-fusion',
	'fused-roots',
	'isthmus',
	'intercanal-communication',
	'connecting-canal',
	'lateral-canal',
	'accessory-canal',
	'accessory-foramen',
	'furcation-canal',
	'apical-delta',
	'radicular-groove',
	'deep-radicular-groove',
	'mesial-invagination',
	'dens-invaginatus'
];

/** Where the figures of a whole tooth stand: of incisors and canines with those of their one root. */
function wholeToothRoot(tooth: string): string {
	const kind = toothOf(tooth)?.kind;
	return kind === 'incisor' || kind === 'canine' ? 'single' : 'whole';
}

/**
 * Gathers the features of a root, or of the whole tooth.
 *
 * Only samples that count all such roots (scope `all` or that root's own): a share within two-canal roots, patients or
 * C-shaped teeth is no prevalence.
 *
 * @param root a root the product answers for, or null for the whole tooth
 */
export function gatherFeatures(
	index: TableIndex,
	tooth: string,
	root: string | null,
	filters: Filters
): FeatureEvidence[] {
	const table = rootTable(index, tooth, root ?? wholeToothRoot(tooth));
	const { samples } = samplesLeft(table, index.sources, filters);
	const candidates = samples
		.filter(({ measure, grant }) => measure === 'feature' && grant === 'every')
		.flatMap((sample) =>
			[...sample.counts].map(([id, events]): Candidate & { id: string } => ({
				id,
				sample,
				study: { events, total: sample.total }
			}))
		);
	const byId = groupBy(candidates, ({ id }) => id);
	return PLAIN_PREVALENCES.flatMap((id) => {
		const found = byId.get(id);
		return found ? [{ id, studies: onePerSource(found).map(toQuestionStudy) }] : [];
	});
}
