import { line } from 'd3';
import type { CanalCourse } from './canalCourse';
import { place, type RootFrame } from './rootShape';

/** What the notes speak of: the sequences with their levels, mm above the root end. */
interface NotedData {
	drawn: readonly { sequence: string; probability: number; joinLevelMm: number | null }[];
	joinRangeMm?: readonly [number, number] | null;
	rootLengthMm: number;
}

/** A level beside the drawing; `levelMm` null: the level is not published. */
export interface LevelNote {
	/** The sequences whose canals last meet here. */
	sequences: string[];
	/** 0 where all of them are too rare to draw: the note is for one that is shown alone. */
	opacity: 0 | 1;
	levelMm: number | null;
	/** The line from the meeting to the words. */
	leader: string;
	/** A bracket over the published range of levels; null where there is none. */
	range: { mm: readonly [number, number]; bracket: string } | null;
	x: number;
	y: number;
}

/** Least distance between two notes, in units of the drawing (two lines of words). */
const NOTE_GAP = 44;
/** Room for the word at the orifices above the first note, and for the second line of the last one. */
const NOTE_BELOW_ORIFICES = 30;
const NOTE_ABOVE_EDGE = 22;

/** A bracket beside the root, from the highest to the lowest published level. */
function rangeOf({ joinRangeMm, rootLengthMm }: NotedData, frame: RootFrame, x: number): LevelNote['range'] {
	if (!joinRangeMm) return null;
	const [bottom, top] = joinRangeMm.map((level) => frame.yOf(level / rootLengthMm));
	const bracket = line().digits(2)([
		[x - 5, top],
		[x, top],
		[x, bottom],
		[x - 5, bottom]
	]);
	return { mm: joinRangeMm, bracket: bracket ?? '' };
}

/** Where the canals of some sequences last meet. */
interface MeetingLevel {
	height: number;
	levelMm: number | null;
	/** The rightmost of the meetings, where the line to the words begins. */
	x: number;
	sequences: string[];
	drawn: boolean;
}

function levelsOf(
	data: NotedData,
	courses: readonly CanalCourse[],
	frame: RootFrame,
	shownFrom: number
): MeetingLevel[] {
	const levels = new Map<number, MeetingLevel>();
	courses.forEach((course, i) => {
		const { sequence, probability, joinLevelMm } = data.drawn[i];
		const published = course.runs.every((run) => !run.unpublished);
		for (const meeting of course.meetings.filter((m) => m.last)) {
			const [x] = place(frame, meeting);
			const known = levels.get(meeting.height);
			levels.set(meeting.height, {
				height: meeting.height,
				levelMm: published ? joinLevelMm : null,
				x: Math.max(x, known?.x ?? x),
				sequences: [...new Set([...(known?.sequences ?? []), sequence])],
				drawn: (known?.drawn ?? false) || probability >= shownFrom
			});
		}
	});
	return [...levels.values()].sort((a, b) => b.height - a.height);
}

/** Heights of the words of notes, from the top down: each at its level where there is room, none on another or outside. */
function spread(wanted: readonly number[], top: number, bottom: number): number[] {
	const down = wanted.reduce<number[]>(
		(placed, y, i) => [...placed, Math.max(y, i === 0 ? top : placed[i - 1] + NOTE_GAP)],
		[]
	);
	const lowest = down.map((_, i) => bottom - (down.length - 1 - i) * NOTE_GAP);
	return down.map((y, i) => Math.min(y, lowest[i]));
}

/**
 * One note for each level at which canals last meet, kept apart from each other and inside the drawing.
 *
 * @param courses those of `data.drawn`, in its order
 * @param room left edge of the words, height of the drawing, and the probability below which a stream is not drawn
 */
export function layoutNotes(
	data: NotedData,
	courses: readonly CanalCourse[],
	frame: RootFrame,
	room: { left: number; height: number; shownFrom: number }
): LevelNote[] {
	const { left } = room;
	const [top, bottom] = [frame.yOf(1) + NOTE_BELOW_ORIFICES, room.height - NOTE_ABOVE_EDGE];
	const levels = levelsOf(data, courses, frame, room.shownFrom);
	const drawn = levels.filter((level) => level.drawn);
	const kept = spread(
		drawn.map((level) => frame.yOf(level.height)),
		top,
		bottom
	);
	return levels.map((level) => {
		const { height, levelMm, x, sequences } = level;
		const from = frame.yOf(height);
		// A note that is only seen alone has all the room.
		const y = level.drawn ? kept[drawn.indexOf(level)] : spread([from], top, bottom)[0];
		const leader = line().digits(2)([
			[x + 10, from],
			[left - 18, from],
			[left - 5, y]
		]);
		return {
			sequences,
			opacity: level.drawn ? 1 : 0,
			levelMm,
			leader: leader ?? '',
			range: levelMm === null ? null : rangeOf(data, frame, left - 18),
			x: left,
			y
		};
	});
}
