import { placeAddress } from '$lib/addresses';
import { rootOf, toothOf } from '$lib/anatomy/teeth';
import type { EntryDto } from '$lib/schemas/table';
import { count, percent } from '$lib/strings/format';
import { source as words } from '$lib/strings/source';

type Figure = EntryDto['figures'][number];

/** Address of the page of an entry's tooth or root, where the product has one. */
export function placeAddressOf(entry: Pick<EntryDto, 'tooth' | 'root'>): string | null {
	if (!toothOf(entry.tooth)) return null;
	return placeAddress(entry.tooth, rootOf(entry.tooth, entry.root) ? entry.root : undefined);
}

/** Tooth and root in words. */
export const placeOf = (entry: Pick<EntryDto, 'tooth' | 'root'>) =>
	`${toothOf(entry.tooth)?.name ?? words.pooledTeeth}, ${entry.root}`;

/** The note all figures share, said once; null where they differ. */
export const sharedNote = ({ figures }: EntryDto) =>
	figures.every(({ note }) => note === figures[0].note) ? figures[0]?.note || null : null;

/** The share of a category: worked out where count and total are known, else as printed. Empty where neither is. */
export function percentOf({ count: number, percent: printed }: Figure, total: number | null): string {
	if (number !== null && total !== null) return percent(number / total);
	return printed === null ? '' : `${printed} %`;
}

/** Count, total and percent of a category in words. */
export function shareOf(figure: Figure, total: number | null): string {
	if (figure.count === null) return percentOf(figure, total);
	if (total === null) return figure.percent === null ? count(figure.count) : percentOf(figure, total);
	return `${count(figure.count)} of ${count(total)} (${percentOf(figure, total)})`;
}
