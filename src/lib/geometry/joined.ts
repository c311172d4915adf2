/**
 * The second of two canals that share one exit: where its cone ends and how that cone is prepared.
 * Lengths in mm, diameters in mm, tapers in mm per mm. Symbols as the design writes them: J = level of the confluence
 * above the common end; WL₂ = working length of the second canal; D0, t = tip diameter and taper of its preparation;
 * C0, c = of its cone. Formulas follow from the definition of taper; worked values: tests/reference/geometry.json.
 */

/** A tapered shape, a preparation or a cone. */
interface TaperedShape {
	/** Diameter at the tip, mm: D0 or C0. */
	tip: number;
	/** Growth of the diameter, mm per mm: t or c. */
	taper: number;
	/** Height above the tip up to which the taper holds, mm; absent: not stated. */
	taperedLength?: number;
}

/** How far the second canal was shaped. */
type ShapedTo = 'confluence' | 'full' | 'unknown';

/** The tapered part of a gutta-percha cone, mm (common practice, no source). */
const USUAL_TAPERED_LENGTH_MM = 16;
/** Diameters nearer than this count as equal, mm: a thousandth of the smallest step between two sizes. */
const SAME_DIAMETER_MM = 1e-5;

/** What should be known of a proposed cut, each with its own sentence on screen. */
export type CutRemark =
	/** The cone is already thicker than the canal where it should end: it stops above the confluence. */
	| 'too-thick'
	/** The cone tapers more than the preparation: it may bind higher up. */
	| 'steeper-cone'
	/** The cut would take more than the cone's tapered part. */
	| 'cut-too-long'
	/** The preparation keeps its taper only to below the confluence: the diameter there is an extrapolation. */
	| 'beyond-taper'
	/** The sizes are not given: uncut holds for the cone that matches the preparation. */
	| 'if-matched';

/** How the second cone is prepared. */
interface SecondCone {
	/** Diameter of the second canal where its cone ends, mm; null where it cannot be said. */
	diameterAtConfluence: number | null;
	/** Length to cut off the cone's tip, mm, 0 or more; null: no cut is proposed, something must be asked first. */
	cutFromTip: number | null;
	remarks: CutRemark[];
}

/**
 * Length of the second canal's cone, WL₂ - J, mm.
 * @param workingLength WL₂, mm
 * @param level J, mm, 0 to WL₂
 * @returns 0 to WL₂. Example: secondLength(20.5, 3) = 17.5
 */
export function secondLength(workingLength: number, level: number): number {
	return workingLength - level;
}

/**
 * Diameter of a preparation at a height above its tip, D0 + t·h, mm. Example: 25/.06 at 3 mm: 0.25 + 0.06 · 3 = 0.43.
 */
function diameterAt({ tip, taper }: TaperedShape, height: number): number {
	return tip + taper * height;
}

/**
 * Diameter at the end of the second cone and the cut that fits the cone to it, k = (D - C0)/c.
 * Shaped to full WL₂: D = D0 + t·J. Shaped only to the confluence: the preparation's tip lies there, so D = D0, and
 * the matched cone goes uncut, with or without its sizes given. Not known: no cut. A cone whose tip is already thicker
 * than D is not cut, which would make it thicker still (k = 0, `too-thick`).
 * @param level J, mm, 0 or more
 * @param canal preparation of the second canal
 * @param cone its cone; a taper of 0 has no cut (null)
 */
export function secondCone(
	level: number,
	shapedTo: ShapedTo,
	canal?: TaperedShape,
	cone?: TaperedShape
): SecondCone {
	if (shapedTo === 'unknown') return { diameterAtConfluence: null, cutFromTip: null, remarks: [] };
	const height = shapedTo === 'full' ? level : 0;
	const diameter = canal ? diameterAt(canal, height) : null;
	const remarks: CutRemark[] = [];
	if (canal?.taperedLength !== undefined && height > canal.taperedLength) remarks.push('beyond-taper');
	if (!canal || !cone || diameter === null) {
		const uncut = shapedTo === 'confluence';
		if (uncut) remarks.push('if-matched');
		return { diameterAtConfluence: diameter, cutFromTip: uncut ? 0 : null, remarks };
	}
	const excess = diameter - cone.tip;
	if (excess < -SAME_DIAMETER_MM) remarks.push('too-thick');
	else if (cone.taper > canal.taper + SAME_DIAMETER_MM) remarks.push('steeper-cone');
	if (Math.abs(excess) <= SAME_DIAMETER_MM || excess < 0)
		return { diameterAtConfluence: diameter, cutFromTip: 0, remarks };
	if (!(cone.taper > 0)) return { diameterAtConfluence: diameter, cutFromTip: null, remarks };
	const cutFromTip = excess / cone.taper;
	if (cutFromTip > (cone.taperedLength ?? USUAL_TAPERED_LENGTH_MM)) remarks.push('cut-too-long');
	return { diameterAtConfluence: diameter, cutFromTip, remarks };
}
