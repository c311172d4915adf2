import { scaleLinear, scaleLog } from 'd3';

/** A question of one root: how many samples were left out in turn, and the share of them inside their range. */
export interface CoveragePoint {
	/** Stable key. */
	id: string;
	samples: number;
	/** 0..1 */
	share: number;
	flagged: boolean;
}

/** One dot; questions with the same samples and share stand side by side. */
interface CoverageDot {
	id: string;
	x: number;
	y: number;
	flagged: boolean;
}

export interface CoverageLayout {
	width: number;
	height: number;
	plot: { left: number; right: number; top: number; bottom: number };
	dots: CoverageDot[];
	radius: number;
	/** Where the shares should lie, and from where down a question is flagged. */
	expected: { share: number; y: number };
	flag: { share: number; y: number };
	shares: { share: number; y: number }[];
	samples: { samples: number; x: number }[];
}

const MARGIN = { left: 52, right: 12, top: 12, bottom: 44 };
const RADIUS = 5;
const SAMPLE_TICKS = [3, 5, 10, 20, 40, 80];

/**
 * Coverage of many questions: samples along (logarithmic, since a few questions have many), share inside the range upwards.
 *
 * @param points the questions; an empty list draws only the lines
 * @param level what the ranges claim, e.g. 0.95
 * @param flagBelow from where down a question is flagged, e.g. 0.9
 */
export function layoutCoverage(
	points: readonly CoveragePoint[],
	{ level, flagBelow }: { level: number; flagBelow: number },
	{ width, height }: { width: number; height: number }
): CoverageLayout {
	const plot = {
		left: MARGIN.left,
		right: width - MARGIN.right,
		top: MARGIN.top,
		bottom: height - MARGIN.bottom
	};
	const most = Math.max(10, ...points.map(({ samples }) => samples));
	const lowest = Math.min(0.5, ...points.map(({ share }) => share));
	const x = scaleLog([2.6, most * 1.15], [plot.left, plot.right]);
	const y = scaleLinear([Math.floor(lowest * 10) / 10, 1], [plot.bottom, plot.top]);
	const taken = new Map<string, number>();
	const dots = points.map(({ id, samples, share, flagged }) => {
		const place = `${samples} ${share.toFixed(4)}`;
		const before = taken.get(place) ?? 0;
		taken.set(place, before + 1);
		return { id, x: x(samples) + before * RADIUS * 1.6, y: y(share), flagged };
	});
	return {
		width,
		height,
		plot,
		dots,
		radius: RADIUS,
		expected: { share: level, y: y(level) },
		flag: { share: flagBelow, y: y(flagBelow) },
		shares: y.ticks(5).map((share) => ({ share, y: y(share) })),
		samples: SAMPLE_TICKS.filter((tick) => tick <= most * 1.15).map((samples) => ({ samples, x: x(samples) }))
	};
}
