/** What was looked up on this device, kept in the browser's own storage and nowhere else. */

/** Something that was looked up. */
export interface RecentLookUp {
	/** What to show: a place's name, or the phrase typed. */
	title: string;
	/** Path on this server. */
	address: string;
}

type Store = Pick<Storage, 'getItem' | 'setItem' | 'removeItem'>;

const KEY = 'watersmeet.recent';
const MOST_KEPT = 8;

/** The last look-ups, newest first; none where storage is blocked or holds something else. */
export function readRecent(store = browserStore()): RecentLookUp[] {
	try {
		const value: unknown = JSON.parse(store?.getItem(KEY) ?? '[]');
		return Array.isArray(value) ? value.filter(isRecent).slice(0, MOST_KEPT) : [];
	} catch {
		return [];
	}
}

/** Puts a look-up first; the same address is kept once. Returns the list as it now is. */
export function keepRecent({ title, address }: RecentLookUp, store = browserStore()): RecentLookUp[] {
	const others = readRecent(store).filter((recent) => recent.address !== address);
	const list = [{ title, address }, ...others].slice(0, MOST_KEPT);
	try {
		store?.setItem(KEY, JSON.stringify(list));
	} catch {
		// Blocked or full: the look-up itself must not fail for it.
	}
	return list;
}

/** Forgets all look-ups. */
export function forgetRecent(store = browserStore()): void {
	try {
		store?.removeItem(KEY);
	} catch {
		// Nothing could be kept, so nothing is left.
	}
}

/** Reading the property throws already where a browser blocks storage. */
function browserStore(): Store | null {
	try {
		return globalThis.localStorage ?? null;
	} catch {
		return null;
	}
}

/** Only addresses of this site: whatever else stands in storage must not become a link. */
function isRecent(value: unknown): value is RecentLookUp {
	if (typeof value !== 'object' || value === null) return false;
	const { title, address } = value as Record<string, unknown>;
	return (
		typeof title === 'string' && title !== '' && typeof address === 'string' && /^\/(?![/\\])/.test(address)
	);
}
