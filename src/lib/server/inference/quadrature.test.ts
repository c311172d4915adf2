import { describe, expect, it } from 'vitest';
import { gaussHermite } from './quadrature';

describe('gaussHermite', () => {
	it('integrates every even power it promises: E[Z^2m] = (2m - 1)!!', () => {
		for (const size of [1, 2, 5, 15, 41]) {
			const { nodes, weights } = gaussHermite(size);
			let moment = 1;
			for (let m = 0; 2 * m < 2 * size && m <= 12; m++) {
				if (m > 0) moment *= 2 * m - 1;
				let sum = 0;
				for (let k = 0; k < size; k++) sum += weights[k] * nodes[k] ** (2 * m);
				expect(Math.abs(sum / moment - 1), `${size} nodes, power ${2 * m}`).toBeLessThan(1e-12);
			}
		}
	});

	it('has the nodes of the handbook', () => {
		// Abramowitz and Stegun, table 25.10, n = 5: zeros 0.958572464613819, 2.020182870456086 of H_5 and weights
		// 0.9453087204829, 0.3936193231522, 0.01995324205905 for e^(-x²); ours are √2 x and w / √π.
		const { nodes, weights } = gaussHermite(5);
		expect(nodes[3]).toBeCloseTo(Math.SQRT2 * 0.958572464613819, 13);
		expect(nodes[4]).toBeCloseTo(Math.SQRT2 * 2.020182870456086, 13);
		expect(weights[2]).toBeCloseTo(0.9453087204829 / Math.sqrt(Math.PI), 12);
		expect(weights[3]).toBeCloseTo(0.3936193231522 / Math.sqrt(Math.PI), 12);
		expect(weights[4]).toBeCloseTo(0.01995324205905 / Math.sqrt(Math.PI), 12);
	});
});
