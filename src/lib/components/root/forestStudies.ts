import { sourceAddress } from '$lib/addresses';
import type { SourceSummary } from '$lib/schemas/table';
import type { StudyDto } from '$lib/schemas/teeth';
import { root as words } from '$lib/strings/root';
import { sourceName } from '$lib/strings/source';

/** Studies as the forest plot takes them, named by their sources. */
export function toForestStudies(studies: readonly StudyDto[], sources: Record<string, SourceSummary>) {
	return studies.map(({ source, entry, locator, country, method, events, total }) => ({
		id: entry,
		label: sourceName(source, sources[source]),
		href: sourceAddress(source),
		locator,
		country,
		method: words.methods[method] ?? method,
		events,
		total
	}));
}
