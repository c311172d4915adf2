import { courseOf, runsPath } from './canalCourse';
import { layoutMeetingMark, type MeetingMark } from './meetingMark';
import { outlinePath, place, type RootFrame } from './rootShape';

/** A single sequence, small: a valley, its streams, its meetings. */
interface SequenceLayout {
	width: number;
	height: number;
	fill: string;
	path: string;
	meetings: MeetingMark[];
	strokeWidth: number;
}

/** High enough that canals which part below it are seen to part. */
const JOIN_HEIGHT = 0.4;

/**
 * One canal sequence as a small sign for tables, legends and findings. Not to scale; the last meeting sits a little above the apical third.
 *
 * @param sequence canal sequence such as `2-1-2`
 * @param size in units of the drawing
 * @throws what `parseSequence` throws for text that is no sequence
 */
export function layoutSequence(sequence: string, size: { width: number; height: number }): SequenceLayout {
	const { width, height } = size;
	const frame: RootFrame = {
		centre: width / 2,
		halfWidth: width / 2 - 1,
		widen: 1,
		yOf: (h) => height - 1 - h * (height - 2)
	};
	const course = courseOf(sequence, JOIN_HEIGHT);
	return {
		width,
		height,
		fill: `${outlinePath(frame)}Z`,
		path: runsPath(frame, course.runs),
		meetings: course.meetings.map((meeting) => layoutMeetingMark(...place(frame, meeting), width * 0.12)),
		strokeWidth: width * 0.08
	};
}
