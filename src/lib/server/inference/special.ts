/**
 * Special functions in double precision: logit scale, gamma and beta. Each is checked against mpmath
 * (tests/reference/special.json, made by tests/reference/special.py) to a few units in the last places.
 */

/** ln(p / (1 - p)) for p in [0, 1]; -Infinity at 0, Infinity at 1, NaN outside. */
export function logit(p: number): number {
	return Math.log(p) - Math.log1p(-p);
}

/** 1 / (1 + e^-x) for any x, without overflow and with full relative accuracy in both tails. */
export function expit(x: number): number {
	const e = Math.exp(-Math.abs(x));
	return x >= 0 ? 1 / (1 + e) : e / (1 + e);
}

const ONE_MINUS_EULER = 0.42278433509846713;
const HALF_LOG_TWO_PI = 0.9189385332046728;

/** (-1)^k (zeta(k) - 1) / k for k = 2 … 31, computed with mpmath 1.3.0 at 40 digits. */
const ZETA_TERMS = [
	0.3224670334241132, -0.0673523010531981, 0.020580808427784546, -0.007385551028673986, 0.0028905103307415234,
	-0.001192753911703261, 0.0005096695247430425, -0.00022315475845357939, 9.945751278180853e-5,
	-4.492623673813314e-5, 2.050721277567069e-5, -9.439488275268397e-6, 4.374866789907488e-6,
	-2.039215753801366e-6, 9.55141213040742e-7, -4.492469198764566e-7, 2.1207184805554665e-7,
	-1.0043224823968099e-7, 4.7698101693639804e-8, -2.2711094608943164e-8, 1.0838659214896955e-8,
	-5.183475041970047e-9, 2.4836745438024785e-9, -1.1921401405860912e-9, 5.731367241678862e-10,
	-2.7595228851242334e-10, 1.330476437424449e-10, -6.4229645638381e-11, 3.1044247747322276e-11,
	-1.5021384080754142e-11
];

/** ln Gamma(2 + z) for |z| <= 1/2: (1 - γ) z + Σ (-1)^k (ζ(k) - 1) z^k / k (Abramowitz and Stegun 6.1.33). */
function logGammaNearTwo(z: number): number {
	let sum = 0;
	for (let k = ZETA_TERMS.length - 1; k >= 0; k--) sum = (sum + ZETA_TERMS[k]) * z;
	return z * (ONE_MINUS_EULER + sum);
}

/** Stirling's remainder ln Gamma(x) - [(x - 1/2) ln x - x + ln(2π)/2] for x >= 10 (Abramowitz and Stegun 6.1.41). */
function stirlingRemainder(x: number): number {
	const r = 1 / (x * x);
	return (
		(1 / 12 -
			r * (1 / 360 - r * (1 / 1260 - r * (1 / 1680 - r * (1 / 1188 - r * (691 / 360360 - r * (1 / 156))))))) /
		x
	);
}

/**
 * ln Gamma(x) for x > 0; NaN for x <= 0 or NaN, Infinity at Infinity.
 * Power series about 2 (and 1), recurrence up to 10, Stirling's series beyond: relative error below 1e-15
 * also beside the zeros at 1 and 2. Example: logGamma(0.5) = ln(π)/2 = 0.5723649429247001.
 */
export function logGamma(x: number): number {
	if (!(x > 0)) return NaN;
	if (x === Infinity) return Infinity;
	if (x < 0.5) return logGamma(1 + x) - Math.log(x);
	if (x <= 1.5) return logGammaNearTwo(x - 1) - Math.log1p(x - 1);
	if (x < 10) {
		let product = 1;
		let rest = x;
		while (rest > 2.5) {
			rest -= 1;
			product *= rest;
		}
		return logGammaNearTwo(rest - 2) + Math.log(product);
	}
	return (x - 0.5) * Math.log(x) - x + HALF_LOG_TWO_PI + stirlingRemainder(x);
}

/**
 * ln B(a, b) = ln Gamma(a) + ln Gamma(b) - ln Gamma(a + b) for a, b > 0; NaN otherwise.
 * For large arguments the three Stirling forms are combined before they are evaluated, as in A. R. DiDonato
 * and A. H. Morris, ACM Trans. Math. Softw. 18 (1992) 360-373, so that nothing cancels.
 * Example: logBeta(2, 3) = -ln 12.
 */
export function logBeta(a: number, b: number): number {
	if (!(a > 0 && b > 0)) return NaN;
	const small = Math.min(a, b);
	const large = Math.max(a, b);
	if (large < 10) return logGamma(small) + (logGamma(large) - logGamma(small + large));
	const rest = (large - 0.5) * -Math.log1p(small / large);
	const remainder = stirlingRemainder(large) - stirlingRemainder(small + large);
	if (small < 10) return logGamma(small) + remainder + rest + small * (1 - Math.log(small + large));
	return (
		HALF_LOG_TWO_PI +
		stirlingRemainder(small) +
		remainder +
		rest +
		(small - 0.5) * -Math.log1p(large / small) -
		0.5 * Math.log(small + large)
	);
}

/** t - ln(1 + t) for t > -1, by its series where the difference would cancel. */
function logOneMinus(t: number): number {
	if (Math.abs(t) > 0.1) return t - Math.log1p(t);
	// With r = t / (2 + t), ln(1 + t) = 2 atanh(r) and t = 2r + r t: hence r t - 2 (r³/3 + r⁵/5 + …).
	const r = t / (2 + t);
	const rr = r * r;
	let sum = 0;
	for (let k = 17; k >= 3; k -= 2) sum = (sum + 1 / k) * rr;
	return r * (t - 2 * sum);
}

/** x^a (1 - x)^b / B(a, b) with x + y = 1 given as a pair, so that neither tail loses digits. */
function betaPower(x: number, y: number, a: number, b: number): number {
	if (Math.min(a, b) < 10) return Math.exp(a * Math.log(x) + b * Math.log(y) - logBeta(a, b));
	// Large parameters: measured from the mean, where the leading terms cancel algebraically
	// (C. Loader, "Fast and accurate computation of binomial probabilities", 2000).
	const sum = a + b;
	const d = x <= y ? x - a / sum : b / sum - y;
	const exponent = -a * logOneMinus((d * sum) / a) - b * logOneMinus((-d * sum) / b);
	const remainder = stirlingRemainder(sum) - stirlingRemainder(a) - stirlingRemainder(b);
	return Math.sqrt(((a / sum) * b) / (2 * Math.PI)) * Math.exp(exponent + remainder);
}

/**
 * I_x(a, b) by the continued fraction of Abramowitz and Stegun 26.5.8, for x left of (a + 1) / (a + b + 2),
 * evaluated by Lentz's method as modified by Thompson and Barnett; √max(a, b) terms, near enough.
 */
function betaFraction(x: number, y: number, a: number, b: number): number {
	const tiny = 1e-300;
	const term = (m: number) => {
		const k = m >> 1;
		return m % 2 === 0
			? (k * (b - k) * x) / ((a + 2 * k - 1) * (a + 2 * k))
			: (-(a + k) * (a + b + k) * x) / ((a + 2 * k) * (a + 2 * k + 1));
	};
	let c = 1;
	let d = 1 + term(1);
	d = 1 / (Math.abs(d) < tiny ? tiny : d);
	let fraction = d;
	for (let m = 2; m < 100_000; m++) {
		const t = term(m);
		d = 1 + t * d;
		d = 1 / (Math.abs(d) < tiny ? tiny : d);
		c = 1 + t / c;
		if (Math.abs(c) < tiny) c = tiny;
		fraction *= c * d;
		if (Math.abs(c * d - 1) < 3e-16) break;
	}
	return (betaPower(x, y, a, b) / a) * fraction;
}

/** [I_x(a, b), 1 - I_x(a, b)], each with its own relative accuracy. */
function betaTails(x: number, y: number, a: number, b: number): [number, number] {
	if (x < (a + 1) / (a + b + 2)) {
		const lower = betaFraction(x, y, a, b);
		return [lower, 1 - lower];
	}
	const upper = betaFraction(y, x, b, a);
	return [1 - upper, upper];
}

/**
 * Regularised incomplete beta I_x(a, b), the distribution function of Beta(a, b) at x.
 * a, b > 0 (NaN otherwise); 0 for x <= 0 and 1 for x >= 1. Relative error about 1e-14 for parameters up to
 * a thousand, 1e-12 up to ten million. Example: betaCdf(0.5, 2, 3) = 0.6875.
 */
export function betaCdf(x: number, a: number, b: number): number {
	if (!(a > 0 && b > 0) || Number.isNaN(x)) return NaN;
	if (x <= 0) return 0;
	if (x >= 1) return 1;
	return betaTails(x, 1 - x, a, b)[0];
}

/**
 * The x with I_x(a, b) = p: Newton's method on the logit of x, kept inside a bracket that shrinks.
 * a, b > 0 and p in [0, 1] (NaN otherwise); 0 at p = 0, 1 at p = 1; a quantile nearer to 0 or 1 than a double
 * can hold is returned as 0 or 1. Example: betaQuantile(0.975, 1, 20) = 1 - 0.025^(1/20) = 0.16843…
 */
export function betaQuantile(p: number, a: number, b: number): number {
	if (!(a > 0 && b > 0 && p >= 0 && p <= 1)) return NaN;
	if (p === 0 || p === 1) return p;
	let low = -740;
	let high = 740;
	// The mean is a fair start; for tiny shapes the leading power law p = x^a / (a B(a, b)) is.
	let t = Math.log(a / b);
	if (a < 1 || b < 1) {
		const fromZero = (Math.log(p) + Math.log(a) + logBeta(a, b)) / a;
		const fromOne = (Math.log1p(-p) + Math.log(b) + logBeta(a, b)) / b;
		if (fromZero < -2) t = fromZero;
		else if (fromOne < -2) t = -fromOne;
		t = Math.min(Math.max(t, low), high);
	}
	for (let step = 0; step < 200; step++) {
		const x = expit(t);
		const y = expit(-t);
		const [lower, upper] = betaTails(x, y, a, b);
		// The logarithm of the smaller tail is nearly straight in t far out, where p itself is flat.
		const useLower = p <= 0.5;
		const have = useLower ? lower : upper;
		const error = useLower ? Math.log(have) - Math.log(p) : Math.log1p(-p) - Math.log(have);
		if (error > 0) high = t;
		else low = t;
		// d I / d t = x^a (1 - x)^b / B(a, b), as dx/dt = x (1 - x).
		let next = t - (error * have) / betaPower(x, y, a, b);
		if (!(next > low && next < high)) next = (low + high) / 2;
		const change = Math.abs(next - t);
		t = next;
		if (change <= 1e-15 * Math.max(1, Math.abs(t)) || high - low < 1e-15 * Math.abs(t)) break;
	}
	return t <= -740 ? 0 : expit(t);
}

/**
 * E[s^a (1 - s)^b] for s ~ Beta(A, B) = B(A + a, B + b) / B(A, B); A, B > 0, a > -A, b > -B (else NaN).
 * Small whole powers, the common case, are a product of ratios and so exact to rounding.
 * Example: betaPowerMoment(2, 3, 1, 0) = 2/5.
 */
export function betaPowerMoment(A: number, B: number, a: number, b: number): number {
	if (!(A > 0 && B > 0 && A + a > 0 && B + b > 0)) return NaN;
	const whole = Number.isInteger(a) && Number.isInteger(b) && a >= 0 && b >= 0 && a + b <= 64;
	if (!whole) return Math.exp(logBeta(A + a, B + b) - logBeta(A, B));
	let product = 1;
	for (let i = 0; i < a; i++) product *= (A + i) / (A + B + i);
	for (let i = 0; i < b; i++) product *= (B + i) / (A + B + a + i);
	return product;
}
