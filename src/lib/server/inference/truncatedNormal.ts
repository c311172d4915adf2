/** A normal distribution cut off below 0 and above `upper`. */
export interface TruncatedNormal {
	mean: number;
	sd: number;
	/** The x below which a part p of the distribution lies; p in [0, 1]. */
	quantile: (p: number) => number;
}

/** Gauss-Legendre rule of five points on [0, 1] (Abramowitz and Stegun 25.4.30, in closed form). */
const RULE = [-1, -1, 0, 1, 1].map((side, i) => {
	const outer = i === 0 || i === 4 ? 1 : -1;
	if (side === 0) return { at: 0.5, weight: 64 / 225 };
	const node = Math.sqrt(5 + outer * 2 * Math.sqrt(10 / 7)) / 3;
	return { at: (1 + side * node) / 2, weight: (322 - outer * 13 * Math.sqrt(70)) / 1800 };
});

/** Panels over the part of the range that has any mass; a panel is at most 0.15 sd wide. */
const PANELS = 128;
/** Where the logarithm of the density has fallen this far below its peak, nothing a double could hold is left. */
const LOG_FALL = 40;
const NEWTON_STEPS = 60;

/**
 * Normal(m, s²) truncated to [0, upper], exact to about 1e-12 whatever m and s are. By quadrature from the density's
 * peak rather than from differences of the distribution function: these lose every digit where m lies far outside
 * the range or s is much wider than it, and this never leaves the range nor gives NaN.
 * @param m any finite number
 * @param s above 0
 * @param upper above 0
 * @throws RangeError for anything else. Example: truncatedNormal(0, 1, 100).mean = √(2/π) = 0.79788…
 */
export function truncatedNormal(m: number, s: number, upper: number): TruncatedNormal {
	if (!Number.isFinite(m) || !(s > 0 && Number.isFinite(s)) || !(upper > 0 && Number.isFinite(upper)))
		throw new RangeError('A truncated normal needs a finite mean, a positive sd and a positive upper end.');
	const peak = Math.min(upper, Math.max(0, m));
	const away = Math.abs(m - peak);
	// The u > 0 with u (u + 2 away) / (2 s²) = LOG_FALL, in the form that does not cancel.
	const reach = (2 * LOG_FALL * s * s) / (away + Math.sqrt(away * away + 2 * LOG_FALL * s * s));
	const from = Math.max(-peak, -reach);
	const to = Math.min(upper - peak, reach);
	if (!(to > from)) return { mean: peak, sd: 0, quantile: () => peak };

	/** Density at an offset u from the peak, as a part of the peak's. */
	const density = (u: number) => Math.exp((-u * (u + 2 * (peak - m))) / (2 * s * s));
	const integrate = (a: number, b: number, f: (u: number) => number) =>
		(b - a) * RULE.reduce((sum, { at, weight }) => sum + weight * f(a + (b - a) * at), 0);
	const width = (to - from) / PANELS;
	const starts = Array.from({ length: PANELS }, (_, i) => from + i * width);
	const over = (f: (u: number) => number) =>
		starts.reduce((sum, start) => sum + integrate(start, start + width, f), 0);

	const mass = over(density);
	const shift = over((u) => u * density(u)) / mass;
	const variance = over((u) => (u - shift) ** 2 * density(u)) / mass;
	const clamp = (x: number) => Math.min(upper, Math.max(0, x));

	function quantile(p: number): number {
		let rest = p * mass;
		let panel = 0;
		for (; panel < PANELS - 1; panel++) {
			const inPanel = integrate(starts[panel], starts[panel] + width, density);
			if (inPanel >= rest) break;
			rest -= inPanel;
		}
		const start = starts[panel];
		let [low, high] = [start, start + width];
		let u = start + width / 2;
		for (let step = 0; step < NEWTON_STEPS; step++) {
			const error = integrate(start, u, density) - rest;
			if (error > 0) high = u;
			else low = u;
			const newton = u - error / density(u);
			const next = newton > low && newton < high ? newton : (low + high) / 2;
			const settled = Math.abs(next - u) <= 1e-15 * Math.max(Math.abs(u), s);
			u = next;
			if (settled) break;
		}
		return clamp(peak + u);
	}
	return { mean: clamp(peak + shift), sd: Math.sqrt(variance), quantile };
}
