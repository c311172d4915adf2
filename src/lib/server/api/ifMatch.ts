import { desk as words } from '$lib/strings/desk';
import { Problem } from './problem';

/**
 * Number of the revision that a request says it edits, from If-Match.
 * @throws Problem 428 if it says none
 */
export function editedRevision(request: Request): number {
	const found = /^(?:W\/)?"(\d{1,9})"$/.exec(request.headers.get('if-match')?.trim() ?? '');
	if (!found) throw new Problem(428, words.needs.ifMatch);
	return Number(found[1]);
}

/** A number of the path, or null for anything else. */
export const numberOfPath = (text: string): number | null => (/^\d{1,15}$/.test(text) ? Number(text) : null);
