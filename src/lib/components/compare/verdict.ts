import { compare as words } from '$lib/strings/compare';

/** How far two sides lie apart on a question; as the server works it out. */
export interface SideDifference {
	id: string;
	/** First less second; null where a side has no sample of its own. */
	middle: { mean: number; interval: [number, number]; firstLarger: number } | null;
	next: { mean: number; interval: [number, number]; firstLarger: number } | null;
	/** Sources on both sides. */
	shared: number;
}

/** Nearer to even than this, neither side is called the higher one. */
const ABOUT_EVEN = 0.05;

/**
 * What can be said of a difference, in sentences. A difference of the middle populations is claimed only where its 95 %
 * range leaves out 0; of new populations it is said how often either is the higher one.
 *
 * @param ranges the predictive intervals of both sides
 */
export function verdictOf(
	{ middle, next, shared }: SideDifference,
	ranges: { a: readonly [number, number]; b: readonly [number, number] }
): string[] {
	if (!middle || !next) return [words.noComparison];
	const [from, to] = middle.interval;
	const onAverage =
		from > 0
			? words.differs(words.sideName.a, middle.mean, [from, to])
			: to < 0
				? words.differs(words.sideName.b, -middle.mean, [-to, -from])
				: words.open(middle.mean, [from, to]);
	const overlap = ranges.a[0] <= ranges.b[1] && ranges.b[0] <= ranges.a[1];
	const p = next.firstLarger;
	const forNext =
		Math.abs(p - 0.5) <= ABOUT_EVEN
			? words.either(overlap)
			: p > 0.5
				? words.chance(words.sideName.a, p, overlap)
				: words.chance(words.sideName.b, 1 - p, overlap);
	return [onAverage, forNext, ...(shared > 0 ? [words.sharedSources(shared)] : [])];
}
