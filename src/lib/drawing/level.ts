import { line, scaleLinear } from 'd3';
import { courseOf, runsPath, sampleRun } from './canalCourse';
import { conePath, evenTrack, type Track } from './instruments';
import { layoutMeetingMark, type MeetingMark } from './meetingMark';
import { halfWidthAt, outlinePath, place, type RootFrame } from './rootShape';

/** What the drawing of a confluence's level shows; all in mm. */
export interface LevelPictureData {
	/** Level of the confluence above the common end, above 0, with its 95 % interval. */
	level: { mean: number; interval: readonly [number, number] };
	/** The level that each measurement alone speaks of. */
	measured: readonly number[];
	/** Length cut off the second cone's tip; null or 0: nothing is. */
	cut: number | null;
}

/** A tick of the ruler, in the shape that the ruler of a root draws. */
interface Tick {
	mm: number;
	y: number;
	length: number;
	label: string | null;
	across: [number, number] | null;
}

/** Words beside the drawing, with the line from what they speak of. */
interface Note {
	of: 'meeting' | 'cone' | 'cut';
	leader: string;
	x: number;
	y: number;
}

export interface LevelPictureLayout {
	width: number;
	height: number;
	root: { fill: string; outline: string };
	ruler: { x: number; top: number; bottom: number; ticks: Tick[] };
	/** The range of the level across the root, with its upper and lower edge. */
	band: { fill: string; edges: string };
	streams: string;
	strokeWidth: number;
	/** The second cone, from above the piece drawn down to where it ends. */
	cone: string;
	/** Outline of what is cut off the cone's tip, where it would have been; null where nothing is. */
	cutPiece: string | null;
	meeting: MeetingMark;
	/** Signs of the measured levels beside the ruler. */
	diamonds: string[];
	notes: Note[];
	words: { y: number; firstX: number; secondX: number; endX: number; endY: number };
}

const MARGIN = { left: 48, right: 112, top: 44, bottom: 34 };
/** mm of root drawn: at least, at most, and kept above all that has to be seen. */
const SHORTEST_MM = 7;
const LONGEST_MM = 14;
const ABOVE_MM = 2;
/** mm drawn below the common end at most, for the piece cut off a cone that reaches below it. */
const LONGEST_BELOW_MM = 3;
const LABEL_EVERY_MM = 2;
/** Least distance between two notes of two lines, in units of the drawing. */
const NOTE_GAP = 46;
const STROKE = 18;
const CONE = { head: 6.5, end: 5, tip: 2.5 };
const DIAMOND = 5.5;
/** y of the words above the canals, and where the second cone begins below them. */
const WORDS_Y = 16;
const CONE_FROM_Y = 24;
const draw = line().digits(2);

/** mm of root that show everything: the range, what was measured, and some of the canals above. */
function heightOf({ level, measured }: LevelPictureData): number {
	const top = Math.max(level.interval[1], ...measured.filter((one) => one <= LONGEST_MM - ABOVE_MM));
	return Math.min(LONGEST_MM, Math.max(SHORTEST_MM, Math.ceil(top + ABOVE_MM)));
}

function tickAt(mm: number, frame: RootFrame, height: number): Tick {
	const labelled = mm % LABEL_EVERY_MM === 0;
	const reach = halfWidthAt(mm / height) * frame.halfWidth;
	return {
		mm,
		y: frame.yOf(mm / height),
		length: labelled ? 10 : 5,
		label: labelled ? String(mm) : null,
		across: labelled && mm > 0 ? [frame.centre - reach, frame.centre + reach] : null
	};
}

/** The range of the level as an area between the root's sides. */
function bandOf(frame: RootFrame, interval: readonly [number, number], height: number) {
	const STEPS = 8;
	const [lower, upper] = interval.map((mm) => Math.min(1, Math.max(0, mm / height)));
	const heights = Array.from({ length: STEPS + 1 }, (_, i) => lower + ((upper - lower) * i) / STEPS);
	const side = (sign: number) =>
		heights.map((h) => place(frame, { height: h, lateral: sign * halfWidthAt(h) }));
	const [left, right] = [side(-1), side(1)];
	return {
		fill: `${draw([...left, ...[...right].reverse()]) ?? ''}Z`,
		edges: [0, STEPS].map((i) => draw([left[i], right[i]]) ?? '').join('')
	};
}

/** Notes from the top down, kept apart and above the lowest place they may take. */
function notesOf(anchors: { of: Note['of']; x: number; y: number }[], left: number, lowest: number): Note[] {
	let free = -Infinity;
	const placed = anchors.map((anchor) => {
		const y = Math.max(anchor.y, free);
		free = y + NOTE_GAP;
		return { ...anchor, at: y };
	});
	const over = Math.max(0, placed[placed.length - 1].at - lowest);
	return placed.map(({ of, x, y, at }) => ({
		of,
		leader:
			draw([
				[x, y],
				[left - 16, y],
				[left - 5, at - over]
			]) ?? '',
		x: left,
		y: at - over
	}));
}

/**
 * The last millimetres of two canals that join: where, how surely, where the second cone ends and what is cut off it.
 * Heights are to scale in mm above the common end; widths are schematic.
 *
 * @throws RangeError when the level is not a positive number
 */
export function layoutLevel(
	data: LevelPictureData,
	size: { width: number; height: number }
): LevelPictureLayout {
	const { mean, interval } = data.level;
	if (!(mean > 0) || !Number.isFinite(mean))
		throw new RangeError('A level is a positive number of millimetres.');
	const height = heightOf(data);
	const cut = data.cut ?? 0;
	const below = Math.min(LONGEST_BELOW_MM, Math.max(0, cut - mean));
	const y = scaleLinear([-below, height], [size.height - MARGIN.bottom, MARGIN.top]);
	const halfWidth = (size.width - MARGIN.left - MARGIN.right) / 2;
	const frame: RootFrame = {
		centre: MARGIN.left + halfWidth,
		halfWidth,
		yOf: (part) => y(part * height)
	};
	const course = courseOf('2-1', mean / height);
	// The left canal carries on to the end; the other ends where they meet.
	const second = course.runs[1].points;
	const [x, meetingY] = place(frame, second[second.length - 1]);
	const sampled: Track = sampleRun(frame, second, 40);
	const track = evenTrack([[sampled[0][0], CONE_FROM_Y], ...sampled], 4);
	track.push([x, meetingY]);
	const outline = outlinePath(frame);
	const left = size.width - MARGIN.right + 14;
	const cutEnd = y(Math.max(mean - cut, -below));
	const anchors: { of: Note['of']; x: number; y: number }[] = [
		{ of: 'meeting', x: x + 11, y: meetingY },
		{ of: 'cone', x: x + CONE.end, y: meetingY }
	];
	if (cut > 0) anchors.push({ of: 'cut', x: x + CONE.end + 3, y: (meetingY + cutEnd) / 2 });
	return {
		width: size.width,
		height: size.height,
		root: { fill: `${outline}Z`, outline },
		ruler: {
			x: MARGIN.left - 14,
			top: y(height),
			bottom: y(0),
			ticks: Array.from({ length: height + 1 }, (_, mm) => tickAt(mm, frame, height))
		},
		band: bandOf(frame, interval, height),
		streams: runsPath(frame, course.runs),
		strokeWidth: STROKE,
		cone: conePath(track, CONE.head, CONE.end),
		cutPiece:
			cut > 0
				? conePath(
						[
							[x, meetingY],
							[x, cutEnd]
						],
						CONE.end,
						CONE.tip
					)
				: null,
		meeting: layoutMeetingMark(x, meetingY, 10),
		diamonds: data.measured
			.filter((level) => level <= height)
			.map((level) => {
				const [cx, cy] = [MARGIN.left - 14 + 9, y(level)];
				const points: Track = [
					[cx, cy - DIAMOND],
					[cx + DIAMOND, cy],
					[cx, cy + DIAMOND],
					[cx - DIAMOND, cy]
				];
				return `${draw(points) ?? ''}Z`;
			}),
		notes: notesOf(anchors, left, y(0) - NOTE_GAP / 2),
		words: {
			y: WORDS_Y,
			firstX: place(frame, course.orifices[0])[0],
			secondX: place(frame, course.orifices[1])[0],
			endX: frame.centre + 34,
			endY: y(0) + 16
		}
	};
}
