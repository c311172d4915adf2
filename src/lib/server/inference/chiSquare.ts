import { logGamma } from './special';

/** Terms or steps after which a series that has not settled is given up; reached by none below a million. */
const MOST_STEPS = 100_000;
const SETTLED = 1e-16;

/** x^a e^-x / Gamma(a), the factor of both expansions. */
function gammaPower(a: number, x: number): number {
	return Math.exp(a * Math.log(x) - x - logGamma(a));
}

/** P(a, x) by its power series (Abramowitz and Stegun 6.5.29), for x < a + 1. */
function lowerBySeries(a: number, x: number): number {
	let term = 1 / a;
	let sum = term;
	for (let n = 1; n < MOST_STEPS && term > sum * SETTLED; n++) {
		term *= x / (a + n);
		sum += term;
	}
	return gammaPower(a, x) * sum;
}

/** Q(a, x) by the even part of its continued fraction (6.5.31), Lentz's method, for x >= a + 1. */
function upperByFraction(a: number, x: number): number {
	let b = x + 1 - a;
	let c = 1 / 1e-300;
	let d = 1 / b;
	let fraction = d;
	for (let n = 1; n < MOST_STEPS; n++) {
		const an = -n * (n - a);
		b += 2;
		d = 1 / (an * d + b);
		c = b + an / c;
		fraction *= c * d;
		if (Math.abs(c * d - 1) < 4 * SETTLED) break;
	}
	return gammaPower(a, x) * fraction;
}

/**
 * Upper tail of the chi-square distribution, P(X >= x) = Q(df/2, x/2), the regularised upper incomplete gamma function.
 * df > 0 (NaN otherwise); 1 for x <= 0, 0 at Infinity, NaN for NaN. Relative error below 1e-13 for df up to 100
 * (tests/reference/level.json, mpmath); far tails keep their digits. Example: chiSquareUpper(3.841458820694124, 1) = 0.05.
 */
export function chiSquareUpper(x: number, df: number): number {
	if (!(df > 0) || Number.isNaN(x)) return NaN;
	if (x <= 0) return 1;
	if (x === Infinity) return 0;
	const [a, half] = [df / 2, x / 2];
	return half < a + 1 ? 1 - lowerBySeries(a, half) : upperByFraction(a, half);
}
