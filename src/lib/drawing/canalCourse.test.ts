import { LEAVES, describeSequence } from '$lib/anatomy/sequence';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { tableSequences } from '../../../tests/support/tableSequences';
import { courseOf, runsPath, sampleRun } from './canalCourse';
import { halfWidthAt, type RootFrame } from './rootShape';

const FRAME: RootFrame = { centre: 160, halfWidth: 115, yOf: (h) => 470 - 424 * h };
const heightOf = (y: number) => (470 - y) / 424;
const SAMPLES = 60;

/** Paths in a root of 100 by 100 with the last meeting at 0.3 of its length. */
const DRAWN: [string, string][] = [
	['1', 'M50,0C50,50,50,50,50,100'],
	['2', 'M30.5,0C30.5,49.62,44.15,49.62,44.15,99.24M69.5,0C69.5,49.62,55.85,49.62,55.85,99.24'],
	[
		'2-1',
		'M30.5,0C30.5,10,32.2,10,32.2,20C32.2,45,50,45,50,70C50,85,50,85,50,100M69.5,0C69.5,10,67.8,10,67.8,20C67.8,45,50,45,50,70'
	],
	[
		'2-1-2',
		'M30.5,0C30.5,10,32.2,10,32.2,20C32.2,45,50,45,50,70C50,77.5,50,77.5,50,85C50,91.75,45.87,91.75,45.87,98.5C45.87,99.06,45.87,99.06,45.87,99.62M50,85C50,91.75,54.13,91.75,54.13,98.5C54.13,99.06,54.13,99.06,54.13,99.62M69.5,0C69.5,10,67.8,10,67.8,20C67.8,45,50,45,50,70'
	],
	[
		'1-2-1',
		'M50,0C50,17.5,50,17.5,50,35C50,43.4,36.17,43.4,36.17,51.8C36.17,52.5,36.38,52.5,36.38,53.2C36.38,61.6,50,61.6,50,70C50,85,50,85,50,100M50,35C50,43.4,63.83,43.4,63.83,51.8C63.83,52.5,63.62,52.5,63.62,53.2C63.62,61.6,50,61.6,50,70'
	],
	[
		'1-2-1-2',
		'M50,0C50,17.5,50,17.5,50,35C50,43.4,36.17,43.4,36.17,51.8C36.17,52.5,36.38,52.5,36.38,53.2C36.38,61.6,50,61.6,50,70C50,77.5,50,77.5,50,85C50,91.75,45.87,91.75,45.87,98.5C45.87,99.06,45.87,99.06,45.87,99.62M50,85C50,91.75,54.13,91.75,54.13,98.5C54.13,99.06,54.13,99.06,54.13,99.62M50,35C50,43.4,63.83,43.4,63.83,51.8C63.83,52.5,63.62,52.5,63.62,53.2C63.62,61.6,50,61.6,50,70'
	],
	[
		'1-2',
		'M50,0C50,25,50,25,50,50C50,72.5,43.27,72.5,43.27,95C43.27,97.12,44.15,97.12,44.15,99.24M50,50C50,72.5,56.73,72.5,56.73,95C56.73,97.12,55.85,97.12,55.85,99.24'
	],
	['3', 'M24,0C24,49.33,42.2,49.33,42.2,98.66M50,0C50,50,50,50,50,100M76,0C76,49.33,57.8,49.33,57.8,98.66'],
	[
		'3-1',
		'M24,0C24,10,26.27,10,26.27,20C26.27,45,50,45,50,70C50,85,50,85,50,100M50,0C50,10,50,10,50,20C50,45,50,45,50,70M76,0C76,10,73.73,10,73.73,20C73.73,45,50,45,50,70'
	],
	[
		'3-2',
		'M24,0C24,10,26.27,10,26.27,20C26.27,45,39,45,39,70C39,84.62,44.15,84.62,44.15,99.24M76,0C76,10,73.73,10,73.73,20C73.73,45,61,45,61,70C61,84.62,55.85,84.62,55.85,99.24M50,0C50,10,50,10,50,20C50,45,39,45,39,70'
	],
	[
		'2-3',
		'M30.5,0C30.5,25,35.91,25,35.91,50C35.91,72.5,41.03,72.5,41.03,95C41.03,96.83,42.2,96.83,42.2,98.66M35.91,50C35.91,72.5,50,72.5,50,95C50,97.5,50,97.5,50,100M69.5,0C69.5,25,64.09,25,64.09,50C64.09,72.5,58.97,72.5,58.97,95C58.97,96.83,57.8,96.83,57.8,98.66'
	],
	[
		'2-1-2-1',
		'M30.5,0C30.5,1.17,30.66,1.17,30.66,2.33C30.66,12.83,50,12.83,50,23.33C50,35,50,35,50,46.67C50,52.27,37.08,52.27,37.08,57.87C37.08,58.33,37.22,58.33,37.22,58.8C37.22,64.4,50,64.4,50,70C50,85,50,85,50,100M69.5,0C69.5,1.17,69.34,1.17,69.34,2.33C69.34,12.83,50,12.83,50,23.33M50,46.67C50,52.27,62.92,52.27,62.92,57.87C62.92,58.33,62.78,58.33,62.78,58.8C62.78,64.4,50,64.4,50,70'
	],
	[
		'1-2-1-2-1',
		'M50,0C50,8.75,50,8.75,50,17.5C50,21.7,32.82,21.7,32.82,25.9C32.82,26.25,32.9,26.25,32.9,26.6C32.9,30.8,50,30.8,50,35C50,43.75,50,43.75,50,52.5C50,56.7,37.55,56.7,37.55,60.9C37.55,61.25,37.66,61.25,37.66,61.6C37.66,65.8,50,65.8,50,70C50,85,50,85,50,100M50,17.5C50,21.7,67.18,21.7,67.18,25.9C67.18,26.25,67.1,26.25,67.1,26.6C67.1,30.8,50,30.8,50,35M50,52.5C50,56.7,62.45,56.7,62.45,60.9C62.45,61.25,62.34,61.25,62.34,61.6C62.34,65.8,50,65.8,50,70'
	],
	[
		'1-3-2',
		'M50,0C50,17.5,50,17.5,50,35C50,43.4,31.56,43.4,31.56,51.8C31.56,52.5,31.84,52.5,31.84,53.2C31.84,61.6,39,61.6,39,70C39,84.62,44.15,84.62,44.15,99.24M50,35C50,43.4,68.44,43.4,68.44,51.8C68.44,52.5,68.16,52.5,68.16,53.2C68.16,61.6,61,61.6,61,70C61,84.62,55.85,84.62,55.85,99.24M50,35C50,43.4,50,43.4,50,51.8C50,52.5,50,52.5,50,53.2C50,61.6,39,61.6,39,70'
	],
	[
		'2-3-1',
		'M30.5,0C30.5,17.5,33.89,17.5,33.89,35C33.89,43.4,31.56,43.4,31.56,51.8C31.56,52.5,31.84,52.5,31.84,53.2C31.84,61.6,50,61.6,50,70C50,85,50,85,50,100M33.89,35C33.89,43.4,50,43.4,50,51.8C50,52.5,50,52.5,50,53.2C50,61.6,50,61.6,50,70M69.5,0C69.5,17.5,66.11,17.5,66.11,35C66.11,43.4,68.44,43.4,68.44,51.8C68.44,52.5,68.16,52.5,68.16,53.2C68.16,61.6,50,61.6,50,70'
	]
];

/** The cubic pieces of a path string, one list for each subpath: x and y of both ends and of the two points between. */
function cubics(path: string): number[][][] {
	return path
		.split('M')
		.slice(1)
		.map((subpath) => {
			const numbers = (subpath.match(/-?[\d.]+/g) ?? []).map(Number);
			return Array.from({ length: (numbers.length - 2) / 6 }, (_, i) => numbers.slice(6 * i, 6 * i + 8));
		});
}

/** Points along each subpath: the checks read what is drawn. */
function samplePath(path: string): [number, number][][] {
	return cubics(path).map((pieces) =>
		pieces.flatMap(([x0, y0, x1, y1, x2, y2, x3, y3], i) =>
			Array.from({ length: i === 0 ? SAMPLES + 1 : SAMPLES }, (_, k): [number, number] => {
				const t = (i === 0 ? k : k + 1) / SAMPLES;
				const [a, b, c, d] = [(1 - t) ** 3, 3 * t * (1 - t) ** 2, 3 * t * t * (1 - t), t ** 3];
				return [a * x0 + b * x1 + c * x2 + d * x3, a * y0 + b * y1 + c * y2 + d * y3];
			})
		)
	);
}

function xAt(points: [number, number][], y: number): number | null {
	const i = points.findIndex((point) => point[1] >= y);
	if (i < 0 || y < points[0][1]) return null;
	if (i === 0) return points[0][0];
	const [[x0, y0], [x1, y1]] = [points[i - 1], points[i]];
	return y1 === y0 ? x1 : x0 + ((x1 - x0) * (y - y0)) / (y1 - y0);
}

/** Pairs of streams that change sides anywhere; touching is no crossing. */
function crossings(streams: [number, number][][]): number {
	const TOUCH = 0.05;
	let found = 0;
	streams.forEach((a, i) =>
		streams.slice(i + 1).forEach((b) => {
			const sides = new Set<number>();
			for (const [, y] of [...a, ...b]) {
				const [xa, xb] = [xAt(a, y), xAt(b, y)];
				if (xa !== null && xb !== null && Math.abs(xa - xb) > TOUCH) sides.add(Math.sign(xa - xb));
			}
			if (sides.size > 1) found += 1;
		})
	);
	return found;
}

function farthestOutside(streams: [number, number][][]): number {
	// Path strings are rounded to 0.01, which counts for much where the outline turns flat at the root end.
	const overhang = streams.flat().map(([x, y]) => {
		return Math.abs(x - FRAME.centre) - halfWidthAt(heightOf(y - 0.01)) * FRAME.halfWidth;
	});
	return Math.max(...overhang);
}

const anySequence = fc
	.array(fc.integer({ min: 1, max: 5 }), { minLength: 1, maxLength: 6 })
	.map((counts) => counts.filter((count, i) => count !== counts[i - 1]).join('-'));
const anyLevel = fc.option(fc.double({ min: 0.01, max: 0.95, noNaN: true }));

describe('courseOf', () => {
	it.each([...new Set([...LEAVES, ...tableSequences()])])('draws %s as the sequence says', (sequence) => {
		const facts = describeSequence(sequence);
		const course = courseOf(sequence, null);
		expect(course.orifices).toHaveLength(facts.orifices);
		expect(course.exits).toHaveLength(facts.exits);
		expect(course.meetings.length > 0).toBe(facts.joins > 0);
		const streams = samplePath(runsPath(FRAME, course.runs));
		expect(crossings(streams)).toBe(0);
		expect(farthestOutside(streams)).toBeLessThan(0.02);
	});

	it('keeps canals in order and inside the root for any sequence and level', () => {
		fc.assert(
			fc.property(anySequence, anyLevel, (sequence, level) => {
				const streams = samplePath(runsPath(FRAME, courseOf(sequence, level).runs));
				expect(crossings(streams)).toBe(0);
				expect(farthestOutside(streams)).toBeLessThan(0.02);
			}),
			{ numRuns: 300 }
		);
	});

	it('has the canals of a level side by side: as many as the sequence says', () => {
		const streams = samplePath(runsPath(FRAME, courseOf('2-1-2', 0.3).runs));
		const distinctAt = (height: number) => {
			const xs = streams.map((s) => xAt(s, FRAME.yOf(height))).filter((x) => x !== null);
			return new Set(xs.map((x) => Math.round(x))).size;
		};
		expect([0.9, 0.28, 0.06].map(distinctAt)).toEqual([2, 1, 2]);
	});

	it('places the last meeting at its published level and says so', () => {
		const course = courseOf('3-2-1', 0.28);
		const last = course.meetings.filter((meeting) => meeting.last);
		expect(last.map((meeting) => meeting.height)).toEqual([0.28]);
		expect(course.runs.every((run) => !run.unpublished)).toBe(true);
	});

	it.each([null, 0, 1, 1.4, -0.2])('takes a level of %s as not published: apical third, dashed', (level) => {
		const course = courseOf('2-1', level);
		expect(course.meetings).toEqual([{ height: 1 / 3, lateral: 0, last: true }]);
		const dashed = course.runs.filter((run) => run.unpublished);
		expect(dashed).toHaveLength(2);
		for (const run of dashed) expect(run.points[run.points.length - 1].height).toBe(1 / 3);
	});

	it('spaces the steps evenly above the last meeting', () => {
		const heights = courseOf('3-2-1', 0.2).meetings.map((meeting) => meeting.height);
		expect(heights[0]).toBeCloseTo(0.6, 12);
		expect(heights[1]).toBeCloseTo(0.2, 12);
	});

	it('draws the half way to an unpublished level on the very curve of the whole', () => {
		const whole = samplePath(runsPath(FRAME, courseOf('2-1', 1 / 3).runs));
		const parts = courseOf('2-1', null).runs;
		for (const kind of [true, false]) {
			const drawn = samplePath(
				runsPath(
					FRAME,
					parts.filter((run) => run.unpublished === kind)
				)
			);
			expect(drawn.length).toBeGreaterThan(0);
			for (const [x, y] of drawn.flat()) {
				const distances = whole.map((run) => Math.abs((xAt(run, y) ?? Infinity) - x));
				expect(Math.min(...distances)).toBeLessThan(0.05);
			}
		}
	});

	it.each(LEAVES)('bends the canals of %s with vertical tangents at every point', (sequence) => {
		const pieces = cubics(runsPath(FRAME, courseOf(sequence, 0.3).runs)).flat();
		expect(pieces.length).toBeGreaterThan(0);
		for (const [x0, , x1, , x2, , x3] of pieces) expect([x1, x2]).toEqual([x0, x3]);
	});

	// Drawn once, looked at, kept: a change of these strings is a change of the product's signature picture.
	it.each(DRAWN)('draws %s as it was approved', (sequence, path) => {
		const frame: RootFrame = { centre: 50, halfWidth: 50, yOf: (h) => 100 - 100 * h };
		expect(runsPath(frame, courseOf(sequence, 0.3).runs)).toBe(path);
	});

	it('has approved drawings of every leaf and of every sequence of the table', () => {
		const approved = DRAWN.map(([sequence]) => sequence);
		expect([...LEAVES, ...tableSequences()].filter((sequence) => !approved.includes(sequence))).toEqual([]);
	});
});

describe('sampleRun', () => {
	it('follows the curve that is drawn', () => {
		const { runs } = courseOf('2-1', 0.3);
		const drawn = samplePath(runsPath(FRAME, runs));
		runs.forEach((run, i) => {
			sampleRun(FRAME, run.points, SAMPLES).forEach(([x, y], k) => {
				expect(x).toBeCloseTo(drawn[i][k][0], 1);
				expect(y).toBeCloseTo(drawn[i][k][1], 1);
			});
		});
	});
});
