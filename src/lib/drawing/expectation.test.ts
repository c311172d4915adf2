import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { tableSequences } from '../../../tests/support/tableSequences';
import { drawing } from '$lib/strings/drawing';
import { heightFor, layoutExpectation, type ExpectationData, type ExpectationLayout } from './expectation';
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

/** A text's box in the drawing's units. */
interface Box {
	text: string;
	left: number;
	right: number;
	top: number;
	bottom: number;
}

const FONT_PX = 14;

/** Width of a text in Noto Sans, rather too wide than too narrow (widths of letters from memory of the font's metrics). */
function widthOf(text: string): number {
	const em = [...text].map((letter) =>
		/[mwMW%]/.test(letter) ? 0.95 : /[iljtfr., \u00a0]/.test(letter) ? 0.42 : 0.62
	);
	return FONT_PX * em.reduce((sum, each) => sum + each, 0);
}

/** Boxes of all words of a drawing, placed as RootPicture and RootRuler place them. */
function boxesOf({ notes, ruler, words }: ExpectationLayout, isolated: string | null = null): Box[] {
	const box = (text: string, x: number, baseline: number, end = false): Box => ({
		text,
		left: end ? x - widthOf(text) : x,
		right: end ? x : x + widthOf(text),
		top: baseline - FONT_PX * 0.78,
		bottom: baseline + FONT_PX * 0.25
	});
	const texts = drawing.expectation;
	const seen = notes.filter(({ opacity, sequences }) =>
		isolated === null ? opacity > 0 : sequences.includes(isolated)
	);
	return [
		...seen.flatMap(({ levelMm, range, x, y }) => {
			const lines = levelMm === null ? texts.levelNotPublished : texts.levelPublished(levelMm, range?.mm);
			return lines.map((text, i) => box(text, x, y + FONT_PX * (i * 1.15 - 0.15)));
		}),
		...(ruler
			? [
					...ruler.ticks.flatMap(({ label, y }) =>
						label === null ? [] : [box(label, ruler.x - 14, y + FONT_PX * 0.35, true)]
					),
					box(texts.rulerUnit, ruler.x + 2, ruler.top - FONT_PX * 0.8, true)
				]
			: []),
		...(words
			? [
					box(texts.orifices, words.x, words.orificesY + FONT_PX * 0.35),
					box(texts.rootEnd, words.rootEndX, words.rootEndY + FONT_PX * 0.35)
				]
			: [])
	];
}

const apart = (a: Box, b: Box) =>
	a.right <= b.left || b.right <= a.left || a.bottom <= b.top || b.bottom <= a.top;

/** Words that leave the drawing or lie on others. */
function faultsOf(layout: ExpectationLayout, isolated: string | null = null): string[] {
	const boxes = boxesOf(layout, isolated);
	const outside = boxes.filter(
		({ left, right, top, bottom }) => left < 0 || top < 0 || right > layout.width || bottom > layout.height
	);
	const overlaid = boxes.flatMap((a, i) =>
		boxes.slice(i + 1).flatMap((b) => (apart(a, b) ? [] : [`"${a.text}" on "${b.text}"`]))
	);
	return [...outside.map(({ text }) => `"${text}" outside`), ...overlaid];
}

/** From the shortest to the longest root of the table, and beyond. */
const anyLength = fc.double({ min: 6, max: 32, noNaN: true });

describe('the ruler at any size', () => {
	it('has a millimetre of the root for a millimetre, in any drawing of any root', () => {
		fc.assert(
			fc.property(
				fc.integer({ min: 240, max: 1600 }),
				fc.integer({ min: 200, max: 2400 }),
				anyLength,
				fc.double({ min: 0.3, max: 5, noNaN: true }),
				(width, height, rootLengthMm, levelMm) => {
					const sequences = [
						{ sequence: '1', probability: 0.5, joinLevelMm: null },
						{ sequence: '2-1', probability: 0.5, joinLevelMm: levelMm }
					];
					const layout = layoutExpectation(data({ sequences, rootLengthMm }), { width, height });
					const { ticks } = layout.ruler!;
					const mm = ticks[0].y - ticks[1].y;
					const steps = ticks.slice(1).map((tick, i) => ticks[i].y - tick.y);
					expect(Math.max(...steps.map((step) => Math.abs(step - mm)))).toBeLessThan(1e-6);
					const [, top, ...rest] = numbersOf(layout.streams[0].path);
					expect(Math.abs(rest[rest.length - 1] - top - rootLengthMm * mm)).toBeLessThan(0.02);
					expect(Math.abs(ticks[0].y - layout.meetings[0].y - levelMm * mm)).toBeLessThan(0.01);
				}
			),
			{ numRuns: 100 }
		);
	});

	it('is the same in two drawings of different roots side by side', () => {
		const scaleOf = (rootLengthMm: number) => {
			const height = heightFor(rootLengthMm, 21.4, 500);
			const { ticks } = layoutExpectation(data({ rootLengthMm }), { width: 372, height }).ruler!;
			return ticks[0].y - ticks[1].y;
		};
		expect(heightFor(21.4, 21.4, 500)).toBeCloseTo(500, 9);
		expect(scaleOf(9.3)).toBeCloseTo(scaleOf(21.4), 9);
	});
});

describe('the words of a drawing', () => {
	const tenth = (from: number, to: number) => fc.integer({ min: from * 10, max: to * 10 }).map((n) => n / 10);

	it('never lie on each other or leave the drawing, whatever the root', () => {
		const names = tableSequences();
		fc.assert(
			fc.property(
				fc.uniqueArray(fc.constantFrom(...names), { minLength: 1 }),
				anyLength,
				fc.option(tenth(0.5, 9.5), { nil: null }),
				fc.boolean(),
				(chosen, rootLengthMm, level, ranged) => {
					const sequences = chosen.map((sequence, i) => ({
						sequence,
						probability: i % 3 === 2 ? 0.001 : 1 / chosen.length,
						joinLevelMm: i % 2 === 0 ? level : null
					}));
					const joinRangeMm: [number, number] | null =
						ranged && level !== null ? [Math.max(0.5, level - 1), Math.min(9.5, level + 1)] : null;
					const layout = layoutExpectation(data({ sequences, rootLengthMm, joinRangeMm }), SIZE);
					expect([null, ...chosen].flatMap((sequence) => faultsOf(layout, sequence))).toEqual([]);
				}
			),
			{ numRuns: 100 }
		);
	});

	it('stay apart in the worst root: every sequence of the table, a range of levels near the root end', () => {
		const sequences = tableSequences().map((sequence, i) => ({
			sequence,
			probability: 0.05,
			joinLevelMm: i % 2 === 0 ? 0.5 : null
		}));
		for (const joinRangeMm of [null, [0.5, 4.5] as const])
			expect(faultsOf(layoutExpectation(data({ sequences, joinRangeMm, rootLengthMm: 9 }), SIZE))).toEqual(
				[]
			);
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
