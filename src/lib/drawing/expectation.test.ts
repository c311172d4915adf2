import { describe, expect, it } from 'vitest';
import { layoutExpectation, type ExpectationData } from './expectation';
import { layoutSequence } from './sequenceGlyph';

const SIZE = { width: 372, height: 500 };

function data(change: Partial<ExpectationData> = {}): ExpectationData {
	return {
		sequences: [
			{ sequence: '1', probability: 0.4, joinLevelMm: null },
			{ sequence: '2-1', probability: 0.3, joinLevelMm: 3.5 },
			{ sequence: '2', probability: 0.25, joinLevelMm: null },
			{ sequence: '2-1-2', probability: 0.04, joinLevelMm: 3.5 },
			{ sequence: '1-2', probability: 0.008, joinLevelMm: null },
			{ sequence: '3', probability: 0.002, joinLevelMm: null }
		],
		rootLengthMm: 13,
		lengthStanding: 'published',
		...change
	};
}

const numbersOf = (path: string) => path.match(/-?[\d.]+/g)!.map(Number);

describe('layoutExpectation', () => {
	it.each([
		[{ width: 372, height: 500 }, 13],
		[{ width: 300, height: 400 }, 13],
		[{ width: 744, height: 1000 }, 21.4],
		[{ width: 372, height: 500 }, 9.3]
	])('draws 1 mm of the ruler as 1 mm of the root at %j, root of %d mm', (size, rootLengthMm) => {
		const layout = layoutExpectation(data({ rootLengthMm }), size);
		const ruler = layout.ruler!;
		const mm = (ruler.bottom - ruler.top) / rootLengthMm;
		expect(ruler.ticks).toHaveLength(Math.floor(rootLengthMm) + 1);
		for (const tick of ruler.ticks) expect(tick.y).toBeCloseTo(ruler.bottom - tick.mm * mm, 9);
		expect(ruler.ticks.filter((tick) => tick.label !== null).map((tick) => tick.mm)).toEqual(
			[0, 5, 10, 15, 20].filter((value) => value <= rootLengthMm)
		);
		// The same millimetre in the root: the canal `1` runs from the orifice to the root end, the meeting lies at 3.5 mm.
		const [, top, ...rest] = numbersOf(layout.streams[0].path);
		expect(rest[rest.length - 1] - top).toBeCloseTo(rootLengthMm * mm, 1);
		expect(layout.meetings[0].y).toBeCloseTo(ruler.bottom - 3.5 * mm, 1);
	});

	it('draws every stream as strong as it is probable, with a floor from 0.5 %', () => {
		const { streams } = layoutExpectation(data(), SIZE);
		expect(streams.map((stream) => stream.opacity)).toEqual([0.4, 0.3, 0.25, 0.08, 0.08, 0.002]);
	});

	it('gives meetings at one place one mark', () => {
		const { meetings } = layoutExpectation(data(), SIZE);
		expect(meetings).toHaveLength(1);
		expect(meetings[0].sequences).toEqual(['2-1', '2-1-2']);
		expect(meetings[0].opacity).toBeCloseTo(Math.sqrt(0.34), 12);
	});

	it('does not mark a meeting that is too rare to draw', () => {
		const sequences = [{ sequence: '2-1', probability: 0.004, joinLevelMm: 3 }];
		const layout = layoutExpectation(data({ sequences }), SIZE);
		expect(layout.meetings[0].opacity).toBe(0);
		// Kept for when the sequence is shown alone.
		expect(layout.notes.map(({ opacity, sequences: of }) => [opacity, of])).toEqual([[0, ['2-1']]]);
	});

	it('notes the published level at its height', () => {
		const { notes, ruler } = layoutExpectation(data(), SIZE);
		expect(notes).toHaveLength(1);
		expect(notes[0].levelMm).toBe(3.5);
		expect(notes[0].y).toBeCloseTo(ruler!.bottom - (3.5 * (ruler!.bottom - ruler!.top)) / 13, 9);
	});

	it('notes that a level is not published, with the way to the meeting dashed', () => {
		const sequences = [
			{ sequence: '2-1', probability: 0.5, joinLevelMm: null },
			{ sequence: '3-1', probability: 0.5, joinLevelMm: 3 }
		];
		const { notes, streams } = layoutExpectation(data({ sequences }), SIZE);
		expect(notes.map((note) => note.levelMm)).toEqual([null, 3]);
		expect(notes[1].y - notes[0].y).toBeGreaterThanOrEqual(44);
		expect(streams[0].dashedPath).toMatch(/^M/);
		expect(streams[1].dashedPath).toBe('');
	});

	it('leaves ruler and words out of a compact drawing', () => {
		const layout = layoutExpectation(data(), { width: 72, height: 120, compact: true });
		expect(layout).toMatchObject({ ruler: null, words: null, notes: [] });
		expect(layout.streams).toHaveLength(6);
	});

	it.each([0, -3, Number.NaN, Infinity])('refuses a root of %d mm', (rootLengthMm) => {
		expect(() => layoutExpectation(data({ rootLengthMm }), SIZE)).toThrow(RangeError);
	});

	it('draws nothing but the root without sequences', () => {
		const layout = layoutExpectation(data({ sequences: [] }), SIZE);
		expect(layout).toMatchObject({ streams: [], meetings: [], notes: [] });
		expect(layout.root.outline).toMatch(/^M/);
	});
});

describe('layoutSequence', () => {
	it('marks a meeting only where canals meet', () => {
		const size = { width: 32, height: 54 };
		expect(layoutSequence('2', size).meetings).toHaveLength(0);
		expect(layoutSequence('3-2', size).meetings).toHaveLength(1);
		expect(layoutSequence('1-2-1-2-1', size).meetings).toHaveLength(2);
	});
});
