import { scaleLinear } from 'd3';

/** A bar from 0 to 1 with a mean and its 95 % interval, in percent of the bar's width. */
interface IntervalLayout {
	mean: number;
	from: number;
	width: number;
}

const xOf = scaleLinear([0, 1], [0, 100]).clamp(true);
const round = (value: number) => Math.round(value * 1000) / 1000;
/** An interval is never drawn thinner than this, percent of the bar. */
const THINNEST = 1;

/**
 * @param data mean and interval as probabilities; values outside 0..1 are taken as the nearest end
 * @throws RangeError when the interval's lower end is above its upper end
 */
export function layoutInterval(data: { mean: number; interval: readonly [number, number] }): IntervalLayout {
	const [lower, upper] = data.interval;
	if (lower > upper) throw new RangeError('The lower end of an interval is above its upper end.');
	const width = Math.max(THINNEST, xOf(upper) - xOf(lower));
	return {
		mean: round(xOf(data.mean)),
		from: round(Math.min(xOf(lower), 100 - width)),
		width: round(width)
	};
}
