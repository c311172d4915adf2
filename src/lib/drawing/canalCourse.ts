import { parseSequence } from '$lib/anatomy/sequence';
import { pathRound } from 'd3';
import { exitOf, lateralOf, place, type RootFrame, type RootPoint } from './rootShape';

/** A stretch of one canal between orifice, meeting or parting, and exit; `unpublished` runs to a meeting whose level no source gives. */
interface CanalRun {
	points: RootPoint[];
	unpublished: boolean;
	/** `upper`: the last piece ends half way; `lower`: the only piece begins half way. Absent: drawn whole. */
	half?: 'upper' | 'lower';
}

/** A place where canals become one. */
interface Meeting extends RootPoint {
	/** True for the last step down of the sequence, the one a published level speaks of. */
	last: boolean;
}

/** The course of all canals of one sequence through a root. */
export interface CanalCourse {
	runs: CanalRun[];
	meetings: Meeting[];
	orifices: RootPoint[];
	exits: RootPoint[];
}

interface Step {
	from: number;
	to: number;
	height: number;
	/** How far above (a step down) or below (a step up) the canals bend. */
	reach: number;
}

/** A meeting without a published level is drawn where the apical third begins. */
const APICAL_THIRD = 1 / 3;
/** Bends longer than this part of the root would look like curved roots. */
const LONGEST_BEND = 0.5;
/** Part of the gap between two steps that a bend may take, alone or beside another bend. */
const GAP_ALONE = 0.9;
const GAP_SHARED = 0.48;

/** Heights of the steps: evenly spaced, with the last step down at `joinHeight`. */
function stepHeights(counts: readonly number[], joinHeight: number): { heights: number[]; lastJoin: number } {
	const steps = counts.length - 1;
	let lastJoin = -1;
	for (let i = 0; i < steps; i++) if (counts[i + 1] < counts[i]) lastJoin = i;
	const heights = Array.from({ length: steps }, (_, i) => {
		if (lastJoin < 0) return 1 - (i + 1) / (steps + 1);
		// Exactly, not by arithmetic: a published level stays the number it was.
		if (i === lastJoin) return joinHeight;
		if (i < lastJoin) return 1 - ((1 - joinHeight) * (i + 1)) / (lastJoin + 1);
		return joinHeight * (1 - (i - lastJoin) / (steps - lastJoin));
	});
	return { heights, lastJoin };
}

function stepsOf(counts: readonly number[], heights: number[]): Step[] {
	const isJoin = (i: number) => counts[i + 1] < counts[i];
	return heights.map((height, i) => {
		const join = isJoin(i);
		const neighbour = join ? i - 1 : i + 1;
		const inside = neighbour >= 0 && neighbour < heights.length;
		const edge = join ? 1 : 0;
		const gap = Math.abs(height - (inside ? heights[neighbour] : edge));
		const shared = inside && isJoin(neighbour) !== join;
		return {
			from: counts[i],
			to: counts[i + 1],
			height,
			reach: Math.min(LONGEST_BEND, gap * (shared ? GAP_SHARED : GAP_ALONE))
		};
	});
}

/** Canals `index` of `from` goes to this canal of `to` (from ≥ to): in order, so that none cross. */
function target(index: number, from: number, to: number): number {
	return Math.floor((index * to) / from);
}

/** Canals run together: the first of each group carries on, the others end where they meet. */
function stepDown(
	open: RootPoint[][],
	step: Step,
	closed: RootPoint[][],
	meetings: RootPoint[]
): RootPoint[][] {
	const next: RootPoint[][] = [];
	open.forEach((run, i) => {
		const to = target(i, step.from, step.to);
		const point = { height: step.height, lateral: lateralOf(to, step.to, step.height) };
		run.push(
			{ height: step.height + step.reach, lateral: lateralOf(i, step.from, step.height + step.reach) },
			point
		);
		if (next[to] === undefined) {
			next[to] = run;
			return;
		}
		closed.push(run);
		if (!meetings.some((m) => m.height === point.height && m.lateral === point.lateral)) meetings.push(point);
	});
	return next;
}

/** Canals part: the first branch carries on, the others begin where they part. */
function stepUp(open: RootPoint[][], step: Step): RootPoint[][] {
	const origins = open.map((run, i) => {
		const point = { height: step.height, lateral: lateralOf(i, step.from, step.height) };
		run.push(point);
		return { run, point, used: false };
	});
	const below = step.height - step.reach;
	return Array.from({ length: step.to }, (_, i) => {
		const origin = origins[target(i, step.to, step.from)];
		const run = origin.used ? [{ ...origin.point }] : origin.run;
		origin.used = true;
		run.push({ height: below, lateral: lateralOf(i, step.to, below) });
		return run;
	});
}

/** Cuts a run in two kinds where it bends towards a meeting whose level is not published. */
function cutRun(points: RootPoint[], unpublishedAt: number | null, meetings: RootPoint[]): CanalRun[] {
	const end = points.findIndex(
		(p) =>
			p.height === unpublishedAt && meetings.some((m) => m.height === p.height && m.lateral === p.lateral)
	);
	if (end < 1) return [{ points, unpublished: false }];
	const pieces: CanalRun[] = [
		{ points: points.slice(0, end + 1), unpublished: false, half: 'upper' },
		{ points: points.slice(end - 1, end + 1), unpublished: true, half: 'lower' },
		{ points: points.slice(end), unpublished: false }
	];
	return pieces.filter((piece) => piece.points.length > 1);
}

/**
 * The course of every canal of a sequence, from orifices (height 1) to exits (root end). Canals that run side by side
 * keep their order at every height, so none cross; steps are evenly spaced and the last step down lies at its level.
 *
 * @param sequence canal sequence such as `2-1`
 * @param joinHeight level of the last step down as a part of the root's length, inside 0..1; null or outside: not
 *   published, drawn at the apical third and marked so
 * @throws what `parseSequence` throws for text that is no sequence
 */
export function courseOf(sequence: string, joinHeight: number | null): CanalCourse {
	const counts = parseSequence(sequence);
	const published = joinHeight !== null && joinHeight > 0 && joinHeight < 1;
	const { heights, lastJoin } = stepHeights(counts, published ? joinHeight : APICAL_THIRD);
	const orifices = Array.from({ length: counts[0] }, (_, i) => ({
		height: 1,
		lateral: lateralOf(i, counts[0], 1)
	}));
	const closed: RootPoint[][] = [];
	const meetings: RootPoint[] = [];
	let open: RootPoint[][] = orifices.map((point) => [{ ...point }]);
	for (const step of stepsOf(counts, heights)) {
		open = step.to < step.from ? stepDown(open, step, closed, meetings) : stepUp(open, step);
	}
	const exits = open.map((run, i) => {
		const exit = exitOf(i, open.length, run[run.length - 1].height);
		run.push(exit);
		return exit;
	});
	const lastHeight = lastJoin < 0 ? null : heights[lastJoin];
	return {
		runs: [...open, ...closed].flatMap((run) => cutRun(run, published ? null : lastHeight, meetings)),
		meetings: meetings.map((m) => ({ ...m, last: m.height === lastHeight })),
		orifices,
		exits
	};
}

/**
 * The runs as one path, so that a stroke with opacity is painted once where runs overlap. Each piece is the cubic of
 * d3's curveBumpY (inner points at the middle height), so tangents are vertical at every orifice, bend, meeting and
 * exit; it is written out here because a curve of d3 cannot stop half way, where the dashes towards an unpublished
 * level begin.
 *
 * @returns '' for no run
 */
export function runsPath(frame: RootFrame, runs: CanalRun[]): string {
	const draw = pathRound(2);
	for (const { points, half } of runs) {
		const ends = points.map((point) => place(frame, point));
		if (half !== 'lower') draw.moveTo(...ends[0]);
		for (let i = 1; i < ends.length; i++) {
			const [[x0, y0], [x1, y1]] = [ends[i - 1], ends[i]];
			const [xm, ym] = [(x0 + x1) / 2, (y0 + y1) / 2];
			const [above, below] = [(y0 + 3 * ym) / 4, (y1 + 3 * ym) / 4];
			if (half === 'lower') {
				draw.moveTo(xm, ym);
				draw.bezierCurveTo((xm + x1) / 2, below, x1, (ym + y1) / 2, x1, y1);
			} else if (half === 'upper' && i === ends.length - 1) {
				draw.bezierCurveTo(x0, (y0 + ym) / 2, (x0 + xm) / 2, above, xm, ym);
			} else draw.bezierCurveTo(x0, ym, x1, ym, x1, y1);
		}
	}
	return draw.toString();
}

/**
 * Points along a run, the same curve as `runsPath` draws, from its upper end to its lower end.
 *
 * @param perPiece points for each piece between two of the run's own points, at least 1
 */
export function sampleRun(
	frame: RootFrame,
	points: readonly RootPoint[],
	perPiece: number
): [number, number][] {
	const ends = points.map((point) => place(frame, point));
	const samples: [number, number][] = [ends[0]];
	for (let i = 1; i < ends.length; i++) {
		const [[x0, y0], [x1, y1]] = [ends[i - 1], ends[i]];
		for (let k = 1; k <= perPiece; k++) {
			const s = k / perPiece;
			// Cubic Bézier whose inner points both lie at the middle height: d3's curveBumpY.
			samples.push([x0 + (x1 - x0) * s * s * (3 - 2 * s), y0 + (y1 - y0) * (1.5 * s * (1 - s) + s * s * s)]);
		}
	}
	return samples;
}
