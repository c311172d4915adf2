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

/** Address of the API's answer to what to expect of a root. */
export function expectationAddress(tooth: string, root: string): string {
	return `/api/v1/teeth/${tooth}/roots/${root}/expectation`;
}

/** Address of the page of an entry of the table. */
export function entryAddress(id: number): string {
	return `/table/${id}`;
}

/** Address of a feature on the page of a tooth or of one of its roots. */
export function featureAddress(tooth: string, root: string | undefined, feature: string): string {
	return `${placeAddress(tooth, root)}#feature-${feature}`;
}

/** Address of the table, narrowed to samples from a country (ISO 3166-1 alpha-3). */
export function countryAddress(code: string): string {
	return `/table?country=${code}`;
}

/** Address of the page on which educators keep a source. */
export function deskSourceAddress(id: string): string {
	return `/desk/sources/${encodeURIComponent(id)}`;
}
