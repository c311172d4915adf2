import { median, scaleLinear, scaleSqrt } from 'd3';

/** A sample's counts of teeth by category (`1`, `2`, `2+`). */
interface CountedSample {
	/** Stable key of the sample. */
	entry: number;
	/** Teeth examined, at least 1. */
	total: number;
	counts: readonly { category: string; count: number }[];
}

/** A sample's share in one category. */
interface CountMark {
	entry: number;
	/** Percent of the strip's width, 0 to 100. */
	x: number;
	/** Radius in px: its area grows with the teeth of the sample. */
	radius: number;
	/** Share of the sample's teeth, 0..1. */
	share: number;
}

/** One category: how large a share of the teeth it has in each sample that says so. */
export interface CountStrip {
	category: string;
	marks: CountMark[];
	/** Share in the middle sample, and where it is on the strip, percent. */
	middle: number;
	middleX: number;
	/** Smallest and largest share of any sample. */
	range: [number, number];
}

const RADIUS_PX: [number, number] = [3, 8];
const xOf = scaleLinear([0, 1], [0, 100]).clamp(true);
const round = (value: number) => Math.round(value * 100) / 100;

/**
 * Lays out how often each number of roots or canals was counted, sample by sample; nothing is pooled.
 *
 * A sample that counts all its teeth has a share of 0 in a category it does not name. One that gives only some of its
 * counts says nothing about the others. Categories such as `2+` overlap with `2` and `3`: a sample that uses one is
 * silent about those it covers.
 *
 * @returns categories in order; largest samples first within each, so that small ones are drawn over them
 */
export function layoutCountStrips(samples: readonly CountedSample[]): CountStrip[] {
	const categories = [...new Set(samples.flatMap(({ counts }) => counts.map(({ category }) => category)))];
	const largest = Math.max(1, ...samples.map(({ total }) => total));
	const radiusOf = scaleSqrt([0, largest], RADIUS_PX);
	return categories
		.sort((a, b) => parseInt(a, 10) - parseInt(b, 10) || a.length - b.length)
		.map((category) => {
			const marks = samples
				.flatMap((sample): CountMark[] => {
					const share = shareIn(sample, category);
					if (share === null) return [];
					return [
						{ entry: sample.entry, x: round(xOf(share)), radius: round(radiusOf(sample.total)), share }
					];
				})
				.sort((a, b) => b.radius - a.radius);
			const shares = marks.map(({ share }) => share);
			const middle = median(shares) ?? 0;
			return {
				category,
				marks,
				middle,
				middleX: round(xOf(middle)),
				range: [Math.min(...shares), Math.max(...shares)]
			};
		});
}

/** The share a sample gives to a category; null where it does not say. */
function shareIn({ total, counts }: CountedSample, category: string): number | null {
	const named = counts.find((count) => count.category === category);
	if (named) return named.count / total;
	const complete = counts.reduce((sum, { count }) => sum + count, 0) === total;
	const open = [category, ...counts.map((count) => count.category)].some((name) => name.endsWith('+'));
	return complete && !open ? 0 : null;
}
