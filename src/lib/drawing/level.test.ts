import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { layoutLevel, type LevelPictureData } from './level';

const SIZE = { width: 372, height: 440 };
const example: LevelPictureData = {
	level: { mean: 3, interval: [2, 4] },
	measured: [3],
	cut: 3
};
/** y of a height in mm, read off the ruler of the drawing. */
function rulerY(layout: ReturnType<typeof layoutLevel>, mm: number) {
	const { top, bottom, ticks } = layout.ruler;
	return bottom + ((top - bottom) * mm) / ticks[ticks.length - 1].mm;
}
const numbers = (path: string) => (path.match(/-?[\d.]+/g) ?? []).map(Number);
const ys = (path: string) => numbers(path).filter((_, i) => i % 2 === 1);

describe('layoutLevel', () => {
	const layout = layoutLevel(example, SIZE);

	it('places the meeting, the band and the diamonds by the ruler', () => {
		expect(layout.meeting.y).toBeCloseTo(rulerY(layout, 3), 1);
		expect(Math.min(...ys(layout.band.edges))).toBeCloseTo(rulerY(layout, 4), 1);
		expect(Math.max(...ys(layout.band.edges))).toBeCloseTo(rulerY(layout, 2), 1);
		const diamond = ys(layout.diamonds[0]);
		expect((Math.min(...diamond) + Math.max(...diamond)) / 2).toBeCloseTo(rulerY(layout, 3), 1);
	});

	it("ends the second cone at the meeting, and the matched cone's cut at the common end", () => {
		expect(Math.max(...ys(layout.cone))).toBeCloseTo(layout.meeting.y, 0);
		expect(Math.min(...ys(layout.cutPiece!))).toBeCloseTo(layout.meeting.y, 1);
		expect(Math.max(...ys(layout.cutPiece!))).toBeCloseTo(rulerY(layout, 0), 1);
	});

	it('leaves out the cut where nothing is cut', () => {
		for (const cut of [0, null]) {
			const uncut = layoutLevel({ ...example, cut }, SIZE);
			expect(uncut.cutPiece).toBeNull();
			expect(uncut.notes.map(({ of }) => of)).toEqual(['meeting', 'cone']);
		}
	});

	it('makes room below the common end for a cut longer than the level', () => {
		const long = layoutLevel({ ...example, cut: 4.75 }, SIZE);
		const tip = Math.max(...ys(long.cutPiece!));
		expect(tip).toBeCloseTo(rulerY(long, -1.75), 1);
		expect(tip).toBeLessThan(SIZE.height);
	});

	it('keeps everything inside, words apart, for any level', () => {
		const mm = (max: number) => fc.double({ min: 0, max, noNaN: true });
		fc.assert(
			fc.property(
				fc.double({ min: 1e-6, max: 12, noNaN: true }),
				mm(3),
				fc.array(mm(40), { maxLength: 4 }),
				fc.option(mm(40)),
				(mean, spread, measured, cut) => {
					const interval: [number, number] = [Math.max(0, mean - spread), Math.min(12, mean + spread)];
					const drawn = layoutLevel({ level: { mean, interval }, measured, cut }, SIZE);
					const paths = [drawn.band.fill, drawn.cone, drawn.cutPiece ?? '', drawn.streams, ...drawn.diamonds];
					for (const y of paths.flatMap(ys)) {
						expect(y).toBeGreaterThanOrEqual(-1);
						expect(y).toBeLessThanOrEqual(SIZE.height);
					}
					const places = drawn.notes.map(({ y }) => y);
					places.slice(1).forEach((y, i) => expect(y - places[i]).toBeGreaterThan(45.9));
					expect(places[0]).toBeGreaterThan(20);
					expect(places[places.length - 1]).toBeLessThan(SIZE.height - 20);
				}
			)
		);
	});

	it('refuses what is no level', () => {
		expect(() => layoutLevel({ ...example, level: { mean: 0, interval: [0, 1] } }, SIZE)).toThrow(RangeError);
		expect(() => layoutLevel({ ...example, level: { mean: NaN, interval: [0, 1] } }, SIZE)).toThrow(
			RangeError
		);
	});
});
