import type { EntryFilters } from '$lib/schemas/table';
import type { EntryState } from '../db/models/literature';
import { matchExpression } from './searchWords';

/** Conditions on `entry_row`, and the values bound in them. */
export interface EntryConditions {
	where: string[];
	bind: Record<string, string | number>;
	/** Where the words are all there is to go by: the index that counts them alone, without looking at any row. */
	counted?: { from: string; bind: Record<string, string> };
}

/**
 * Which entries filters leave, as SQL over `entry_row`.
 * @param states what the reader may see: visitors what is published, and nothing else
 */
export function entryConditions(
	filters: EntryFilters,
	states: readonly EntryState[] = ['published']
): EntryConditions {
	// One state compares with `=`, so that the indexes, which begin with it, give the order as well.
	const where = [
		states.length === 1
			? 'entry_row.state = $state0'
			: `entry_row.state IN (${states.map((_, index) => `$state${index}`).join(', ')})`
	];
	const bind: EntryConditions['bind'] = Object.fromEntries(
		states.map((state, index) => [`state${index}`, state])
	);
	for (const name of ['tooth', 'root', 'measure', 'method'] as const) {
		if (!filters[name]) continue;
		where.push(`entry_row.${name} = $${name}`);
		bind[name] = filters[name];
	}
	if (filters.source) {
		where.push('entry_row.source_id = $source');
		bind.source = filters.source;
	}
	if (filters.country) {
		where.push(inCountry('entry_row.country'));
		bind.country = filters.country;
	}
	if (filters.q) {
		const words = matchExpression(filters.q);
		if (words === null) return { where: ['1 = 0'], bind: {} };
		bind.words = `(${states.map(stateWord).join(' OR ')}) AND ${words}`;
		const alone = where.length === 1;
		where.push(`entry_row.entry_id IN (SELECT rowid FROM ${MATCHING})`);
		if (alone) return { where, bind, counted: { from: MATCHING, bind: { words: bind.words } } };
	}
	return { where, bind };
}

const MATCHING = 'entry_search WHERE entry_search MATCH $words';

/** A state as the words of the index have it (migrations/…tableIndex). */
const stateWord = (state: EntryState) => `"ǀ${state.replace('-', '')}"`;

/** Whether a sample's country is the one bound as `$country`, or has it among several: `DEU` is in `CHE+DEU`. */
export const inCountry = (column: string) => `instr('+' || ${column} || '+', '+' || $country || '+') > 0`;
