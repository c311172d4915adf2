import type { ExpectationDto } from '$lib/schemas/expectation';
import { toFateList } from '$lib/components/root/fateList';
import { drawing } from '$lib/strings/drawing';

interface Estimate {
	mean: number;
	interval: [number, number];
}

/** One figure of both sides. */
export interface Pair {
	key: string;
	label: string;
	/** Drawn beside the label. */
	sequence?: string;
	a: Estimate;
	b: Estimate;
}

type Answer = Pick<ExpectationDto, 'sequences' | 'fates'>;

/** The sequences of both sides, those that are probable on either side first. */
export function sequencePairs(first: Answer, second: Answer): Pair[] {
	return first.sequences
		.flatMap((a): Pair[] => {
			const b = second.sequences.find(({ sequence }) => sequence === a.sequence);
			return b ? [{ key: a.sequence, label: a.sequence, sequence: a.sequence, a, b }] : [];
		})
		.sort((one, other) => Math.max(other.a.mean, other.b.mean) - Math.max(one.a.mean, one.b.mean));
}

/** What becomes of the canals, on both sides. */
export function fatePairs(first: Answer, second: Answer): Pair[] {
	const others = toFateList(second.fates);
	return toFateList(first.fates).flatMap((a): Pair[] => {
		const b = others.find(({ fate }) => fate === a.fate);
		return b ? [{ key: a.fate, label: drawing.fates[a.fate], a, b }] : [];
	});
}
