/** Seeded random numbers for simulations in tests; not used by the product, which draws nothing at random. */
export class SeededRandom {
	#state: number;

	constructor(seed: number) {
		this.#state = seed >>> 0;
	}

	/** Uniform on (0, 1): mulberry32, whose period of 2^32 is ample for some tens of millions of draws. */
	uniform(): number {
		this.#state = (this.#state + 0x6d2b79f5) >>> 0;
		let t = this.#state;
		t = Math.imul(t ^ (t >>> 15), t | 1);
		t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
		return (((t ^ (t >>> 14)) >>> 0) + 0.5) / 4294967296;
	}

	/** Whether something of probability p happens. */
	happens(p: number): boolean {
		return this.uniform() < p;
	}

	/** One of several. */
	pick<T>(values: readonly T[]): T {
		return values[Math.floor(this.uniform() * values.length)];
	}

	/** Standard normal, by Box and Muller. */
	normal(): number {
		return Math.sqrt(-2 * Math.log(this.uniform())) * Math.cos(2 * Math.PI * this.uniform());
	}

	/** Gamma(shape, 1), by Marsaglia and Tsang (ACM Trans. Math. Softw. 26 (2000) 363-372). */
	gamma(shape: number): number {
		if (shape < 1) return this.gamma(shape + 1) * this.uniform() ** (1 / shape);
		const d = shape - 1 / 3;
		const c = 1 / Math.sqrt(9 * d);
		for (;;) {
			const x = this.normal();
			const v = (1 + c * x) ** 3;
			if (v > 0 && Math.log(this.uniform()) < 0.5 * x * x + d - d * v + d * Math.log(v)) return d * v;
		}
	}

	/** Beta(a, b). */
	beta([a, b]: readonly [number, number]): number {
		const x = this.gamma(a);
		return x / (x + this.gamma(b));
	}
}
