import { FATES, type Fate } from '$lib/anatomy/sequence';

interface Estimate {
	mean: number;
	interval: [number, number];
}

/** Fates in the order screens list them; a fate that is not possible is not there. */
export function toFateList(fates: Partial<Record<Fate, Estimate>>): ({ fate: Fate } & Estimate)[] {
	return FATES.flatMap((fate) => {
		const estimate = fates[fate];
		return estimate ? [{ fate, ...estimate }] : [];
	});
}
