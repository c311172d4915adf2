import { toothGroupOf } from '$lib/anatomy/teeth';
import type { FindingCharacteristic } from './types';

/** A Beta(a, b) distribution of one parameter of a finding. */
export interface BetaCharacteristic {
	a: number;
	b: number;
	/** True where no accuracy was ever published, which the screen says. */
	assumed: boolean;
	sourceIds: string[];
}

/** The characteristics that apply to one root. */
export interface Characteristics {
	/** The Beta of a finding's parameter, e.g. ('cone-mark', 'positive-if-meet'); null where the table has none. */
	beta(finding: string, parameter: string): BetaCharacteristic | null;
	/** The standard deviation, mm, of a measurement such as 'level-cone-mark'; null where the table has none. */
	sdMm(finding: string): { value: number; assumed: boolean; sourceIds: string[] } | null;
}

/**
 * The characteristics of the findings for one root: of several rows of one parameter the one with the most
 * specific tooth group counts, the first of these if an editor left two.
 * @param rows the whole table of finding characteristics
 * @param tooth tooth slug, e.g. 'maxillary-first-molar'; an unknown one gets the rows of group 'any'
 * @param root root id, e.g. 'MB'
 */
export function characteristicsFor(
	rows: FindingCharacteristic[],
	tooth: string,
	root: string
): Characteristics {
	const groups = toothGroupOf(tooth, root);
	const best = new Map<string, FindingCharacteristic>();
	const rank = ({ toothGroup }: FindingCharacteristic) => groups.findIndex((group) => group === toothGroup);
	for (const row of rows) {
		if (rank(row) < 0) continue;
		const key = `${row.finding} ${row.parameter}`;
		const known = best.get(key);
		if (!known || rank(row) < rank(known)) best.set(key, row);
	}
	const provenance = (row: FindingCharacteristic) => ({
		assumed: row.basis === 'assumed',
		sourceIds: row.sourceIds
	});
	return {
		beta(finding, parameter) {
			const row = best.get(`${finding} ${parameter}`);
			if (!row || row.betaA === null || row.betaB === null) return null;
			return { a: row.betaA, b: row.betaB, ...provenance(row) };
		},
		sdMm(finding) {
			const row = best.get(`${finding} sd`);
			return !row || row.sdMm === null ? null : { value: row.sdMm, ...provenance(row) };
		}
	};
}
