/** The standard normal distribution in double precision. */

/** Σ c_i x^(n - i), Horner's scheme, highest power first. */
function polynomial(x: number, coefficients: readonly number[]): number {
	let sum = 0;
	for (const c of coefficients) sum = sum * x + c;
	return sum;
}

// Rational approximations of W. J. Cody, "Rational Chebyshev approximations for the error function",
// Math. Comp. 23 (1969) 631-637, in the form with the factors of the normal distribution taken in.
const CENTRE_TOP = [
	0.065682337918207449113, 2.2352520354606839287, 161.02823106855587881, 1067.6894854603709582,
	18154.981253343561249
];
const CENTRE_BOTTOM = [
	1, 47.20258190468824187, 976.09855173777669322, 10260.932208618978205, 45507.789335026729956
];
const MIDDLE_TOP = [
	1.0765576773720192317e-8, 0.39894151208813466764, 8.8831497943883759412, 93.506656132177855979,
	597.27027639480026226, 2494.5375852903726711, 6848.1904505362823326, 11602.651437647350124,
	9842.7148383839780218
];
const MIDDLE_BOTTOM = [
	1, 22.266688044328115691, 235.38790178262499861, 1519.377599407554805, 6485.558298266760755,
	18615.571640885098091, 34900.952721145977266, 38912.003286093271411, 19685.429676859990727
];
const TAIL_TOP = [
	0.02307344176494017303, 0.21589853405795699, 0.1274011611602473639, 0.022235277870649807,
	0.001421619193227893466, 2.9112874951168792e-5
];
const TAIL_BOTTOM = [
	1, 1.28426009614491121, 0.468238212480865118, 0.0659881378689285515, 0.00378239633202758244,
	7.29751555083966205e-5
];
const ONE_OVER_SQRT_TWO_PI = 0.3989422804014327;

/** e^(-y²/2) without losing the digits that squaring y drops (y >= 0). */
function gaussian(y: number): number {
	const whole = Math.trunc(y * 16) / 16;
	return Math.exp(-whole * whole * 0.5) * Math.exp(-(y - whole) * (y + whole) * 0.5);
}

/**
 * Φ(x), the probability that a standard normal variable is at most x. Relative error below 1e-15 in the centre
 * and the lower tail (down to x = -37.5, where it leaves the range of doubles); NaN for NaN.
 * For an upper tail use normalCdf(-x). Example: normalCdf(-1.959963984540054) = 0.025.
 */
export function normalCdf(x: number): number {
	const y = Math.abs(x);
	if (y <= 0.67448975) {
		const xx = x * x;
		return 0.5 + (x * polynomial(xx, CENTRE_TOP)) / polynomial(xx, CENTRE_BOTTOM);
	}
	let tail: number;
	if (y <= Math.sqrt(32)) {
		tail = (gaussian(y) * polynomial(y, MIDDLE_TOP)) / polynomial(y, MIDDLE_BOTTOM);
	} else if (y < 40) {
		const r = 1 / (y * y);
		const correction = (r * polynomial(r, TAIL_TOP)) / polynomial(r, TAIL_BOTTOM);
		tail = (gaussian(y) * (ONE_OVER_SQRT_TWO_PI - correction)) / y;
	} else if (Number.isNaN(x)) return NaN;
	else tail = 0;
	return x < 0 ? tail : 1 - tail;
}
