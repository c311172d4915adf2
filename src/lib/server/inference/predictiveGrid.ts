import type { PredictiveGrid } from './types';

/** Mean of a predictive distribution, from the same masses that the intervals draw from. */
export function gridMean({ p, mass }: PredictiveGrid): number {
	let sum = 0;
	for (let i = 0; i < p.length; i++) sum += p[i] * mass[i];
	return sum;
}
