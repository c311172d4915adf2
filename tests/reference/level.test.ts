import { describe, expect, it } from 'vitest';
import { chiSquareUpper } from '../../src/lib/server/inference/chiSquare';
import { truncatedNormal } from '../../src/lib/server/inference/truncatedNormal';
import values from './level.json';

describe("the level's distributions against mpmath at 50 digits and more (level.py)", () => {
	it.each(values.chiSquareUpper)('chi-square above %d with %d degrees of freedom', (x, df, expected) => {
		expect(Math.abs(chiSquareUpper(x, df) / expected - 1)).toBeLessThan(1e-13);
	});

	it.each(values.truncatedNormal)(
		'normal (%d, %d²) truncated to 0 to %d',
		(m, s, upper, mean, sd, low, high) => {
			const truncated = truncatedNormal(m, s, upper);
			const found = [truncated.mean, truncated.quantile(0.025), truncated.quantile(0.975)];
			[mean, low, high].forEach((value, i) => expect(Math.abs(found[i] - value)).toBeLessThan(1e-12 * upper));
			expect(Math.abs(truncated.sd / sd - 1)).toBeLessThan(1e-10);
		}
	);
});
