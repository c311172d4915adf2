/** The address of a list with one parameter set, or taken out (null). Another order or filter begins at the first page. */
export function withParameter(url: URL, name: string, value: string | null): string {
	const query = new URLSearchParams(url.search);
	query.delete('cursor');
	if (value === null) query.delete(name);
	else query.set(name, value);
	return query.size > 0 ? `${url.pathname}?${query}` : url.pathname;
}
