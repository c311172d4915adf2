/** Which row may enter an estimate (inference, section 2), with the reason in words where it may not. Pure. */
import { scopeGrant } from './scope';
import type { ScopeGrant } from './scope';
import type { ObservationRow, SourceFacts } from './types';

/** A row that may enter, with what its scope lets it answer; or the reason why it may not. */
type Admission = { admitted: true; grant: Exclude<ScopeGrant, 'none'> } | { admitted: false; reason: string };

/** "highest of 44 countries", "lowest region": an extreme chosen by its result, so no sample of anything. */
const EXTREME = /\b(?:lowest|highest)\b[^;.]*\b(?:countries|regions?|nations|populations)\b/i;

/** Why a published review is not pooled; its studies may be in the table themselves. */
const REVIEW_REASON = 'A review of other studies: shown beside the single studies, never pooled with them.';

/**
 * Judges one row by itself. Subgroups and combined countries need the neighbours and are judged in samples.ts.
 * A retracted source is shut out too: the page is silent, but nobody would pool it knowingly.
 *
 * @param row a row of the table
 * @param source its source; undefined when the table does not have it
 */
export function admit(row: ObservationRow, source: SourceFacts | undefined): Admission {
	const reason = whyNot(row, source);
	if (reason !== null) return { admitted: false, reason };
	const grant = scopeGrant(row);
	if (grant !== 'none') return { admitted: true, grant };
	return {
		admitted: false,
		reason:
			row.poolable === false
				? 'An editor has marked this sample as not to be pooled.'
				: `Its total counts something else than all such roots or teeth (${row.scope || 'not said what'}).`
	};
}

function whyNot(row: ObservationRow, source: SourceFacts | undefined): string | null {
	if (row.tooth === '')
		return 'The source gives several kinds of teeth together, so it speaks for no single one.';
	if (row.method === 'review') return REVIEW_REASON;
	if (row.provenance === 'memory' && !row.verified) {
		return 'Unverified: recalled from memory and not yet confirmed against the source by an editor.';
	}
	if (!source?.citable) return 'The source cannot be cited well enough to be found again.';
	if (source.retracted) return 'The source has been retracted.';
	if (row.category === 'second-distal') {
		return 'Counts a second distal canal in one root or in two, so it says nothing about one root.';
	}
	if (EXTREME.test(row.note)) return 'The lowest or highest of several countries, chosen for its result.';
	return faultOfNumbers(row);
}

function faultOfNumbers({ count, total }: ObservationRow): string | null {
	if (count === null || total === null) {
		return count === null && total === null
			? 'Gives a percentage without the numbers behind it.'
			: `Gives no ${count === null ? 'count' : 'total'}, only ${count === null ? 'a percentage of it' : 'the count'}.`;
	}
	const whole = Number.isInteger(count) && Number.isInteger(total);
	return whole && count >= 0 && total > 0 && count <= total
		? null
		: 'Its count and total cannot both be right.';
}
