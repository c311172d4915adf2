import type { RootId, ToothId } from '$lib/anatomy/teeth';
import type { MeasurementDto } from '$lib/schemas/teeth';
import { measurementsOf } from './measurements';
import { LEVEL_QUANTITY } from './publishedLevel';

/** Where nothing at all is published, the drawing needs some length. Common practice, no source. */
const ASSUMED_LENGTH_MM = 13;

/** A length or level with the place it comes from; `source` null: assumed. */
interface Placed {
	mm: number;
	/** Published range in mm where the source gives no mean; then `mm` is its middle. */
	range: [number, number] | null;
	source: string | null;
	locator: string | null;
	/** False: recalled, not seen in the source. */
	verified: boolean;
}

/** What the drawing of a root needs beside its probabilities. */
export interface RootShape {
	length: Placed;
	/** Level of the confluence above the root end of canals that share an exit; null: not published for this root. */
	confluence: Placed | null;
}

/** Length of a root and level of its confluence, as published. */
export async function rootShapeOf(tooth: ToothId, root: RootId): Promise<RootShape> {
	const measured = await measurementsOf(tooth);
	const here = (quantity: string, roots: string[]) =>
		measured.filter((row) => row.quantity === quantity && roots.includes(row.root)).map(toPlaced);
	const lengths = [...here('root-length', [root]), ...here('root-length', ['whole', 'single'])].filter(
		(placed) => placed !== null
	);
	const length = lengths.find(({ verified }) => verified) ?? lengths[0];
	const confluence = here(LEVEL_QUANTITY, [root]).find((placed) => placed?.verified);
	return {
		length: length ?? { mm: ASSUMED_LENGTH_MM, range: null, source: null, locator: null, verified: false },
		confluence: confluence ?? null
	};
}

function toPlaced({ mean, min, max, source, locator, verified }: MeasurementDto): Placed | null {
	const range: [number, number] | null = min !== null && max !== null ? [min, max] : null;
	const mm = mean ?? (range && (range[0] + range[1]) / 2);
	if (mm === null) return null;
	return {
		mm,
		range: mean === null ? range : null,
		source,
		locator,
		verified
	};
}
