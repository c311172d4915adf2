/** An entry between a form and its text. Pure; the fields of a form are those of the text, the columns of the figures repeat. */
import type { ContextData } from './context';
import type { Clash } from './difference';
import { emptyEntry, ENTRY_FIELDS, type EntryText, type FigureText } from './content';

const FIGURE_FIELDS = ['category', 'count', 'percent', 'note'] as const;
/** Blank rows a form offers. */
const SPARE_ROWS = 3;
const FEWEST_ROWS = 5;

/** What a page gets back of a form that was not kept. */
export interface SentForm {
	text: EntryText;
	context: ContextData;
	tried: boolean;
	/** Set where somebody has saved meanwhile. */
	stale?: { clashes: Clash[]; number: number; base: number; who: string };
	message?: string;
}

export const blankFigure = (category = ''): FigureText => ({ category, count: '', percent: '', note: '' });

/** Whether nothing is typed in a row. */
export const isBlank = (figure: FigureText): boolean =>
	FIGURE_FIELDS.every((field) => figure[field].trim() === '');

/** A form as text: rows with nothing in them are left away. */
export function textOfForm(form: FormData): EntryText {
	const read = (name: string) => {
		const value = form.get(name);
		return typeof value === 'string' ? value : '';
	};
	const columns = Object.fromEntries(
		FIGURE_FIELDS.map((field) => [
			field,
			form.getAll(`figure-${field}`).map((value) => (typeof value === 'string' ? value : ''))
		])
	) as Record<(typeof FIGURE_FIELDS)[number], string[]>;
	const figures = columns.category.map((category, row) => ({
		...{ category, count: columns.count[row] ?? '', percent: columns.percent[row] ?? '' },
		note: columns.note[row] ?? ''
	}));
	const fields = Object.fromEntries(ENTRY_FIELDS.map((field) => [field, read(field)]));
	return { ...emptyEntry(), ...fields, figures: figures.filter((figure) => !isBlank(figure)) };
}

/** The text with blank rows at its end to type into. */
export function withSpareRows(text: EntryText): EntryText {
	const spare = Math.max(SPARE_ROWS, FEWEST_ROWS - text.figures.length);
	return { ...text, figures: [...text.figures, ...Array.from({ length: spare }, () => blankFigure())] };
}

/** The text without its blank rows, and for each of its rows the row of the form that holds it. */
export function typedRows(text: EntryText): { text: EntryText; rows: number[] } {
	const rows = text.figures.flatMap((figure, row) => (isBlank(figure) ? [] : [row]));
	return { text: { ...text, figures: rows.map((row) => text.figures[row]) }, rows };
}
