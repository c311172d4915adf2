import type { GridFit } from './fitGrid';
import type { Summary } from './types';

/** Fine steps to a step of the grid. */
const FINE = 32;
/** Points of the interpolating polynomial. */
const POINTS = 6;

/** Lagrange weights of the polynomial through 0 … 5 at t, for t = 0, 1/32, … 5. */
const LAGRANGE = Array.from({ length: (POINTS - 1) * FINE + 1 }, (_, fine) =>
	Array.from({ length: POINTS }, (_, i) => {
		let weight = 1;
		for (let k = 0; k < POINTS; k++) if (k !== i) weight *= (fine / FINE - k) / (i - k);
		return weight;
	})
);

/**
 * Mean, median and interval of tau. The log density over the columns is smooth in v = asinh(tau / scale), so it
 * is filled in by polynomials through six neighbours (mirrored at tau = 0, where it is even) and integrated by
 * the trapezoid rule in steps 32 times finer than the grid.
 * @param tails lower and upper probability of the interval
 */
export function summariseTau(fit: GridFit, tails: [number, number]): Summary {
	const { columns, scale, vStart, vStep } = fit;
	const last = columns.length - 1;
	const logDensity = (j: number) => columns[vStart === 0 ? Math.abs(j) : j].logDensity;
	const top = Math.max(...columns.map((c) => c.logDensity));
	const lowest = vStart === 0 ? -POINTS : 0;
	const cumulative = new Float64Array(last * FINE + 1);
	const tauAt = (fine: number) => scale * Math.sinh(vStart + (fine / FINE) * vStep);
	let before = 0;
	let mean = 0;
	for (let fine = 0; fine <= last * FINE; fine++) {
		const j = Math.floor(fine / FINE);
		const from = Math.max(lowest, Math.min(j - POINTS / 2 + 1, last - POINTS + 1));
		const weights = LAGRANGE[fine - from * FINE];
		let log = 0;
		for (let k = 0; k < POINTS; k++) log += weights[k] * logDensity(from + k);
		const density = Math.exp(log - top);
		if (fine > 0) {
			cumulative[fine] = cumulative[fine - 1] + (before + density) / 2;
			mean += (before * tauAt(fine - 1) + density * tauAt(fine)) / 2;
		}
		before = density;
	}
	const total = cumulative[cumulative.length - 1];
	const quantile = (p: number) => {
		const target = p * total;
		let fine = 1;
		while (fine < cumulative.length - 1 && cumulative[fine] < target) fine++;
		const t = (target - cumulative[fine - 1]) / (cumulative[fine] - cumulative[fine - 1]);
		return tauAt(fine - 1 + t);
	};
	return { mean: mean / total, median: quantile(0.5), interval: [quantile(tails[0]), quantile(tails[1])] };
}
