import type { Clash } from '$lib/entry/difference';
import type { EntryContent } from '$lib/entry/content';
import type { Hindrance } from '$lib/entry/workflow';
import { desk as words } from '$lib/strings/desk';
import { Problem } from '../api/problem';

/** An action that may not be done, in words; 403 for who asks, 409 for the state the entry is in. */
export const hindered = (why: Hindrance) => new Problem(why === 'state' ? 409 : 403, words.hindrances[why]);

/** Somebody has saved meanwhile. The screen asks whose version of each part stands; the API names the parts. */
export class StaleEdit<Content = EntryContent> extends Problem {
	/**
	 * @param clashes parts in which the two versions differ
	 * @param theirs what was saved meanwhile
	 * @param number its revision
	 */
	constructor(
		readonly clashes: Clash[],
		readonly theirs: Content,
		readonly number: number,
		readonly who: string
	) {
		super(
			409,
			clashes.length > 0 ? words.stale(who) : words.moved(who),
			clashes.map(({ part, yours, theirs: other }) => ({
				path: part,
				message: words.staleAt(yours ?? words.nothing, other ?? words.nothing)
			})),
			{ etag: `"${number}"` }
		);
	}
}

/** An entry or revision that does not exist. */
export const unknownEntry = () => new Problem(404, words.unknown);
