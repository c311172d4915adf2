/** Nodes and weights of a quadrature rule. */
interface Rule {
	nodes: Float64Array;
	weights: Float64Array;
}

/** Orthonormal Hermite polynomials He_0 … He_(size-1) at z (weight: the standard normal density): Σ squares. */
function christoffelSum(z: number, size: number): number {
	let before = 0;
	let here = 1;
	let sum = 1;
	for (let k = 1; k < size; k++) {
		const next = (z * here - Math.sqrt(k - 1) * before) / Math.sqrt(k);
		before = here;
		here = next;
		sum += here * here;
	}
	return sum;
}

/** How many zeros of He_size lie below z: negative pivots of its Jacobi matrix (Sturm's theorem). */
function zerosBelow(z: number, size: number): number {
	let pivot = -z;
	let count = pivot < 0 ? 1 : 0;
	for (let k = 1; k < size; k++) {
		pivot = -z - k / (pivot === 0 ? 1e-300 : pivot);
		if (pivot < 0) count++;
	}
	return count;
}

/**
 * Gauss-Hermite rule for the standard normal weight: E[f(Z)] = Σ weights f(nodes), exact for polynomials of
 * degree below 2 size. Nodes ascending, symmetric about 0; weights sum to 1. Zeros by bisection on Sturm
 * counts, weights as the Christoffel numbers 1 / Σ He_k² (G. Szegő, Orthogonal Polynomials, 3.4), which stay
 * accurate for the tiny outer ones. @param size 1 … 64
 */
export function gaussHermite(size: number): Rule {
	const nodes = new Float64Array(size);
	const weights = new Float64Array(size);
	for (let i = 0; i < size; i++) {
		const mirror = size - 1 - i;
		if (mirror < i) nodes[i] = -nodes[mirror];
		else if (mirror > i) {
			let low = -2 * Math.sqrt(size);
			let high = 0;
			for (let step = 0; step < 80; step++) {
				const middle = (low + high) / 2;
				if (zerosBelow(middle, size) > i) high = middle;
				else low = middle;
			}
			nodes[i] = (low + high) / 2;
		}
		weights[i] = 1 / christoffelSum(nodes[i], size);
	}
	return { nodes, weights };
}
