import { pathRound } from 'd3';

/** The sign of a confluence: a ring in which two streams become one, so that its shape says what its colour says. */
export interface MeetingMark {
	x: number;
	y: number;
	radius: number;
	/** Path of the two streams inside the ring. */
	streams: string;
}

const round = (value: number) => Math.round(value * 100) / 100;

/**
 * @param x centre
 * @param y centre
 * @param radius of the ring, above 0
 */
export function layoutMeetingMark(x: number, y: number, radius: number): MeetingMark {
	const arm = radius * 0.5;
	const draw = pathRound(2);
	draw.moveTo(x - arm, y - arm);
	draw.lineTo(x, y);
	draw.lineTo(x + arm, y - arm);
	draw.moveTo(x, y);
	draw.lineTo(x, y + radius * 0.6);
	return { x: round(x), y: round(y), radius: round(radius), streams: draw.toString() };
}
