import { relatedRoots } from '$lib/anatomy/pairs';
import type { RootId } from '$lib/anatomy/teeth';
import { compareAddress, placeOf } from '$lib/components/compare/compareState';
import type { FilterFields } from '$lib/filterQuery';
import { compare as words } from '$lib/strings/compare';

/** Methods that are often set against each other, and the words that say so. */
const METHOD_PAIR = ['cbct', 'clearing'] as const;

/**
 * What a root may be compared with: related roots under the same filters, all samples if there are filters, and CBCT
 * against clearing where there are samples of both.
 *
 * @param methods of the samples of the root
 */
export function comparisonsOf(
	tooth: string,
	root: RootId,
	filters: FilterFields,
	methods: readonly string[]
): { label: string; href: string }[] {
	const place = placeOf(tooth, root);
	const here = { place, filters };
	const roots = relatedRoots(tooth, root).map((other) => ({
		label: words.placeName(other.tooth.name, other.root.name),
		href: compareAddress(here, {
			place: placeOf(other.tooth.id, other.root.id),
			// A country or a source may be unknown there; nothing else of the filters is about this tooth.
			filters: filters.filter(([field]) => field !== 'country' && field !== 'exclude')
		})
	}));
	const [one, other] = METHOD_PAIR;
	const byMethod = METHOD_PAIR.every((method) => methods.includes(method))
		? [
				{
					label: words.methodPair,
					href: compareAddress({ place, filters: [['method', one]] }, { place, filters: [['method', other]] })
				}
			]
		: [];
	const unfiltered =
		filters.length > 0
			? [{ label: words.allSamples, href: compareAddress(here, { place, filters: [] }) }]
			: [];
	return [...unfiltered, ...byMethod, ...roots];
}
