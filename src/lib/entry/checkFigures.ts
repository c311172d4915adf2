/** The checks of an entry's categories (checks.ts). Pure. */
import { formatSequence, parseSequence, SequenceError } from '$lib/anatomy/sequence';
import type { MEASURES } from '$lib/schemas/terms';
import { checks as words } from '$lib/strings/checks';
import type { Remarks } from './checks';
import type { FigureContent, FigureText } from './content';
import { percentage, roundingOf, wholeNumber } from './numbers';

type Measure = (typeof MEASURES)[number];

const LONGEST_NOTE = 1000;
const MOST_FIGURES = 60;
/** A number of canals, roots or foramina; `2+` stands for two or more. */
const COUNTED = /^[1-9]\+?$/;
const FEATURE = /^[a-z0-9]+([-.][a-z0-9]+)*$/;
const JOINING = ['joined', 'separate'];
/** Share by which classes may miss their total through rounding of printed percentages. */
const ROUNDING_SHARE = 0.01;
/** Percentages and counts are doubles. */
const EPSILON = 1e-9;

interface Sample {
	measure: Measure | null;
	total: number | null;
}

/** Reads the categories; a count and a percentage are each worked out from the other where one is missing, and a note says so. */
export function checkFigures(
	figures: readonly FigureText[],
	sample: Sample,
	remarks: Remarks
): FigureContent[] {
	if (figures.length === 0) remarks.error('figures', words.noFigures);
	if (figures.length > MOST_FIGURES) remarks.error('figures', words.tooManyFigures(MOST_FIGURES));
	const seen = new Set<string>();
	const read = figures.map((figure, index) => {
		const path = `figures.${index}`;
		const category = checkCategory(figure.category, sample.measure, `${path}.category`, remarks);
		if (category !== '' && seen.has(category)) remarks.error(`${path}.category`, words.twice(category));
		seen.add(category);
		const note = figure.note.trim();
		if (note.length > LONGEST_NOTE) remarks.error(`${path}.note`, words.tooLong(LONGEST_NOTE));
		return { category, note, ...checkNumbers(figure, sample.total, path, remarks) };
	});
	if (!remarks.failed) checkSum(read, sample, remarks);
	return read;
}

function checkCategory(typed: string, measure: Measure | null, path: string, remarks: Remarks): string {
	const category = typed.trim();
	if (category === '') {
		remarks.error(path, words.noCategory);
		return '';
	}
	switch (measure) {
		case null:
			return category;
		case 'configuration': {
			if (category === 'other') return category;
			const read = readSequence(category);
			if ('sequence' in read) return read.sequence;
			remarks.error(path, `${read.fault} ${words.orOther}`);
			return category;
		}
		case 'feature':
			if (!FEATURE.test(category)) remarks.error(path, words.feature);
			return category;
		case 'confluence':
		case 'extra-canal-confluence':
			if (!JOINING.includes(category)) remarks.error(path, words.joining);
			return category;
		default:
			if (!COUNTED.test(category)) remarks.error(path, words.counted);
			return category;
	}
}

type Numbers = Pick<FigureContent, 'count' | 'percent' | 'countDerived'>;

function checkNumbers(figure: FigureText, total: number | null, path: string, remarks: Remarks): Numbers {
	const count = wholeNumber(figure.count);
	const percent = percentage(figure.percent);
	const derived = figure.countDerived?.trim() === 'yes';
	if (Number.isNaN(count)) remarks.error(`${path}.count`, words.wholeNumber);
	if (Number.isNaN(percent)) remarks.error(`${path}.percent`, words.percentage);
	if (count === null && percent === null) remarks.error(`${path}.count`, words.noNumber);
	if (count !== null && total !== null && count > total) remarks.error(`${path}.count`, words.aboveTotal);
	const unread = Number.isNaN(count) || Number.isNaN(percent);
	if (unread || total === null) return { count, percent, countDerived: derived && count !== null };
	if (count === null && percent !== null) {
		const worked = Math.round((percent / 100) * total);
		remarks.note(`${path}.count`, words.countDerived(worked, percent, total));
		return { count: worked, percent, countDerived: true };
	}
	if (count !== null && percent === null) {
		remarks.note(`${path}.percent`, words.percentDerived((100 * count) / total, count, total));
	} else if (count !== null && percent !== null) {
		// A count that was worked out is rounded itself.
		const tolerance = Math.max(roundingOf(percent), derived ? 50 / total : 0) + EPSILON;
		const share = (100 * count) / total;
		if (Math.abs(share - percent) > tolerance)
			remarks.warning(`${path}.percent`, words.percentUnfit(share, percent));
	}
	return { count, percent, countDerived: derived };
}

/** Classes that exclude each other should sum to the total, or to what the source says is missing. Features do not exclude each other. */
function checkSum(figures: FigureContent[], { measure, total }: Sample, remarks: Remarks): void {
	if (measure === null || measure === 'feature' || total === null) return;
	const counts = figures.map(({ count }) => count);
	if (counts.includes(null)) return;
	const sum = counts.reduce<number>((all, count) => all + count!, 0);
	const allowed = Math.max(1, ROUNDING_SHARE * total);
	if (sum - total > allowed) remarks.warning('figures', words.sumAbove(sum, total));
	else if (total - sum > allowed) remarks.warning('figures', words.sumBelow(sum, total));
	else if (sum !== total) remarks.note('figures', words.sumRounded(sum, total));
}

/** A canal sequence in its canonical form, or in words why it is none. */
function readSequence(typed: string): { sequence: string } | { fault: string } {
	try {
		return { sequence: formatSequence(parseSequence(typed.replace(/[–—−]/g, '-').replace(/\s/g, ''))) };
	} catch (error) {
		if (error instanceof SequenceError) return { fault: error.message };
		throw error;
	}
}
