import type { RootFigures } from '$lib/entry/effect';
import { deskPages } from '$lib/strings/deskPages';
import { confluence } from '$lib/strings/confluence';

const words = deskPages.effect;
const points = new Intl.NumberFormat('en', { maximumFractionDigits: 1, signDisplay: 'always' });
/** Less than this cannot be told from none at the digits shown, percentage points. */
const SMALLEST_POINTS = 0.05;

/** How far a probability moved, in percentage points with its sign; null where it did not at the digits shown. */
export function movedBy(before: number, after: number): string | null {
	const moved = 100 * (after - before);
	return Math.abs(moved) < SMALLEST_POINTS ? null : points.format(moved).replace('-', '−');
}

/** A fate in words. */
export const fateName = (fate: string): string =>
	(confluence.fates as Record<string, { name: string } | undefined>)[fate]?.name ?? fate.replaceAll('-', ' ');

/** The main figure that moved most, in words: `1 canal: 40 % → 43 %`. */
export function largestMove(before: RootFigures, after: RootFigures): string {
	const pairs = [
		...before.orifices.map((was) => ({
			name: words.orifices(was.count),
			was: was.mean,
			is: after.orifices.find(({ count }) => count === was.count)?.mean
		})),
		...before.fates.map((was) => ({
			name: fateName(was.fate),
			was: was.mean,
			is: after.fates.find(({ fate }) => fate === was.fate)?.mean
		}))
	].flatMap(({ name, was, is }) => (is === undefined ? [] : [{ name, was, is }]));
	const [most] = pairs.sort((a, b) => Math.abs(b.is - b.was) - Math.abs(a.is - a.was));
	const moved = most && movedBy(most.was, most.is);
	return moved ? `${most.name} ${words.points(moved)}` : words.still;
}
