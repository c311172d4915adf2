import { describe, expect, it } from 'vitest';
import { palette } from '$lib/palette';

/**
 * Contrast of the colours that screens put on each other, by the definition of WCAG 2.2 ("contrast ratio", "relative luminance",
 * https://www.w3.org/TR/WCAG22/): text needs 4.5 (success criterion 1.4.3 AA), a control's edge and a drawn line that carries meaning 3
 * (1.4.11 AA).
 */
type Theme = (typeof palette)['light' | 'dark'];
type Token = keyof Theme;

const TEXT = 4.5;
const GRAPHIC = 3;

const PAIRS: [foreground: Token, ground: Token, least: number][] = [
	...(['ink', 'ink-soft', 'river', 'moss', 'amber', 'coral'] as const).flatMap(
		(token): [Token, Token, number][] => [
			[token, 'paper', TEXT],
			[token, 'surface', TEXT]
		]
	),
	// Words on their own soft ground, on the chosen field and in the drawing's valley.
	['amber', 'amber-soft', TEXT],
	['moss', 'moss-soft', TEXT],
	['coral', 'coral-soft', TEXT],
	['ink', 'river-soft', TEXT],
	['ink-soft', 'river-soft', TEXT],
	['river', 'river-soft', TEXT],
	['ink', 'sand', TEXT],
	['ink-soft', 'sand', TEXT],
	// The button.
	['paper', 'river', TEXT],
	// Edges of fields, and lines of drawings.
	['line-strong', 'surface', GRAPHIC],
	['line-strong', 'paper', GRAPHIC],
	['river', 'sand', GRAPHIC],
	['coral', 'sand', GRAPHIC]
];

/** Relative luminance of `#rrggbb`, 0 for black to 1 for white. */
function luminance(colour: string): number {
	const [red, green, blue] = [1, 3, 5].map((start) => {
		const share = parseInt(colour.slice(start, start + 2), 16) / 255;
		return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4;
	});
	return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
}

function contrast(one: string, other: string): number {
	const [dark, light] = [luminance(one), luminance(other)].sort((a, b) => a - b);
	return (light + 0.05) / (dark + 0.05);
}

it('black on white is 21 to 1, and #767676 is the lightest grey that white text may stand on (WebAIM)', () => {
	expect(contrast('#000000', '#ffffff')).toBeCloseTo(21, 10);
	expect(contrast('#767676', '#ffffff')).toBeGreaterThan(4.5);
	expect(contrast('#777777', '#ffffff')).toBeLessThan(4.5);
});

describe.each(['light', 'dark'] as const)('in %s', (theme) => {
	it.each(PAIRS)('%s on %s has at least %d to 1', (foreground, ground, least) => {
		expect(contrast(palette[theme][foreground], palette[theme][ground])).toBeGreaterThanOrEqual(least);
	});
});

it('both themes have the same tokens', () => {
	expect(Object.keys(palette.dark)).toEqual(Object.keys(palette.light));
});
