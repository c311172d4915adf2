/** Tooth numbers of the 32 permanent teeth: ISO 3950 two-digit, Universal and Palmer. */
import { teeth } from './teeth';
import type { ToothId } from './teeth';

/** A way of numbering teeth. ISO 3950 is the product's default. */
export type NumberingSystem = 'iso' | 'universal' | 'palmer';

/** The patient's own right or left. */
export type Side = 'right' | 'left';

/** One of the 32 places. */
export interface Position {
	/** ISO 3950 two-digit number: `16`. */
	iso: string;
	tooth: ToothId;
	side: Side;
	/** Universal number, `1` (upper right third molar) to `32` (lower right third molar). */
	universal: string;
	/** Palmer in plain letters: `UR6`. */
	palmer: string;
	/** Palmer with the corner of its quadrant, seen facing the patient: `6┘`. */
	palmerBracket: string;
}

/** Quadrants of ISO 3950 in order. Palmer's corner points to where both midlines cross. */
const QUADRANTS: readonly {
	digit: string;
	letters: string;
	universal: (place: number) => number;
	bracket: (place: number) => string;
}[] = [
	{ digit: '1', letters: 'UR', universal: (place) => 9 - place, bracket: (place) => `${place}┘` },
	{ digit: '2', letters: 'UL', universal: (place) => 8 + place, bracket: (place) => `└${place}` },
	{ digit: '3', letters: 'LL', universal: (place) => 25 - place, bracket: (place) => `┌${place}` },
	{ digit: '4', letters: 'LR', universal: (place) => 24 + place, bracket: (place) => `${place}┐` }
];

/** The 32 places in the order of ISO 3950: 11 to 18, 21 to 28, 31 to 38, 41 to 48. */
export const positions: readonly Position[] = QUADRANTS.flatMap((quadrant) =>
	teeth
		.filter((tooth) => tooth.iso.some((iso) => iso[0] === quadrant.digit))
		.map((tooth) => ({
			iso: `${quadrant.digit}${tooth.place}`,
			tooth: tooth.id,
			side: tooth.iso[0][0] === quadrant.digit ? ('right' as const) : ('left' as const),
			universal: String(quadrant.universal(tooth.place)),
			palmer: `${quadrant.letters}${tooth.place}`,
			palmerBracket: quadrant.bracket(tooth.place)
		}))
);

const byIso = new Map(positions.map((position) => [position.iso, position]));
const byUniversal = new Map(positions.map((position) => [position.universal, position]));
const byPalmer = new Map(
	positions.flatMap((position) => [
		[position.palmer, position],
		[position.palmerBracket, position]
	])
);

/** The place with this ISO 3950 number, or undefined. */
export function positionOfIso(iso: string): Position | undefined {
	return byIso.get(iso);
}

/** The place with this Universal number, `1` to `32` without a sign, or undefined. */
export function positionOfUniversal(universal: string): Position | undefined {
	return byUniversal.get(universal);
}

/** The place with this Palmer number, in letters of either case (`ur6`) or with its corner (`6┘`), or undefined. */
export function positionOfPalmer(palmer: string): Position | undefined {
	return byPalmer.get(palmer.toUpperCase());
}

/**
 * A tooth's number as a person who picked that system reads it. Universal carries its `#`, because a bare `16` of
 * one system is another tooth in the other.
 *
 * @param iso ISO 3950 two-digit number of a permanent tooth
 * @throws RangeError when no permanent tooth has that number
 */
export function formatToothNumber(iso: string, system: NumberingSystem): string {
	const position = byIso.get(iso);
	if (!position) throw new RangeError(`No permanent tooth has the ISO 3950 number ${iso}.`);
	if (system === 'universal') return `#${position.universal}`;
	return system === 'palmer' ? position.palmer : position.iso;
}
