/** Figures of published reviews, for comparison beside the forest plot (inference, section 2). Pure. */
import { toothOf } from '$lib/anatomy/teeth';
import { filteredOut } from './filters';
import { groupBy } from './samples';
import { askedRoot, scopeGrant } from './scope';
import type { RootTable, TableIndex } from './tableIndex';
import type { Filters, ObservationRow, QuestionId, ReviewFigure } from './types';

/** A review's figure read against the tree, in the order they are preferred where a review gives several. */
const READINGS: readonly {
	question: QuestionId;
	measure: string;
	category: string;
	complement?: boolean;
	applies?: (row: ObservationRow) => boolean;
}[] = [
	{ question: 'q1', measure: 'configuration', category: '1', complement: true },
	{ question: 'q1', measure: 'canal-count', category: '1', complement: true },
	{ question: 'q1', measure: 'canal-count', category: '2+' },
	{ question: 'q1', measure: 'canal-count', category: '2', applies: isFrontTooth },
	{ question: 'q1', measure: 'feature', category: 'mb2', applies: (row) => row.root === 'MB' },
	{ question: 'q3', measure: 'feature', category: 'middle-mesial', applies: (row) => row.root === 'M' },
	{ question: 'q4', measure: 'confluence', category: 'joined' },
	{ question: 'q4', measure: 'confluence', category: 'separate', complement: true },
	{ question: 'q8', measure: 'extra-canal-confluence', category: 'joined' }
];

function isFrontTooth(row: ObservationRow): boolean {
	const kind = toothOf(row.tooth)?.kind;
	return kind === 'incisor' || kind === 'canine';
}

/**
 * One figure a review and question. A review has its own methods, countries and numbers, so of the filters only the
 * year and the excluded sources hold for it. A figure from memory is not shown as a published one until confirmed.
 */
export function reviewFigures(index: TableIndex, table: RootTable, filters: Filters): ReviewFigure[] {
	const { yearFrom, yearTo, exclude } = filters;
	const rows = table.shutOut
		.map(({ row }) => row)
		.filter(
			(row) =>
				row.method === 'review' &&
				row.subgroup === 'all' &&
				(row.provenance !== 'memory' || row.verified) &&
				scopeGrant(row) !== 'none' &&
				filteredOut(row, index.sources.get(row.source), { yearFrom, yearTo, exclude }) === null
		);
	const figures: ReviewFigure[] = [];
	for (const [source, group] of groupBy(rows, (row) => row.source)) {
		for (const { question, measure, category, complement, applies } of READINGS) {
			const perRoot = (row: ObservationRow) =>
				askedRoot(row.tooth, row.root) !== 'whole' || toothOf(row.tooth)?.kind === 'premolar';
			const row = group.find(
				(each) =>
					each.measure === measure && each.category === category && perRoot(each) && (applies?.(each) ?? true)
			);
			const percent = row && percentOf(row);
			if (!row || percent === null || percent === undefined) continue;
			if (figures.some((figure) => figure.source === source && figure.question === question)) continue;
			figures.push({ source, entry: row.entry, question, percent: complement ? 100 - percent : percent });
		}
	}
	return figures;
}

function percentOf({ percent, count, total }: ObservationRow): number | null {
	if (count !== null && total) return (100 * count) / total;
	return percent;
}
