import { line, pathRound } from 'd3';
import { courseOf, runsPath, sampleRun } from './canalCourse';
import { arrowPath, conePath, evenTrack, filePath, handlePath, ovalPath, type Track } from './instruments';
import { layoutMeetingMark, type MeetingMark } from './meetingMark';
import { outlinePath, place, type RootFrame, type RootPoint } from './rootShape';

/** Findings that speak for or against a confluence; the ids of the interface. */
export type PicturedFinding =
	'cone-mark' | 'draw' | 'file-contact' | 'two-files' | 'angled-radiograph' | 'cbct-reading';

/** What the test showed: that the canals meet, or that they do not. */
type PicturedResult = 'positive' | 'negative';

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
	/** From above the orifice to the exit; the second to the meeting, where there is one. */
	left: Track;
	right: Track;
	meetings: MeetingMark[];
	/** Height of the meeting, or where it would have been. */
	meetingY: number;
}

const mark = ([x, y]: [number, number]) => layoutMeetingMark(x, y, 7);

/** Two canals, meeting or apart, drawn as streams or, pale, as canals that hold instruments. */
function sceneAt(centre: number, halfWidth: number, tone: 'stream' | 'canal', meet: boolean): Scene {
	const frame: RootFrame = { centre, halfWidth, yOf: (h) => END - h * (END - TOP) };
	const course = courseOf(meet ? '2-1' : '2', JOIN_HEIGHT);
	const standing = (points: RootPoint[]) => [{ ...points[0], height: 1.2 }, ...points];
	const [left, right] = course.runs;
	return {
		frame,
		valley: { tone: 'valley', path: `${outlinePath(frame)}Z` },
		streams: { tone, path: runsPath(frame, course.runs) },
		left: evenTrack(sampleRun(frame, standing(left.points), PIECES), SPACING),
		right: evenTrack(sampleRun(frame, standing(right.points), PIECES), SPACING),
		meetings: course.meetings.map((meeting) => mark(place(frame, meeting))),
		meetingY: frame.yOf(JOIN_HEIGHT)
	};
}

const handle = (track: Track): PictureShape => ({
	tone: 'handle',
	path: handlePath(track[0][0], track[0][1], 8, 9)
});
const segment = (...points: [number, number][]) => line().digits(2)(points) ?? '';

type Picture = Omit<FindingPictureLayout, 'width' | 'height'>;

function coneMark(meet: boolean): Picture {
	const { valley, streams, left, right, meetings, meetingY } = sceneAt(46, 34, 'canal', meet);
	// Beside the root the cone as it comes out, tip level with the root end: a nick is as high as the meeting.
	const out = { x: 102, head: 5.5, tip: 1.8, top: 18 };
	const half = (y: number) => out.tip + ((out.head - out.tip) * (END - y)) / (END - out.top);
	const nick: [number, number][] = [-3.5, 0, 3.5].map((dy) => [
		out.x - half(meetingY + dy) + (dy === 0 ? 3.2 : 0),
		meetingY + dy
	]);
	const taken = segment(
		[out.x - out.head, out.top],
		...(meet ? nick : []),
		[out.x - out.tip, END],
		[out.x + out.tip, END],
		[out.x + out.head, out.top]
	);
	const distance: PictureShape[] = [
		{ tone: 'guide', path: segment([(meetings[0]?.x ?? 0) + 9, meetingY], [out.x - 6, meetingY]) },
		{ tone: 'arrow', path: arrowPath([out.x + 11, meetingY + 10], [out.x + 11, meetingY + 1], 4) },
		{ tone: 'arrow', path: arrowPath([out.x + 11, END - 10], [out.x + 11, END], 4) }
	];
	return {
		shapes: [
			valley,
			streams,
			{ tone: 'cone', path: conePath([[left[0][0], left[0][1] - 14], ...left], 4.6, 1.6) },
			{ tone: 'tool', path: filePath(right.slice(0, -1), FLUTE) },
			handle(right),
			{ tone: 'cone', path: `${taken}Z` },
			...(meet ? distance : [])
		],
		meetings
	};
}

function draw(meet: boolean): Picture {
	const { valley, streams, left, right, meetings } = sceneAt(60, 36, 'stream', meet);
	const [leftX] = left[0];
	const [rightX] = right[0];
	const fallen = right.filter(([, y]) => y >= TOP && y <= TOP + 24);
	const fall: PictureShape[] = [
		{ tone: 'drained', path: segment(...fallen) },
		{ tone: 'arrow', path: arrowPath([rightX + 9, TOP + 2], [rightX + 9, TOP + 23], 6) }
	];
	return {
		shapes: [
			valley,
			streams,
			...(meet ? fall : []),
			{ tone: 'guide', path: segment([rightX - 9, TOP], [rightX + 13, TOP]) },
			{ tone: 'tool', path: segment([leftX, TOP + 12], [leftX, TOP - 10]) },
			{ tone: 'cone', path: handlePath(leftX, TOP - 9, 11, 18) },
			{ tone: 'handle', path: handlePath(leftX, TOP - 18, 11, 3) },
			{ tone: 'tool', path: segment([leftX, TOP - 21], [leftX, TOP - 34]) },
			{ tone: 'tool', path: segment([leftX - 5, TOP - 34], [leftX + 5, TOP - 34]) },
			{ tone: 'arrow', path: arrowPath([leftX - 14, TOP - 9], [leftX - 14, TOP - 31], 6) }
		],
		meetings
	};
}

function fileContact(meet: boolean): Picture {
	const { valley, streams, left, right, meetings } = sceneAt(48, 34, 'canal', meet);
	const meter = { x: 102, y: 56, radius: 11 };
	// The needle swings over where metal touches metal and lies low where it does not.
	const needle = meet ? [5, -5] : [-7, 2];
	const dial = pathRound(2);
	dial.arc(meter.x, meter.y, meter.radius, 0, 2 * Math.PI);
	dial.moveTo(meter.x, meter.y + 4);
	dial.lineTo(meter.x + needle[0], meter.y + needle[1]);
	const wire = pathRound(2);
	wire.moveTo(right[0][0] + 4, right[0][1] - 7);
	wire.bezierCurveTo(meter.x, right[0][1] - 7, meter.x, right[0][1] - 4, meter.x, meter.y - meter.radius);
	return {
		shapes: [
			valley,
			streams,
			{ tone: 'tool', path: filePath(left, FLUTE) },
			{ tone: 'tool', path: filePath(right, FLUTE) },
			handle(left),
			handle(right),
			{ tone: 'arrow', path: wire.toString() },
			{ tone: 'arrow', path: dial.toString() }
		],
		meetings
	};
}

function twoFiles(meet: boolean): Picture {
	const { valley, streams, left, right, meetings } = sceneAt(54, 36, 'canal', meet);
	// The second file stops where the first lies, so that its handle stands out by what it is short.
	const lift = meet ? 10 : 0;
	const second: Track = meet ? [[right[0][0], right[0][1] - lift], ...right.slice(0, -3)] : right;
	const [x, y] = left[0];
	const gaugeX = second[0][0] + 14;
	const short: PictureShape[] = [
		{ tone: 'guide', path: segment([second[0][0] + 6, y - lift], [gaugeX + 8, y - lift]) },
		{ tone: 'arrow', path: arrowPath([gaugeX, y + 9], [gaugeX, y + 1], 4) },
		{ tone: 'arrow', path: arrowPath([gaugeX, y - lift - 9], [gaugeX, y - lift - 1], 4) }
	];
	return {
		shapes: [
			valley,
			streams,
			{ tone: 'tool', path: filePath(left, FLUTE) },
			{ tone: 'tool', path: filePath(second, FLUTE) },
			handle(left),
			handle(second),
			{ tone: 'guide', path: segment([x - 10, y], [gaugeX + 8, y]) },
			...(meet ? short : [])
		],
		meetings
	};
}

function angledRadiograph(meet: boolean): Picture {
	const { valley, streams, meetings } = sceneAt(78, 26, 'stream', meet);
	const film = pathRound(2);
	film.rect(46, 28, 66, 90);
	const source = pathRound(2);
	source.arc(13, 20, 7, 0, 2 * Math.PI);
	return {
		shapes: [
			{ tone: 'film', path: film.toString() },
			valley,
			streams,
			{ tone: 'handle', path: source.toString() },
			{ tone: 'arrow', path: arrowPath([22, 23], [44, 37], 6) },
			{ tone: 'arrow', path: arrowPath([20, 28], [42, 60], 6) },
			{ tone: 'arrow', path: arrowPath([16, 30], [41, 84], 6) }
		],
		meetings
	};
}

function cbctReading(meet: boolean): Picture {
	const { frame, valley, streams, meetings } = sceneAt(38, 32, 'stream', meet);
	const levels = [0.84, 0.56, 0.28];
	const sectionX = 96;
	const sections = levels.flatMap((height, i): PictureShape[] => {
		const y = frame.yOf(height);
		const dots = pathRound(2);
		for (const x of meet && i === 2 ? [0] : [-6.5 + i * 1.5, 6.5 - i * 1.5]) {
			dots.moveTo(sectionX + x, y);
			dots.lineTo(sectionX + x + 0.01, y);
		}
		return [
			{ tone: 'guide', path: segment([4, y], [sectionX - 17 + i * 2, y]) },
			{ tone: 'valley', path: ovalPath(sectionX, y, 17 - i * 2, 9) },
			{ tone: 'stream', path: dots.toString() }
		];
	});
	return { shapes: [valley, streams, ...sections], meetings };
}

const PICTURES: Record<PicturedFinding, (meet: boolean) => Picture> = {
	'cone-mark': coneMark,
	draw,
	'file-contact': fileContact,
	'two-files': twoFiles,
	'angled-radiograph': angledRadiograph,
	'cbct-reading': cbctReading
};

/**
 * A small picture of what a result of a test means, in the language of the river chart. Not to scale. A positive one shows
 * canals that meet, a negative one canals that stay apart.
 */
export function layoutFindingPicture(
	finding: PicturedFinding,
	result: PicturedResult = 'positive'
): FindingPictureLayout {
	return { width: WIDTH, height: HEIGHT, ...PICTURES[finding](result === 'positive') };
}
