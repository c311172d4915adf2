import { line, pathRound } from 'd3';
import { courseOf, runsPath, sampleRun } from './canalCourse';
import { arrowPath, conePath, evenTrack, filePath, handlePath, ovalPath, type Track } from './instruments';
import { layoutMeetingMark, type MeetingMark } from './meetingMark';
import { outlinePath, place, type RootFrame, type RootPoint } from './rootShape';

/** Findings that speak for or against a confluence; the ids of the interface. */
export type PicturedFinding =
	'cone-mark' | 'draw' | 'file-contact' | 'two-files' | 'angled-radiograph' | 'cbct-reading';

/** What a shape of a picture stands for; the component gives each its colour. */
export type PictureTone =
	'valley' | 'stream' | 'canal' | 'drained' | 'cone' | 'tool' | 'handle' | 'guide' | 'arrow' | 'film';

interface PictureShape {
	tone: PictureTone;
	path: string;
}

interface FindingPictureLayout {
	width: number;
	height: number;
	shapes: PictureShape[];
	meetings: MeetingMark[];
}

const WIDTH = 120;
const HEIGHT = 120;
const TOP = 36;
const END = 115;
const JOIN_HEIGHT = 0.36;
const PIECES = 24;
/** Distance between two points of an instrument; a flute of a file is one of them long. */
const SPACING = 2.6;
const FLUTE = 2.8;

interface Scene {
	frame: RootFrame;
	valley: PictureShape;
	streams: PictureShape;
	/** From above the orifice to the exit, and to the meeting. */
	leftToEnd: Track;
	rightToMeeting: Track;
	meeting: [number, number];
}

/** Two canals that meet, drawn as streams or, pale, as canals that hold instruments. */
function sceneAt(centre: number, halfWidth: number, tone: 'stream' | 'canal'): Scene {
	const frame: RootFrame = { centre, halfWidth, yOf: (h) => END - h * (END - TOP) };
	const course = courseOf('2-1', JOIN_HEIGHT);
	const standing = (points: RootPoint[]) => [{ ...points[0], height: 1.2 }, ...points];
	const [left, right] = course.runs;
	return {
		frame,
		valley: { tone: 'valley', path: `${outlinePath(frame)}Z` },
		streams: { tone, path: runsPath(frame, course.runs) },
		leftToEnd: evenTrack(sampleRun(frame, standing(left.points), PIECES), SPACING),
		rightToMeeting: evenTrack(sampleRun(frame, standing(right.points), PIECES), SPACING),
		meeting: place(frame, course.meetings[0])
	};
}

const mark = ([x, y]: [number, number]) => layoutMeetingMark(x, y, 7);
const handle = (track: Track): PictureShape => ({
	tone: 'handle',
	path: handlePath(track[0][0], track[0][1], 8, 9)
});
const segment = (...points: [number, number][]) => line().digits(2)(points) ?? '';

function coneMark(): Omit<FindingPictureLayout, 'width' | 'height'> {
	const scene = sceneAt(46, 34, 'canal');
	const cone = scene.leftToEnd;
	const file = scene.rightToMeeting;
	const [meetingX, meetingY] = scene.meeting;
	// Beside the root the cone as it comes out, tip level with the root end: its nick is as high as the meeting.
	const out = { x: 102, head: 5.5, tip: 1.8, top: 18 };
	const half = (y: number) => out.tip + ((out.head - out.tip) * (END - y)) / (END - out.top);
	const nick: [number, number][] = [-3.5, 0, 3.5].map((dy) => [
		out.x - half(meetingY + dy) + (dy === 0 ? 3.2 : 0),
		meetingY + dy
	]);
	const taken = segment(
		[out.x - out.head, out.top],
		...nick,
		[out.x - out.tip, END],
		[out.x + out.tip, END],
		[out.x + out.head, out.top]
	);
	return {
		shapes: [
			scene.valley,
			scene.streams,
			{ tone: 'cone', path: conePath([[cone[0][0], cone[0][1] - 14], ...cone], 4.6, 1.6) },
			{ tone: 'tool', path: filePath(file.slice(0, -1), FLUTE) },
			handle(file),
			{ tone: 'cone', path: `${taken}Z` },
			{ tone: 'guide', path: segment([meetingX + 9, meetingY], [out.x - 6, meetingY]) },
			{ tone: 'arrow', path: arrowPath([out.x + 11, meetingY + 10], [out.x + 11, meetingY + 1], 4) },
			{ tone: 'arrow', path: arrowPath([out.x + 11, END - 10], [out.x + 11, END], 4) }
		],
		meetings: [mark(scene.meeting)]
	};
}

function draw(): Omit<FindingPictureLayout, 'width' | 'height'> {
	const scene = sceneAt(60, 36, 'stream');
	const [leftX] = scene.leftToEnd[0];
	const [rightX] = scene.rightToMeeting[0];
	const fallen = scene.rightToMeeting.filter(([, y]) => y >= TOP && y <= TOP + 24);
	return {
		shapes: [
			scene.valley,
			scene.streams,
			{ tone: 'drained', path: segment(...fallen) },
			{ tone: 'guide', path: segment([rightX - 9, TOP], [rightX + 13, TOP]) },
			{ tone: 'arrow', path: arrowPath([rightX + 9, TOP + 2], [rightX + 9, TOP + 23], 6) },
			{ tone: 'tool', path: segment([leftX, TOP + 12], [leftX, TOP - 10]) },
			{ tone: 'cone', path: handlePath(leftX, TOP - 9, 11, 18) },
			{ tone: 'handle', path: handlePath(leftX, TOP - 18, 11, 3) },
			{ tone: 'tool', path: segment([leftX, TOP - 21], [leftX, TOP - 34]) },
			{ tone: 'tool', path: segment([leftX - 5, TOP - 34], [leftX + 5, TOP - 34]) },
			{ tone: 'arrow', path: arrowPath([leftX - 14, TOP - 9], [leftX - 14, TOP - 31], 6) }
		],
		meetings: [mark(scene.meeting)]
	};
}

function fileContact(): Omit<FindingPictureLayout, 'width' | 'height'> {
	const scene = sceneAt(48, 34, 'canal');
	const [left, right] = [scene.leftToEnd, scene.rightToMeeting];
	const meter = { x: 102, y: 56, radius: 11 };
	const dial = pathRound(2);
	dial.arc(meter.x, meter.y, meter.radius, 0, 2 * Math.PI);
	dial.moveTo(meter.x, meter.y + 4);
	dial.lineTo(meter.x + 5, meter.y - 5);
	const wire = pathRound(2);
	wire.moveTo(right[0][0] + 4, right[0][1] - 7);
	wire.bezierCurveTo(meter.x, right[0][1] - 7, meter.x, right[0][1] - 4, meter.x, meter.y - meter.radius);
	return {
		shapes: [
			scene.valley,
			scene.streams,
			{ tone: 'tool', path: filePath(left, FLUTE) },
			{ tone: 'tool', path: filePath(right, FLUTE) },
			handle(left),
			handle(right),
			{ tone: 'arrow', path: wire.toString() },
			{ tone: 'arrow', path: dial.toString() }
		],
		meetings: [mark(scene.meeting)]
	};
}

function twoFiles(): Omit<FindingPictureLayout, 'width' | 'height'> {
	const scene = sceneAt(54, 36, 'canal');
	const left = scene.leftToEnd;
	// The second file stops where the first lies, so that its handle stands out by what it is short.
	const lift = 10;
	const right = scene.rightToMeeting.slice(0, -3);
	const raised: Track = [[right[0][0], right[0][1] - lift], ...right];
	const [x, y] = left[0];
	const gaugeX = raised[0][0] + 14;
	return {
		shapes: [
			scene.valley,
			scene.streams,
			{ tone: 'tool', path: filePath(left, FLUTE) },
			{ tone: 'tool', path: filePath(raised, FLUTE) },
			handle(left),
			handle(raised),
			{ tone: 'guide', path: segment([x - 10, y], [gaugeX + 8, y]) },
			{ tone: 'guide', path: segment([raised[0][0] + 6, y - lift], [gaugeX + 8, y - lift]) },
			{ tone: 'arrow', path: arrowPath([gaugeX, y + 9], [gaugeX, y + 1], 4) },
			{ tone: 'arrow', path: arrowPath([gaugeX, y - lift - 9], [gaugeX, y - lift - 1], 4) }
		],
		meetings: [mark(scene.meeting)]
	};
}

function angledRadiograph(): Omit<FindingPictureLayout, 'width' | 'height'> {
	const scene = sceneAt(78, 26, 'stream');
	const film = pathRound(2);
	film.rect(46, 28, 66, 90);
	const source = pathRound(2);
	source.arc(13, 20, 7, 0, 2 * Math.PI);
	return {
		shapes: [
			{ tone: 'film', path: film.toString() },
			scene.valley,
			scene.streams,
			{ tone: 'handle', path: source.toString() },
			{ tone: 'arrow', path: arrowPath([22, 23], [44, 37], 6) },
			{ tone: 'arrow', path: arrowPath([20, 28], [42, 60], 6) },
			{ tone: 'arrow', path: arrowPath([16, 30], [41, 84], 6) }
		],
		meetings: [mark(scene.meeting)]
	};
}

function cbctReading(): Omit<FindingPictureLayout, 'width' | 'height'> {
	const scene = sceneAt(38, 32, 'stream');
	const levels = [0.84, 0.56, 0.28];
	const sectionX = 96;
	const shapes = levels.flatMap((height, i): PictureShape[] => {
		const y = scene.frame.yOf(height);
		const dots = pathRound(2);
		for (const x of i < 2 ? [-6.5 + i * 1.5, 6.5 - i * 1.5] : [0]) {
			dots.moveTo(sectionX + x, y);
			dots.lineTo(sectionX + x + 0.01, y);
		}
		return [
			{ tone: 'guide', path: segment([4, y], [sectionX - 17 + i * 2, y]) },
			{ tone: 'valley', path: ovalPath(sectionX, y, 17 - i * 2, 9) },
			{ tone: 'stream', path: dots.toString() }
		];
	});
	return { shapes: [scene.valley, scene.streams, ...shapes], meetings: [mark(scene.meeting)] };
}

const PICTURES: Record<PicturedFinding, () => Omit<FindingPictureLayout, 'width' | 'height'>> = {
	'cone-mark': coneMark,
	draw,
	'file-contact': fileContact,
	'two-files': twoFiles,
	'angled-radiograph': angledRadiograph,
	'cbct-reading': cbctReading
};

/**
 * A small picture of what a positive finding means, in the language of the river chart. Not to scale.
 */
export function layoutFindingPicture(finding: PicturedFinding): FindingPictureLayout {
	return { width: WIDTH, height: HEIGHT, ...PICTURES[finding]() };
}
