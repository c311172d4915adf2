import { line, curveBasis, scaleLinear } from 'd3';
import { courseOf, runsPath, type CanalCourse } from './canalCourse';
import { layoutMeetingMark, type MeetingMark } from './meetingMark';
import { layoutNotes, type LevelNote } from './levelNotes';
import { halfWidthAt, outlinePath, place, type RootFrame } from './rootShape';

/** One sequence of a root with its probability (0..1) and the level where its canals last meet, mm above the root end. */
interface ExpectedSequence {
	sequence: string;
	probability: number;
	/** Null where no level is published. */
	joinLevelMm: number | null;
	/** 95 % interval of the probability, for the list beside the drawing. */
	interval?: readonly [number, number];
}

/** How the length of a root is known: published, recalled and not yet checked, or not at all. */
export type LengthStanding = 'published' | 'unverified' | 'assumed';

/** What the expectation drawing shows. */
export interface ExpectationData {
	sequences: readonly ExpectedSequence[];
	rootLengthMm: number;
	lengthStanding: LengthStanding;
	/** Sequences that samples name and that have no probability of their own: drawn only when shown alone. */
	alsoSeen?: readonly { sequence: string; joinLevelMm: number | null }[];
	/** Where the published level of the confluence is a range, mm, the levels given with the sequences being its middle. */
	joinRangeMm?: readonly [number, number] | null;
}

/** Size of a drawing in its own units; `compact` leaves out ruler and words, for tables and cards. */
interface DrawingSize {
	width: number;
	height: number;
	compact?: boolean;
}

export interface ExpectationStream {
	sequence: string;
	probability: number;
	/** Stroke opacity when no sequence is singled out. */
	opacity: number;
	path: string;
	/** The part towards a meeting whose level is not published; '' when there is none. */
	dashedPath: string;
}

interface ExpectationMeeting extends MeetingMark {
	sequences: string[];
	opacity: number;
}

interface RulerTick {
	mm: number;
	y: number;
	length: number;
	label: string | null;
	/** Left and right end of the line across the valley at this height; null between the labelled ones. */
	across: [number, number] | null;
}

export interface ExpectationLayout {
	width: number;
	height: number;
	root: { fill: string; outline: string; contours: string[] };
	chamber: { pool: string; ripples: string[] };
	ruler: { x: number; top: number; bottom: number; ticks: RulerTick[] } | null;
	streams: ExpectationStream[];
	meetings: ExpectationMeeting[];
	notes: LevelNote[];
	strokeWidth: number;
	/** Places for the words "orifices" and "root end"; null in a compact drawing. */
	words: { x: number; orificesY: number; rootEndX: number; rootEndY: number } | null;
}

/** Slope of the crown above the orifices, half widths per length of root: it carries on the root's own. */
const CROWN_FLARE = 0.35;
/** Below this probability a stream is left to vanish. */
const SHOWN_FROM = 0.005;
/** Streams from SHOWN_FROM on, and their meetings, are drawn at least this strong, so that a rare sequence is still seen. */
const FAINTEST_STREAM = 0.08;
const FAINTEST_MEETING = 0.35;
/** Half the width at the orifices as a part of the length: schematic, near the proportions of a molar root. */
const HALF_WIDTH_TO_LENGTH = 0.27;
const LABEL_EVERY_MM = 5;
const FULL = { left: 48, right: 116, top: 46, bottom: 30 };

/** All that is drawn: the sequences, then those that are seen only alone. */
interface DrawnData extends ExpectationData {
	drawn: readonly Omit<ExpectedSequence, 'interval'>[];
}

function streamOpacity(probability: number): number {
	if (probability < SHOWN_FROM) return Math.max(0, probability);
	return Math.min(1, Math.max(FAINTEST_STREAM, probability));
}

function frameOf(size: DrawingSize, lengthMm: number): { frame: RootFrame; y: (mm: number) => number } {
	const margin = size.compact
		? { left: 2, right: 2, top: size.height * 0.09, bottom: size.height * 0.03 }
		: FULL;
	const y = scaleLinear([0, lengthMm], [size.height - margin.bottom, margin.top]);
	const length = size.height - margin.bottom - margin.top;
	const room = (size.width - margin.left - margin.right) / 2;
	const halfWidth = Math.min(room, length * HALF_WIDTH_TO_LENGTH);
	return { frame: { centre: margin.left + room, halfWidth, yOf: (h) => y(h * lengthMm) }, y };
}

/**
 * Height of a drawing in which a root of this length is drawn to the scale of a longer one.
 *
 * @param longestMm length of the root whose drawing is `tallest` units high, mm
 * @returns so that a millimetre is as long in both drawings
 */
export function heightFor(lengthMm: number, longestMm: number, tallest: number): number {
	const margins = FULL.top + FULL.bottom;
	return margins + ((tallest - margins) * lengthMm) / longestMm;
}

/** The pulp chamber above the orifices: a pool in the valley's head. */
function chamberOf(frame: RootFrame, rise: number): ExpectationLayout['chamber'] {
	const floor = frame.yOf(1);
	const at = (part: number) => frame.centre + part * frame.halfWidth;
	const draw = line().curve(curveBasis).digits(2);
	const pool = draw([
		[at(-0.74), floor - rise * 0.8],
		[at(-0.72), floor - rise * 0.3],
		[at(-0.62), floor + 1],
		[at(-0.4), floor + 1],
		[at(0.4), floor + 1],
		[at(0.62), floor + 1],
		[at(0.72), floor - rise * 0.3],
		[at(0.74), floor - rise * 0.8]
	]);
	const ripple = (x: number, y: number, length: number) =>
		draw(
			[0, 1, 2, 3, 4].map((i): [number, number] => [x + (length * i) / 4, y + (i % 2 === 0 ? -1.5 : 1.5)])
		) ?? '';
	return {
		pool: `${pool ?? ''}Z`,
		ripples: [
			ripple(at(-0.42), floor - rise * 0.5, frame.halfWidth * 0.3),
			ripple(at(0.14), floor - rise * 0.34, frame.halfWidth * 0.3)
		]
	};
}

function rulerOf(frame: RootFrame, y: (mm: number) => number, lengthMm: number): ExpectationLayout['ruler'] {
	const x = FULL.left - 14;
	const ticks = Array.from({ length: Math.floor(lengthMm + 1e-9) + 1 }, (_, mm): RulerTick => {
		const labelled = mm % LABEL_EVERY_MM === 0;
		const reach = halfWidthAt(mm / lengthMm) * frame.halfWidth;
		return {
			mm,
			y: y(mm),
			length: labelled ? 10 : 5,
			label: labelled ? String(mm) : null,
			across: labelled && mm > 0 ? [frame.centre - reach, frame.centre + reach] : null
		};
	});
	return { x, top: y(lengthMm), bottom: y(0), ticks };
}

/**
 * Meetings of all sequences; those at one place share one mark, as strong as the square root of their probabilities
 * together: a mark is small, and where canals may meet has to be found at a glance.
 */
function meetingsOf(
	data: DrawnData,
	courses: CanalCourse[],
	frame: RootFrame,
	radius: number
): ExpectationMeeting[] {
	const marks = new Map<string, { mark: MeetingMark; sequences: string[]; probability: number }>();
	courses.forEach((course, i) => {
		const { sequence, probability } = data.drawn[i];
		for (const meeting of course.meetings) {
			const [x, y] = place(frame, meeting);
			const key = `${x.toFixed(1)} ${y.toFixed(1)}`;
			const known = marks.get(key) ?? {
				mark: layoutMeetingMark(x, y, radius),
				sequences: [],
				probability: 0
			};
			marks.set(key, {
				...known,
				sequences: [...known.sequences, sequence],
				probability: known.probability + probability
			});
		}
	});
	return [...marks.values()].map(({ mark, sequences, probability }) => ({
		...mark,
		sequences,
		opacity: probability < SHOWN_FROM ? 0 : Math.min(1, Math.max(FAINTEST_MEETING, Math.sqrt(probability)))
	}));
}

/**
 * The expectation drawing of one root: every sequence drawn over the others, as strong as it is probable, in a root
 * whose heights are to scale (1 mm of the ruler is 1 mm of the root; widths are schematic).
 *
 * @param given probabilities 0..1; lengths in mm; a level outside the root counts as not published
 * @throws RangeError when the root's length is not a positive number
 */
export function layoutExpectation(given: ExpectationData, size: DrawingSize): ExpectationLayout {
	const data: DrawnData = {
		...given,
		drawn: [...given.sequences, ...(given.alsoSeen ?? []).map((seen) => ({ ...seen, probability: 0 }))]
	};
	if (!(data.rootLengthMm > 0) || !Number.isFinite(data.rootLengthMm)) {
		throw new RangeError('The length of a root is a positive number of millimetres.');
	}
	const { frame, y } = frameOf(size, data.rootLengthMm);
	const courses = data.drawn.map(({ sequence, joinLevelMm }) =>
		courseOf(sequence, joinLevelMm === null ? null : joinLevelMm / data.rootLengthMm)
	);
	const outline = outlinePath(frame);
	const flare = 1 + (CROWN_FLARE * frame.yOf(1)) / (frame.yOf(0) - frame.yOf(1));
	const [left, right] = [-1, 1].map((side) => (frame.centre + side * flare * frame.halfWidth).toFixed(2));
	return {
		width: size.width,
		height: size.height,
		root: {
			fill: `${outline}L${right},0H${left}Z`,
			outline: `M${left},0${outline.replace('M', 'L')}L${right},0`,
			contours: size.compact ? [] : [0.14, 0.3].map((inset) => outlinePath(frame, inset))
		},
		chamber: chamberOf(frame, frame.yOf(1)),
		ruler: size.compact ? null : rulerOf(frame, y, data.rootLengthMm),
		streams: data.drawn.map(({ sequence, probability }, i) => ({
			sequence,
			probability,
			opacity: streamOpacity(probability),
			path: runsPath(
				frame,
				courses[i].runs.filter((run) => !run.unpublished)
			),
			dashedPath: runsPath(
				frame,
				courses[i].runs.filter((run) => run.unpublished)
			)
		})),
		meetings: meetingsOf(data, courses, frame, size.compact ? Math.max(2.5, size.width * 0.07) : 8),
		notes: size.compact
			? []
			: layoutNotes(data, courses, frame, {
					left: size.width - FULL.right + 10,
					height: size.height,
					shownFrom: SHOWN_FROM
				}),
		strokeWidth: size.compact ? Math.max(1.5, size.width * 0.045) : 7,
		words: size.compact
			? null
			: {
					x: frame.centre + frame.halfWidth + 12,
					orificesY: frame.yOf(1),
					rootEndX: frame.centre + 40,
					rootEndY: frame.yOf(0)
				}
	};
}
