import { scaleLinear } from 'd3';
import { wilsonInterval } from './wilson';

/** A study of a forest plot: `events` of `total` roots say yes. */
export interface ForestStudy {
	events: number;
	total: number;
	/** Share of the information about the middle population, 0..1; without it the square goes by the total. */
	weight?: number;
}

/** A pooled or predicted proportion with its 95 % interval. */
export interface ForestSummary {
	mean: number;
	interval: readonly [number, number];
}

/** One study's row, horizontally in percent of the plot's width, so that a row fits any column. */
export interface ForestRow {
	proportion: number;
	interval: [number, number];
	x: number;
	from: number;
	to: number;
	/** Side of the square in pixels: its area grows with the weight or, without weights, with the square root of the total. */
	side: number;
}

/** A summary's row: a diamond or a band from `from` to `to`, its mean at `x`, all in percent of the plot's width. */
export interface ForestSummaryRow {
	x: number;
	from: number;
	to: number;
	/** Points of a diamond in a box of 100 × 100 laid over `from`..`to`. */
	diamond: string;
}

export interface ForestLayout {
	rows: ForestRow[];
	pooled: ForestSummaryRow;
	predictive: ForestSummaryRow;
	ticks: { value: number; x: number }[];
}

/** Room left and right of 0 and 100 %, so that a square at either end is whole. */
const EDGE = 4;
const TICKS = [0, 0.25, 0.5, 0.75, 1];
const LARGEST_SIDE_PX = 15;
const SMALLEST_SIDE_PX = 4;

const xOf = scaleLinear([0, 1], [EDGE, 100 - EDGE]);
const round = (value: number) => Math.round(value * 1000) / 1000;

/** Part of the largest square's area that a study's square takes. */
function areaOf({ total, weight }: ForestStudy): number {
	return weight ?? Math.sqrt(total);
}

function layoutRow(study: ForestStudy, largestArea: number): ForestRow {
	const { events, total } = study;
	const interval = wilsonInterval(events, total);
	const side = LARGEST_SIDE_PX * Math.sqrt(areaOf(study) / largestArea);
	return {
		proportion: events / total,
		interval,
		x: round(xOf(events / total)),
		from: round(xOf(interval[0])),
		to: round(xOf(interval[1])),
		side: round(Math.max(SMALLEST_SIDE_PX, side))
	};
}

function layoutSummary({ mean, interval }: ForestSummary): ForestSummaryRow {
	const [from, to, x] = [xOf(interval[0]), xOf(interval[1]), xOf(mean)];
	const top = to > from ? round((100 * (x - from)) / (to - from)) : 50;
	return { x: round(x), from: round(from), to: round(to), diamond: `0,50 ${top},0 100,50 ${top},100` };
}

/**
 * A forest plot, row by row, on an axis from 0 to 100 %.
 *
 * @param data studies with total ≥ 1, in the order they are listed; summaries as probabilities 0..1
 * @throws RangeError for a study whose events or total are out of range
 */
export function layoutForest(data: {
	studies: readonly ForestStudy[];
	pooled: ForestSummary;
	predictive: ForestSummary;
}): ForestLayout {
	const largest = data.studies.reduce((most, study) => Math.max(most, areaOf(study)), Number.MIN_VALUE);
	return {
		rows: data.studies.map((study) => layoutRow(study, largest)),
		pooled: layoutSummary(data.pooled),
		predictive: layoutSummary(data.predictive),
		ticks: TICKS.map((value) => ({ value, x: round(xOf(value)) }))
	};
}
