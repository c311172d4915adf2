import type { FilterFields } from '$lib/filterQuery';
import type { SourceSummary } from '$lib/schemas/table';
import { sourceName } from '$lib/strings/source';

/** Sources that a person may leave out of an estimate: those in use and those left out already, by name. */
export function toChoices(
	inUse: readonly string[],
	filters: FilterFields,
	sources: Record<string, SourceSummary>
): { id: string; name: string }[] {
	const leftOut = filters.flatMap(([name, value]) => (name === 'exclude' ? [value] : []));
	return [...new Set([...inUse, ...leftOut])]
		.map((id) => ({ id, name: sourceName(id, sources[id]) }))
		.sort((a, b) => a.name.localeCompare(b.name, 'en'));
}
