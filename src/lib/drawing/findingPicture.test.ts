import { describe, expect, it } from 'vitest';
import { TESTS } from '$lib/schemas/terms';
import { layoutFindingPicture } from './findingPicture';
import { evenTrack } from './instruments';
import { layoutRiverMark } from './riverMark';

const coordinates = (path: string) => [...path.matchAll(/[ML](-?[\d.]+),(-?[\d.]+)/g)];

describe('layoutFindingPicture', () => {
	const both = TESTS.flatMap((finding) => [[finding, 'positive'] as const, [finding, 'negative'] as const]);

	it.each(both)('draws %s, %s inside its picture, with a meeting where there is one', (finding, result) => {
		const layout = layoutFindingPicture(finding, result);
		expect(layout.meetings).toHaveLength(result === 'positive' ? 1 : 0);
		for (const { path } of layout.shapes) {
			expect(path).not.toMatch(/NaN|undefined|\.\d{4}/);
			for (const [, x, y] of coordinates(path)) {
				expect(Number(x)).toBeGreaterThanOrEqual(0);
				expect(Number(x)).toBeLessThanOrEqual(layout.width);
				expect(Number(y)).toBeGreaterThanOrEqual(0);
				expect(Number(y)).toBeLessThanOrEqual(layout.height);
			}
		}
	});

	it.each(TESTS)('draws a positive and a negative %s apart', (finding) => {
		const paths = (result: 'positive' | 'negative') =>
			layoutFindingPicture(finding, result).shapes.map(({ path }) => path);
		expect(paths('positive')).not.toEqual(paths('negative'));
	});

	it('puts the nick of the withdrawn cone as high as the meeting', () => {
		const { shapes, meetings } = layoutFindingPicture('cone-mark');
		const withdrawn = shapes.filter((shape) => shape.tone === 'cone')[1];
		const nick = coordinates(withdrawn.path)[2];
		expect(Number(nick[2])).toBeCloseTo(meetings[0].y, 1);
	});
});

describe('evenTrack', () => {
	it('spaces points evenly across corners', () => {
		const even = evenTrack(
			[
				[0, 0],
				[0, 3],
				[4, 3]
			],
			2
		);
		expect(even).toEqual([
			[0, 0],
			[0, 2],
			[1, 3],
			[3, 3]
		]);
	});
});

describe('layoutRiverMark', () => {
	it('is the same sign at any size', () => {
		expect(layoutRiverMark(100)).toEqual({
			size: 100,
			streams: 'M20,10C20,38,50,30,50,60M80,10C80,38,50,30,50,60L50,92',
			meeting: { x: 50, y: 57, radius: 13 },
			strokeWidth: 13
		});
	});
});
