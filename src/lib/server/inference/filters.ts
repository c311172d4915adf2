/** Filters of an estimate applied to samples, then combined countries applied to what is left. Pure. */
import { passesAppraisal } from '$lib/schemas/appraisal';
import { countryMatches, isCombined, replaces } from './countries';
import type { Sample } from './samples';
import type { RootTable } from './tableIndex';
import type { Filters, SourceFacts } from './types';

/** A sample that the filters or a combined sample leave out, and why. */
export interface LeftOut {
	sample: Sample;
	reason: string;
}

/**
 * What is left of a root's samples. The filters come first, so that asking for one country brings back its own figure
 * where a combined sample would otherwise stand for it. `minTotal` is about the sample's own total.
 */
export function samplesLeft(
	table: RootTable,
	sources: ReadonlyMap<string, SourceFacts>,
	filters: Filters
): { samples: Sample[]; leftOut: LeftOut[] } {
	const leftOut: LeftOut[] = [];
	const passed: Sample[] = [];
	for (const sample of table.samples) {
		const reason = filteredOut(sample, sources.get(sample.source), filters);
		if (reason === null) passed.push(sample);
		else leftOut.push({ sample, reason });
	}
	const combined = combinedFigures(table, passed, sources, filters);
	if (combined.length === 0) return { samples: passed, leftOut };
	const samples: Sample[] = [];
	for (const sample of passed) {
		const own = withoutReplaced(sample, combined);
		if (own) samples.push(own);
		else leftOut.push({ sample, reason: 'Part of a sample of several countries, which stands for it.' });
	}
	return { samples, leftOut };
}

/** The filter a figure fails, in words, or null. A year or country that is not known passes no filter on it. */
export function filteredOut(
	figure: { source: string; country: string; method: string; total: number | null },
	source: SourceFacts | undefined,
	filters: Filters
): string | null {
	const { methods, countries, yearFrom, yearTo, minTotal, exclude, appraisal } = filters;
	const year = source?.year ?? null;
	const left = (what: string) => `Left out by your filter (${what}).`;
	if (exclude?.includes(figure.source)) return left('source');
	if (methods && methods.length > 0 && !methods.includes(figure.method)) return left('method');
	if (countries && countries.length > 0 && !countryMatches(figure.country, countries)) return left('country');
	if (yearFrom !== undefined && (year === null || year < yearFrom)) return left('year');
	if (yearTo !== undefined && (year === null || year > yearTo)) return left('year');
	if (minTotal !== undefined && figure.total !== null && figure.total < minTotal)
		return left('size of the sample');
	if (appraisal !== undefined && !passesAppraisal(source?.appraisal ?? null, appraisal))
		return left('appraisal');
	return null;
}

type Combined = Pick<Sample, 'source' | 'root' | 'scope' | 'country' | 'method' | 'measure'> & {
	categories: readonly string[];
};

/**
 * Combined-country figures that stand for their parts. Those that may enter do; so does a `multi` figure that lacks
 * only its count (method not review), for the single countries a source prints beside its overall percentage are a
 * choice of its own, most often the extremes.
 */
function combinedFigures(
	table: RootTable,
	passed: readonly Sample[],
	sources: ReadonlyMap<string, SourceFacts>,
	filters: Filters
): Combined[] {
	const pooled = passed
		.filter((sample) => isCombined(sample.country))
		.map((sample) => ({ ...sample, categories: [...sample.counts.keys()] }));
	const overall = table.shutOut
		.map(({ row }) => row)
		.filter(
			(row) =>
				row.country === 'multi' &&
				row.method !== 'review' &&
				row.subgroup === 'all' &&
				(row.provenance !== 'memory' || row.verified) &&
				row.count === null &&
				filteredOut(row, sources.get(row.source), filters) === null
		)
		.map((row) => ({ ...row, categories: [row.category] }));
	return [...pooled, ...overall];
}

/** The sample without the categories a combined figure gives; null when nothing is left of it. */
function withoutReplaced(sample: Sample, combined: readonly Combined[]): Sample | null {
	const gone = new Set(
		combined.filter((whole) => replaces(whole, sample)).flatMap(({ categories }) => categories)
	);
	if (gone.size === 0) return sample;
	const counts = new Map([...sample.counts].filter(([category]) => !gone.has(category)));
	return counts.size > 0 ? { ...sample, counts } : null;
}
