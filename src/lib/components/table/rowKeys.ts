const STEPS: Record<string, (at: number, last: number) => number> = {
	ArrowDown: (at, last) => Math.min(at + 1, last),
	ArrowUp: (at) => Math.max(at - 1, 0),
	Home: () => 0,
	End: (_, last) => last
};

/**
 * The row that a key leads to from another, or null where the key is none of these or leads nowhere.
 *
 * @param key name of the key, as the event has it
 * @param at number of the row, from 0
 * @param rows how many there are
 */
export function rowAfterKey(key: string, at: number, rows: number): number | null {
	const step = Object.hasOwn(STEPS, key) ? STEPS[key] : undefined;
	if (!step || at < 0 || rows === 0) return null;
	const to = step(at, rows - 1);
	return to === at ? null : to;
}
