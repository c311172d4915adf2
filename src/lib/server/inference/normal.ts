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

// M. J. Wichura, "Algorithm AS 241: the percentage points of the normal distribution",
// Appl. Stat. 37 (1988) 477-484, routine PPND16.
const A = [
	2509.0809287301226727, 33430.575583588128105, 67265.770927008700853, 45921.953931549871457,
	13731.693765509461125, 1971.5909503065514427, 133.14166789178437745, 3.387132872796366608
];
const B = [
	5226.495278852854561, 28729.085735721942674, 39307.89580009271061, 21213.794301586595867,
	5394.1960214247511077, 687.1870074920579083, 42.313330701600911252, 1
];
const C = [
	7.7454501427834140764e-4, 0.0227238449892691845833, 0.24178072517745061177, 1.27045825245236838258,
	3.64784832476320460504, 5.7694972214606914055, 4.6303378461565452959, 1.42343711074968357734
];
const D = [
	1.05075007164441684324e-9, 5.475938084995344946e-4, 0.0151986665636164571966, 0.14810397642748007459,
	0.68976733498510000455, 1.6763848301838038494, 2.05319162663775882187, 1
];
const E = [
	2.01033439929228813265e-7, 2.71155556874348757815e-5, 0.0012426609473880784386, 0.026532189526576123093,
	0.29656057182850489123, 1.7848265399172913358, 5.4637849111641143699, 6.6579046435011037772
];
const F = [
	2.04426310338993978564e-15, 1.4215117583164458887e-7, 1.8463183175100546818e-5, 7.868691311456132591e-4,
	0.0148753612908506148525, 0.13692988092273580531, 0.59983220655588793769, 1
];

/**
 * The x with Φ(x) = p. Relative error about 1e-15; -Infinity at 0, Infinity at 1, NaN outside [0, 1].
 * Example: normalQuantile(0.975) = 1.959963984540054.
 */
export function normalQuantile(p: number): number {
	if (!(p >= 0 && p <= 1)) return NaN;
	if (p === 0) return -Infinity;
	if (p === 1) return Infinity;
	const q = p - 0.5;
	if (Math.abs(q) <= 0.425) {
		const r = 0.180625 - q * q;
		return (q * polynomial(r, A)) / polynomial(r, B);
	}
	const r = Math.sqrt(-(q < 0 ? Math.log(p) : Math.log1p(-p)));
	const size =
		r <= 5 ? polynomial(r - 1.6, C) / polynomial(r - 1.6, D) : polynomial(r - 5, E) / polynomial(r - 5, F);
	return q < 0 ? -size : size;
}
