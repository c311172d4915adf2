import type { FilterFields } from '$lib/filterQuery';
import type { ExpectationDto } from '$lib/schemas/expectation';
import type { SourceSummary } from '$lib/schemas/table';
import { drawingFile as words } from '$lib/strings/drawingFile';
import { formatFor } from '$lib/strings/format';
import { root as rootWords } from '$lib/strings/root';
import { sourceName } from '$lib/strings/source';
import type { RootShape } from '../table/rootShape';

/** A file is read by others than the one who chose the units of the screen. */
const format = formatFor();
/** Below this a sequence is not named in the file of a drawing: it is not to be seen there either. */
const NAMED_FROM = 0.005;

/** What stands under a drawing that leaves the page: its name, its figures, where they come from, and as of when. */
export function drawingNotes(
	label: string,
	expectation: ExpectationDto,
	shape: RootShape,
	sources: Record<string, SourceSummary>,
	filters: FilterFields,
	date: Date
): string[] {
	const figures = [...expectation.sequences]
		.sort((a, b) => b.mean - a.mean)
		.filter(({ mean }) => mean >= NAMED_FROM)
		.map(({ sequence, mean, interval }) => `${sequence}: ${format.figure(mean, interval)}`);
	const placed = [
		{ name: rootWords.lengthFrom, at: shape.length },
		{ name: rootWords.levelFrom, at: shape.confluence }
	].flatMap(({ name, at }) =>
		at?.source
			? [
					`${name} ${sourceName(at.source, sources[at.source])} (${at.locator ?? ''})${at.verified ? '' : words.unverified}`
				]
			: []
	);
	return [
		label,
		words.figures(figures.join('; ')),
		expectation.evidence.studies === 0
			? rootWords.noEvidence
			: rootWords.evidence(expectation.evidence.studies, expectation.evidence.roots),
		placed.length > 0 ? `${rootWords.shapeFrom} ${placed.join('; ')}.` : words.assumedShape,
		filters.length > 0
			? words.filters(filters.map(([name, value]) => `${name} ${value}`).join(', '))
			: words.unfiltered,
		words.made(expectation.tableRevision, date.toISOString().slice(0, 10))
	];
}
