import { curveCatmullRom, line } from 'd3';

/**
 * The drawn shape of a root, the same for every root: a valley that narrows to a rounded end. Dimensionless.
 * `height` is the height above the root end as a part of the root's length (0 = root end, 1 = level of the orifices);
 * `lateral` is the distance from the root's axis as a part of half its width at the orifices (-1..1).
 * The shape is schematic: only heights are to scale.
 */
export interface RootPoint {
	height: number;
	lateral: number;
}

/** Where a root of the drawing sits: its axis, its scales. All in units of the drawing. */
export interface RootFrame {
	/** x of the root's axis. */
	centre: number;
	/** Half the root's width at the orifices. */
	halfWidth: number;
	/** y of a height (part of the root's length). */
	yOf: (height: number) => number;
	/** Widens the root end of small signs so that their streams stay apart: 0 or absent, not at all; 1, to twice its width. */
	widen?: number;
}

/** Half width of the root end before it is rounded off. */
const END_HALF_WIDTH = 0.3;
/** Part of the length over which the root end is rounded. */
const ROUNDED_PART = 0.1;
/** Canals keep this far inside the root: the outermost tenths are dentine. */
const CANAL_SPREAD = 0.78;
const OUTLINE_STEPS = 10;
const BISECTIONS = 40;

function bodyHalfWidth(height: number): number {
	const opening = 0.5 * height + 0.5 * Math.sin((Math.PI / 2) * height);
	return END_HALF_WIDTH + (1 - END_HALF_WIDTH) * opening;
}

/**
 * Half width of the root at a height.
 *
 * @param height part of the root's length, 0..1 (values outside are taken as the nearest end)
 * @returns 0 at the root end, 1 at the orifices, growing with height
 */
export function halfWidthAt(height: number): number {
	const h = Math.min(1, Math.max(0, height));
	if (h >= ROUNDED_PART) return bodyHalfWidth(h);
	const left = 1 - h / ROUNDED_PART;
	return bodyHalfWidth(h) * Math.sqrt(1 - left * left);
}

/**
 * Lateral position of canal `index` of `count` at a height: evenly spread within the root's width there.
 *
 * @param count canals side by side, a whole number of at least 1
 * @param index 0 to count - 1, from left to right
 */
export function lateralOf(index: number, count: number, height: number): number {
	// Where the root end is rounded off it may be narrower than the canals would like.
	return slot(index, count) * Math.min(CANAL_SPREAD * bodyHalfWidth(height), halfWidthAt(height));
}

function slot(index: number, count: number): number {
	return (2 * index + 1) / count - 1;
}

/**
 * Where canal `index` of `count` reaches the root's surface: on the outline near the root end, at the root end itself
 * on the axis.
 *
 * @param above height of the canal's last bend; the exit lies below it
 */
export function exitOf(index: number, count: number, above: number): RootPoint {
	const lateral = slot(index, count) * Math.min(CANAL_SPREAD * END_HALF_WIDTH, halfWidthAt(above));
	return { height: surfaceHeight(lateral), lateral };
}

/** Height of the outline at a lateral position within the rounded end. */
function surfaceHeight(lateral: number): number {
	const target = Math.abs(lateral);
	let low = 0;
	let high = ROUNDED_PART;
	for (let i = 0; i < BISECTIONS; i++) {
		const middle = (low + high) / 2;
		if (halfWidthAt(middle) < target) low = middle;
		else high = middle;
	}
	return target === 0 ? 0 : high;
}

/** Heights of the outline, dense where the root end is rounded. */
function outlineHeights(): number[] {
	const rounded = Array.from(
		{ length: OUTLINE_STEPS },
		(_, i) => ROUNDED_PART * (1 - Math.cos(((Math.PI / 2) * i) / OUTLINE_STEPS))
	);
	const body = Array.from(
		{ length: OUTLINE_STEPS + 1 },
		(_, i) => ROUNDED_PART + ((1 - ROUNDED_PART) * i) / OUTLINE_STEPS
	);
	return [...rounded, ...body];
}

/**
 * The outline as a path, open at the top: down the left side, round the end, up the right side.
 *
 * @param inset 0 for the outline itself; above 0 a contour line that much nearer to the axis, which ends above the root end
 */
export function outlinePath(frame: RootFrame, inset = 0): string {
	const shrink = 1 - inset;
	const lift = inset * 0.5;
	const right = outlineHeights().map((h) => ({
		height: lift + h * (1 - lift),
		lateral: halfWidthAt(h) * shrink
	}));
	const left = right
		.slice(1)
		.reverse()
		.map(({ height, lateral }) => ({ height, lateral: -lateral }));
	const draw = line().curve(curveCatmullRom).digits(2);
	return draw([...left, ...right].map((point) => place(frame, point))) ?? '';
}

/** x and y of a point of the root in the drawing. */
export function place(frame: RootFrame, point: RootPoint): [number, number] {
	const widened = 1 + (frame.widen ?? 0) * Math.max(0, 1 - point.height);
	return [frame.centre + point.lateral * frame.halfWidth * widened, frame.yOf(point.height)];
}
