/** The address on this site that a form or link asks to go on to, or the start page for anything that leads off it. */
export function ownAddress(back: FormDataEntryValue | null, origin: string): string {
	if (typeof back !== 'string' || !URL.canParse(back, origin)) return '/';
	const target = new URL(back, origin);
	// A path with two slashes at its start would be read as the address of another site.
	const own = target.origin === origin && !target.pathname.startsWith('//');
	return own ? target.pathname + target.search : '/';
}
