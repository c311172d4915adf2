/** Standard normal quantile at 0.975, the two-sided 95 % point. */
const Z_95 = 1.959963984540054;

/**
 * Wilson's score interval of a proportion, without continuity correction, at 95 %:
 * (2np + z² ± z·sqrt(z² + 4npq)) / (2(n + z²)), p = events/total, q = 1 - p.
 * Source: Newcombe 1998, Statistics in Medicine 17:857-872, method 3; after Wilson 1927.
 *
 * @param events whole number, 0 to total
 * @param total whole number, at least 1
 * @throws RangeError outside that domain
 * @example wilsonInterval(81, 263) // [0.2553, 0.3662]
 */
export function wilsonInterval(events: number, total: number): [number, number] {
	if (!(total >= 1) || !(events >= 0) || events > total) {
		throw new RangeError('A proportion needs a total of at least 1 and 0 to total events.');
	}
	const z2 = Z_95 * Z_95;
	const p = events / total;
	const middle = 2 * events + z2;
	const spread = Z_95 * Math.sqrt(z2 + 4 * events * (1 - p));
	const bottom = 2 * (total + z2);
	// Exact ends: rounding would otherwise leave 1e-17 where the formula gives 0 or 1.
	return [events === 0 ? 0 : (middle - spread) / bottom, events === total ? 1 : (middle + spread) / bottom];
}
