/** How the one number of a look-up query may be read. */
import { positionOfIso, positionOfPalmer, positionOfUniversal, positions } from './numbers';
import type { NumberingSystem, Position } from './numbers';
import { teethById } from './teeth';
import type { Tooth, ToothKind } from './teeth';

/** A number read in one system. */
export interface NumberReading {
	matches: (position: Position) => boolean;
	why: string;
	/** True when a person who writes in the system picked or stated can mean nothing else by it. */
	certain: boolean;
	/** True when the number tells the side. */
	tellsSide: boolean;
}

/** What stands beside the number. */
export interface NumberContext {
	/** The system that the query itself names. */
	stated: NumberingSystem | undefined;
	/** The system that the person has picked. */
	picked: NumberingSystem;
	/** True beside an arch or a side. */
	hasQuadrantWord: boolean;
	/** The kind of tooth that the query names. */
	kind: ToothKind | undefined;
}

/**
 * The ways to read a number, the likeliest first; none when no tooth has that number.
 *
 * @param typed without white space: `16`, `#3`, `ur6`, `6┘`
 */
export function readNumber(typed: string, context: NumberContext): NumberReading[] {
	const { stated, picked, kind } = context;
	const palmer = positionOfPalmer(typed);
	if (palmer) return [placeReading(palmer, `Palmer ${palmer.palmer}`, true)];
	if (typed.startsWith('#')) return universalReading(typed.slice(1), true);
	const certain = (system: NumberingSystem) => (stated ?? picked) === system;
	const digit = /^[1-8]$/.test(typed) ? Number(typed) : null;
	const placed = context.hasQuadrantWord || kind !== undefined;
	const found: Record<NumberingSystem, NumberReading[]> = {
		iso: isoReading(typed, certain('iso')),
		// Beside an arch, a side or a kind ("upper right 6") a single digit is a place in the quadrant.
		universal: digit !== null && placed && !stated ? [] : universalReading(typed, certain('universal')),
		palmer: digit === null ? [] : digitReadings(digit, kind, placed)
	};
	if (stated) return found[stated];
	const others = (['iso', 'universal', 'palmer'] as const).filter((system) => system !== picked);
	return [picked, ...others].flatMap((system) => found[system]);
}

/** First, second or third of its kind; null for teeth that are not counted so. */
export function ordinalOf(tooth: Tooth): number | null {
	if (tooth.kind === 'molar') return tooth.place - 5;
	return tooth.kind === 'premolar' ? tooth.place - 3 : null;
}

/** The type of the tooth at a place. */
export function toothAt(position: Position): Tooth {
	const tooth = teethById.get(position.tooth);
	if (!tooth) throw new Error(`The tooth ${position.tooth} is not in the list of teeth.`);
	return tooth;
}

function placeReading(place: Position, why: string, certain: boolean): NumberReading {
	return { matches: (position) => position.iso === place.iso, why, certain, tellsSide: true };
}

function isoReading(typed: string, certain: boolean): NumberReading[] {
	const place = positionOfIso(typed);
	return place ? [placeReading(place, `ISO 3950 number ${typed}`, certain)] : [];
}

function universalReading(typed: string, certain: boolean): NumberReading[] {
	const place = positionOfUniversal(typed);
	return place ? [placeReading(place, `Universal number #${typed}`, certain)] : [];
}

/** A single digit as Palmer's place in the quadrant, or, of molars and premolars, as first, second, third. */
function digitReadings(digit: number, kind: ToothKind | undefined, placed: boolean): NumberReading[] {
	if ((kind === 'molar' || kind === 'premolar') && digit <= 3) {
		const matches = (position: Position) => ordinalOf(toothAt(position)) === digit;
		// Not certain: "premolar 2 canals" has the same digit.
		return [{ matches, why: `number ${digit} of its kind`, certain: false, tellsSide: false }];
	}
	if (placed) {
		const matches = (position: Position) => toothAt(position).place === digit;
		return [{ matches, why: `number ${digit} from the midline`, certain: true, tellsSide: false }];
	}
	return positions
		.filter((position) => position.palmer.endsWith(String(digit)))
		.map((position) => placeReading(position, `Palmer ${position.palmer}`, false));
}
