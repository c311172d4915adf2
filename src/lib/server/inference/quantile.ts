/** Ranges longer than this are worth a sample to choose the pivot from (Floyd and Rivest's figure). */
const SAMPLE_FROM = 600;

function swap(values: Float64Array, i: number, j: number): void {
	const kept = values[i];
	values[i] = values[j];
	values[j] = kept;
}

/**
 * Moves the k-th smallest value (0-based) of `values` to index k, none larger before it and none smaller after
 * it, within `left` … `right`. About 1.5 passes for the extreme places that intervals need.
 * Source: R. W. Floyd and R. L. Rivest, "Algorithm 489: SELECT", Commun. ACM 18 (1975) 173.
 */
function select(values: Float64Array, k: number, left: number, right: number): void {
	while (right > left) {
		if (right - left > SAMPLE_FROM) {
			const n = right - left + 1;
			const m = k - left + 1;
			const z = Math.log(n);
			const s = 0.5 * Math.exp((2 * z) / 3);
			const sd = 0.5 * Math.sqrt((z * s * (n - s)) / n) * (m < n / 2 ? -1 : 1);
			const from = Math.max(left, Math.floor(k - (m * s) / n + sd));
			const to = Math.min(right, Math.floor(k + ((n - m) * s) / n + sd));
			select(values, k, from, to);
		}
		const pivot = values[k];
		let i = left;
		let j = right;
		swap(values, left, k);
		if (values[right] > pivot) swap(values, left, right);
		while (i < j) {
			swap(values, i++, j--);
			while (values[i] < pivot) i++;
			while (values[j] > pivot) j--;
		}
		if (values[left] === pivot) swap(values, left, j);
		else swap(values, ++j, right);
		if (j <= k) left = j + 1;
		if (k <= j) right = j - 1;
	}
}

/**
 * Type-7 quantiles: with h = (n - 1) p, x_(⌊h⌋) + (h - ⌊h⌋) (x_(⌊h⌋+1) - x_(⌊h⌋)) of the sorted values.
 * Source: R. J. Hyndman and Y. Fan, "Sample quantiles in statistical packages", Am. Stat. 50 (1996) 361-365;
 * the default of R and of numpy. Example: the quantile of (1, 2, 3, 4) at 0.25 is 1.75.
 * Reorders `values` in place (a copy of thousands of draws for each figure would cost more than the figure).
 * @param values at least one finite number
 * @param ps ascending, each in [0, 1]
 * @throws RangeError for no values or for other `ps`
 */
export function quantilesInPlace(values: Float64Array, ps: number[]): number[] {
	const last = values.length - 1;
	if (last < 0 || !ps.every((p, i) => p >= (i === 0 ? 0 : ps[i - 1]) && p <= 1)) {
		throw new RangeError('quantiles need a value, and ascending places in [0, 1]');
	}
	// Everything before `from` is in its final place, so that each place searches only what is left.
	let from = 0;
	return ps.map((p) => {
		const h = last * p;
		const k = Math.floor(h);
		const next = Math.min(k + 1, last);
		select(values, next, from, last);
		select(values, k, from, next);
		from = k;
		return values[k] + (h - k) * (values[next] - values[k]);
	});
}
