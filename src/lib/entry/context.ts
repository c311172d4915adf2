import type { CheckContext } from './checks';
import type { EntryContent } from './content';

/** What an entry of one source, tooth and root is compared with, as plain data that a page can hand to its browser. */
export interface ContextData {
	/** What the data is about: after a change of one of these it holds no more. */
	about: { source: string; tooth: string; root: string };
	/** The entry's own id, which is not compared; null for a new one. */
	self: number | null;
	/** Whether the table has the source. */
	sourceKnown: boolean;
	/** Canal sequences that published entries of the root show; null where there is none. */
	shown: string[] | null;
	others: { id: number; content: EntryContent }[];
}

/** The data as the checks take it; what it does not speak of passes. */
export const checkContext = ({ about, sourceKnown, shown, others }: ContextData): CheckContext => ({
	hasSource: (id) => id !== about.source || sourceKnown,
	shown: (tooth, root) =>
		tooth === about.tooth && root === about.root && shown !== null ? new Set(shown) : null,
	others
});
