/** What differs between two states of an entry, field by field, and how two edits of one are put together. Pure. */
import { ENTRY_FIELDS, type EntryContent, type FigureContent } from './content';

/** The parts that are compared: the fields, and each category by its name (`figure:2-1`). */
export type Part = string;
const FIGURE = 'figure:';

/** A part that differs, as text; null where one side does not have it. */
export interface Difference {
	part: Part;
	before: string | null;
	after: string | null;
}

/** Which category a part is, or null for a field. */
export const categoryOf = (part: Part): string | null =>
	part.startsWith(FIGURE) ? part.slice(FIGURE.length) : null;

/** A category in words that name everything kept of it, so that two texts are equal exactly if the categories are. */
function figureWords({ count, percent, countDerived, note }: FigureContent): string {
	const words = [
		count === null ? '' : `${count}${countDerived ? ' (worked out)' : ''}`,
		percent === null ? '' : `${percent} %`,
		note
	];
	return words.filter((word) => word !== '').join(', ');
}

/** Every part of an entry as text, in the order screens show them. */
function partsOf(content: EntryContent): Map<Part, string> {
	const parts = new Map<Part, string>(
		ENTRY_FIELDS.map((field) => [field, content[field] === null ? '' : String(content[field])])
	);
	for (const figure of content.figures) parts.set(FIGURE + figure.category, figureWords(figure));
	return parts;
}

/** What changed from one state to another; nothing if only the order of the categories did. */
export function differences(before: EntryContent, after: EntryContent): Difference[] {
	const [was, is] = [partsOf(before), partsOf(after)];
	return [...new Set([...was.keys(), ...is.keys()])]
		.map((part) => ({ part, before: was.get(part) ?? null, after: is.get(part) ?? null }))
		.filter((difference) => difference.before !== difference.after);
}

export type Side = 'yours' | 'theirs';

/** A part two people left different, with the side that is taken unless somebody chooses otherwise. */
export interface Clash {
	part: Part;
	base: string | null;
	yours: string | null;
	theirs: string | null;
	/** Both changed it, each otherwise. */
	conflict: boolean;
	proposed: Side;
}

/**
 * Compares two edits of one entry.
 *
 * @param base what both began from
 * @param yours what would be saved now
 * @param theirs what was saved meanwhile
 * @returns the parts in which they differ: a part that only one of them changed is taken from that side, one that both did from yours
 */
export function clashes(base: EntryContent, yours: EntryContent, theirs: EntryContent): Clash[] {
	const was = partsOf(base);
	return differences(theirs, yours).map(({ part, before, after }) => {
		const old = was.get(part) ?? null;
		const mine = after !== old;
		const other = before !== old;
		return {
			part,
			base: old,
			yours: after,
			theirs: before,
			conflict: mine && other,
			proposed: mine ? 'yours' : 'theirs'
		};
	});
}

/**
 * Puts two edits together.
 * @param choices the side of each part in which they differ; one not named is taken as `clashes` proposes
 */
export function merge(
	base: EntryContent,
	yours: EntryContent,
	theirs: EntryContent,
	choices: ReadonlyMap<Part, Side> = new Map()
): EntryContent {
	const taken = new Map(
		clashes(base, yours, theirs).map(({ part, proposed }) => [part, choices.get(part) ?? proposed])
	);
	const fields = Object.fromEntries(
		ENTRY_FIELDS.filter((field) => taken.get(field) === 'theirs').map((field) => [field, theirs[field]])
	) as Partial<EntryContent>;
	const figures = new Map<string, FigureContent>();
	for (const { category } of [...theirs.figures, ...yours.figures]) {
		const side = taken.get(FIGURE + category) === 'theirs' ? theirs : yours;
		const figure = side.figures.find((one) => one.category === category);
		if (figure) figures.set(category, figure);
	}
	return { ...yours, ...fields, figures: [...figures.values()] };
}
