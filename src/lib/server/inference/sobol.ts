/**
 * The unscrambled Sobol sequence, for the intervals of the estimator: the same points every time.
 * Source of the directions: S. Joe and F. Y. Kuo, "Constructing Sobol sequences with better two-dimensional
 * projections", SIAM J. Sci. Comput. 30 (2008) 2635-2654, file new-joe-kuo-6.21201, its first dimensions.
 */

/** Points of one interval estimate: 2^12. */
const SOBOL_BITS = 12;
export const SOBOL_POINTS = 1 << SOBOL_BITS;

/** Degree s, coefficients a and initial numbers m of dimensions 2, 3, … (the first dimension needs none). */
const DIRECTIONS: { s: number; a: number; m: number[] }[] = [
	{ s: 1, a: 0, m: [1] },
	{ s: 2, a: 1, m: [1, 3] },
	{ s: 3, a: 1, m: [1, 3, 1] },
	{ s: 3, a: 2, m: [1, 1, 1] },
	{ s: 4, a: 1, m: [1, 1, 3, 3] },
	{ s: 4, a: 4, m: [1, 3, 5, 13] },
	{ s: 5, a: 2, m: [1, 1, 5, 5, 17] },
	{ s: 5, a: 4, m: [1, 1, 5, 5, 5] },
	{ s: 5, a: 7, m: [1, 1, 7, 11, 19] },
	{ s: 5, a: 11, m: [1, 1, 5, 1, 1] },
	{ s: 5, a: 13, m: [1, 1, 1, 3, 11] },
	{ s: 5, a: 14, m: [1, 3, 5, 5, 31] },
	{ s: 6, a: 1, m: [1, 3, 3, 9, 7, 49] },
	{ s: 6, a: 13, m: [1, 1, 1, 15, 21, 21] },
	{ s: 6, a: 16, m: [1, 3, 1, 13, 27, 49] },
	{ s: 6, a: 19, m: [1, 1, 1, 15, 7, 5] },
	{ s: 6, a: 22, m: [1, 3, 1, 15, 13, 25] },
	{ s: 6, a: 25, m: [1, 1, 5, 5, 19, 61] },
	{ s: 7, a: 1, m: [1, 3, 7, 11, 23, 15, 103] },
	{ s: 7, a: 4, m: [1, 3, 7, 13, 13, 15, 69] },
	{ s: 7, a: 7, m: [1, 1, 3, 13, 7, 35, 63] },
	{ s: 7, a: 8, m: [1, 3, 5, 9, 1, 25, 53] },
	{ s: 7, a: 14, m: [1, 3, 1, 13, 9, 35, 107] }
];
/** Dimensions there are directions for. */
const SOBOL_DIMENSIONS = DIRECTIONS.length + 1;

/** Direction numbers v_1 … v_12 of one dimension (0-based), as whole multiples of 2^-12. */
function directionNumbers(dimension: number): number[] {
	const m: number[] = [];
	if (dimension === 0) {
		for (let i = 0; i < SOBOL_BITS; i++) m.push(1);
	} else {
		const { s, a, m: initial } = DIRECTIONS[dimension - 1];
		m.push(...initial);
		for (let i = s; i < SOBOL_BITS; i++) {
			let next = m[i - s] ^ (m[i - s] << s);
			for (let k = 1; k < s; k++) if ((a >> (s - 1 - k)) & 1) next ^= m[i - k] << k;
			m.push(next);
		}
	}
	return m.slice(0, SOBOL_BITS).map((value, i) => value << (SOBOL_BITS - 1 - i));
}

/** One coordinate of the 4,096 points, in Gray-code order. */
function coordinate(dimension: number): Uint16Array {
	const v = directionNumbers(dimension);
	const out = new Uint16Array(SOBOL_POINTS);
	let x = 0;
	for (let i = 1; i < SOBOL_POINTS; i++) {
		// The bit that the Gray code flips between points i - 1 and i is the lowest zero bit of i - 1.
		x ^= v[31 - Math.clz32(i & -i)];
		out[i] = x;
	}
	return out;
}

const coordinates = new Map<number, Uint16Array>();

/**
 * One coordinate of the first 4,096 points of the Sobol sequence, as whole numbers n in 0 … 4095: the point
 * itself is n / 4096, and with the offset that keeps it off the edge (n + 0.5) / 4096. Each n occurs once.
 * @param dimension 0-based, below 24
 * @throws RangeError for a dimension without directions
 */
export function sobolCoordinate(dimension: number): Uint16Array {
	if (!Number.isInteger(dimension) || dimension < 0 || dimension >= SOBOL_DIMENSIONS) {
		throw new RangeError(`Sobol dimension ${dimension} is not in 0 … ${SOBOL_DIMENSIONS - 1}`);
	}
	const known = coordinates.get(dimension);
	if (known) return known;
	const made = coordinate(dimension);
	coordinates.set(dimension, made);
	return made;
}
