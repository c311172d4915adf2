/** Address of the page of a tooth, or of one of its roots. */
export function placeAddress(tooth: string, root?: string): string {
	return root === undefined ? `/teeth/${tooth}` : `/teeth/${tooth}/${root}`;
}

/** Address of the page that works out whether the canals of a root join. */
export function joinAddress(tooth: string, root: string): string {
	return `${placeAddress(tooth, root)}/join`;
}

/** Address of the page of a source. */
export function sourceAddress(id: string): string {
	return `/sources/${encodeURIComponent(id)}`;
}

/** Address of the page of an entry of the table. */
export function entryAddress(id: number): string {
	return `/table/${id}`;
}
