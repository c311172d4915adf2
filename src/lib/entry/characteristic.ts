/** A finding's characteristic as the desk edits it: one Beta distribution, or one standard deviation. Pure, and without zod. */
import { checks as words } from '$lib/strings/checks';
import { Remarks, type Remark } from './remarks';

export const BASES = ['published', 'derived', 'assumed'] as const;
type Basis = (typeof BASES)[number];

/** What a person may change; what it is a characteristic of stays. */
export interface CharacteristicContent {
	/** Parameters of the Beta distribution; null for a standard deviation. */
	betaA: number | null;
	betaB: number | null;
	/** Standard deviation in mm; null for a Beta. */
	sdMm: number | null;
	basis: Basis;
	/** Ids of the sources joined by `;`, empty for an assumed value. */
	sourceIds: string;
	note: string;
}

/** The same as typed. */
export type CharacteristicText = Record<keyof CharacteristicContent, string>;

const LARGEST_PARAMETER = 100_000;
const LARGEST_SD_MM = 20;
const LONGEST_NOTE = 1000;

/** The name under which revisions and drafts of a characteristic are kept. */
export const characteristicName = (row: { finding: string; parameter: string; toothGroup: string }): string =>
	[row.finding, row.parameter, row.toothGroup].join('.');

/** A content as it would have been typed. */
export function characteristicText(content: CharacteristicContent): CharacteristicText {
	const { betaA, betaB, sdMm } = content;
	const written = (number: number | null) => (number === null ? '' : String(number));
	return { ...content, betaA: written(betaA), betaB: written(betaB), sdMm: written(sdMm) };
}

/**
 * Checks a characteristic as typed.
 * @param kind which of the two it is
 * @param hasSource whether the table has a source of this id
 */
export function checkCharacteristic(
	text: CharacteristicText,
	kind: 'beta' | 'sd',
	hasSource: (id: string) => boolean = () => true
): { content: CharacteristicContent | null; remarks: Remark[] } {
	const remarks = new Remarks();
	const positive = (field: 'betaA' | 'betaB' | 'sdMm', most: number) => {
		const typed = text[field].trim().replace(',', '.');
		const number = /^\d{1,6}(\.\d{1,6})?$/.test(typed) ? Number(typed) : NaN;
		if (!(number > 0 && number <= most)) remarks.error(field, words.positive(most));
		return number;
	};
	const numbers =
		kind === 'beta'
			? {
					betaA: positive('betaA', LARGEST_PARAMETER),
					betaB: positive('betaB', LARGEST_PARAMETER),
					sdMm: null
				}
			: { betaA: null, betaB: null, sdMm: positive('sdMm', LARGEST_SD_MM) };
	const basis = BASES.find((one) => one === text.basis);
	if (!basis) remarks.error('basis', words.basis(BASES));
	const ids = text.sourceIds.split(/[;,\s]+/).filter(Boolean);
	const unknown = ids.filter((id) => !hasSource(id));
	for (const id of unknown) remarks.error('sourceIds', words.unknownSource(id));
	if (basis && basis !== 'assumed' && ids.length === 0) remarks.error('sourceIds', words.basisNeedsSource);
	if (basis === 'assumed' && ids.length > 0) remarks.warning('sourceIds', words.assumedWithSource);
	const note = text.note.trim();
	if (note.length > LONGEST_NOTE) remarks.error('note', words.tooLong(LONGEST_NOTE));
	if (basis === 'assumed') remarks.warning('basis', words.assumed);
	if (remarks.failed) return { content: null, remarks: remarks.list };
	return { content: { ...numbers, basis: basis!, sourceIds: ids.join(';'), note }, remarks: remarks.list };
}
