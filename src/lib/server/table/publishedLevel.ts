import type { MeasurementDto } from '$lib/schemas/teeth';

/** The published mean and standard deviation of a confluence's level in one root, mm. */
interface PublishedLevel {
	mean: number;
	sd: number;
	source: string;
	locator: string;
}

/** The quantity of the table that speaks of the level. */
export const LEVEL_QUANTITY = 'confluence-distance-from-apex';

/**
 * The published level of the confluence in a root: of the rows with mean and standard deviation that were seen in
 * their source the one over the most roots, the first of these if several are as large; null where there is none.
 * @param measured the tooth's measurements in mm
 */
export function publishedLevel(measured: readonly MeasurementDto[], root: string): PublishedLevel | null {
	let best: (PublishedLevel & { n: number }) | null = null;
	for (const row of measured) {
		if (row.quantity !== LEVEL_QUANTITY || row.root !== root || !row.verified) continue;
		if (row.mean === null || row.sd === null || !(row.mean > 0 && row.sd > 0)) continue;
		const n = row.n ?? 0;
		if (best && best.n >= n) continue;
		best = { mean: row.mean, sd: row.sd, source: row.source, locator: row.locator, n };
	}
	if (!best) return null;
	const { mean, sd, source, locator } = best;
	return { mean, sd, source, locator };
}
