import { pathRound } from 'd3';

/** The product's own sign: two streams that become one. */
interface RiverMarkLayout {
	size: number;
	/** Both streams and the one they become. */
	streams: string;
	meeting: { x: number; y: number; radius: number };
	strokeWidth: number;
}

/**
 * @param size side of the square the mark is drawn in, above 0
 */
export function layoutRiverMark(size: number): RiverMarkLayout {
	const at = (part: number) => Math.round(part * size * 1000) / 1000;
	const draw = pathRound(2);
	draw.moveTo(at(0.2), at(0.1));
	draw.bezierCurveTo(at(0.2), at(0.38), at(0.5), at(0.3), at(0.5), at(0.6));
	draw.moveTo(at(0.8), at(0.1));
	draw.bezierCurveTo(at(0.8), at(0.38), at(0.5), at(0.3), at(0.5), at(0.6));
	draw.lineTo(at(0.5), at(0.92));
	return {
		size,
		streams: draw.toString(),
		meeting: { x: at(0.5), y: at(0.57), radius: at(0.13) },
		strokeWidth: at(0.13)
	};
}
