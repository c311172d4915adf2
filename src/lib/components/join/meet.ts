import type { Fate } from '$lib/anatomy/sequence';

const MEETING: readonly Fate[] = ['shared-exit', 'meet-and-part', 'partly-shared'];

/** Probability that the canals come together anywhere, whatever they do afterwards. */
export function meetProbability(fates: Partial<Record<Fate, { mean: number }>>): number {
	return MEETING.reduce((sum, fate) => sum + (fates[fate]?.mean ?? 0), 0);
}
