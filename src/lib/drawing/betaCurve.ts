/** The curve of a Beta distribution with its equal-tailed interval, as numbers and path strings. Pure. */
import { area, line, scaleLinear } from 'd3';

interface BetaLayout {
	width: number;
	height: number;
	/** The density over 0..1. */
	curve: string;
	/** The part of it inside the interval. */
	inside: string;
	/** Height of the base line, and places of 0, ½ and 1 on it. */
	base: number;
	ticks: { share: number; x: number }[];
	mean: { x: number; y: number };
}

/** Points of the curve; ends are left out, where a density may be without bound. */
const POINTS = 200;
const MARGIN = { left: 14, right: 14, top: 6, bottom: 18 };
const round = (value: number) => Math.round(value * 100) / 100;

/**
 * Lays the density out up to a constant: its highest point of those drawn fills the height.
 *
 * @param data parameters a, b > 0 and the interval to be marked, 0..1
 * @param size in units of the drawing
 */
export function layoutBeta(
	data: { a: number; b: number; interval: readonly [number, number] },
	size: { width: number; height: number }
): BetaLayout {
	const { a, b, interval } = data;
	const logDensity = (p: number) => (a - 1) * Math.log(p) + (b - 1) * Math.log1p(-p);
	const points = Array.from({ length: POINTS }, (_, i) => (i + 0.5) / POINTS);
	const top = Math.max(...points.map(logDensity));
	const base = size.height - MARGIN.bottom;
	const x = scaleLinear([0, 1], [MARGIN.left, size.width - MARGIN.right]);
	const y = scaleLinear([0, 1], [base, MARGIN.top]);
	const yOf = (p: number) => round(y(Math.min(1, Math.exp(logDensity(p) - top))));
	const xOf = (p: number) => round(x(p));
	const inner = [interval[0], ...points.filter((p) => p > interval[0] && p < interval[1]), interval[1]];
	const mean = a / (a + b);
	return {
		...size,
		curve: line<number>(xOf, yOf)(points) ?? '',
		inside: area<number>(xOf, base, yOf)(inner) ?? '',
		base,
		ticks: [0, 0.5, 1].map((share) => ({ share, x: xOf(share) })),
		mean: { x: xOf(mean), y: yOf(mean) }
	};
}
