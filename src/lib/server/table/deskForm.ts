/** The entry form between the page and the rooms: what its actions share. */
import { fail } from '@sveltejs/kit';
import type { Sequelize } from 'sequelize';
import { checkEntry } from '$lib/entry/checks';
import { entryText, type EntryText } from '$lib/entry/content';
import { checkContext } from '$lib/entry/context';
import type { Part, Side } from '$lib/entry/difference';
import { blankFigure, textOfForm } from '$lib/entry/formText';
import { Source } from '../db/models/literature';
import { Problem } from '../api/problem';
import { contextFor } from './deskContext';
import { StaleEdit } from './deskProblem';
import type { DeskPerson } from './entryDrafts';
import { saveDraft } from './entryDrafts';

/** Sources as the form suggests them: id, and who and what it is. */
export async function sourceSuggestions(): Promise<{ value: string; label: string }[]> {
	const rows = await Source.findAll({ attributes: ['id', 'title', 'year'], order: ['id'] });
	return rows.map(({ id, title, year }) => ({
		value: id,
		label: [title?.slice(0, 70), year].filter(Boolean).join(', ')
	}));
}

/** A form as it was sent, with a row for the sequence that a button without scripts picked. */
function sentText(form: FormData): EntryText {
	const text = textOfForm(form);
	const picked = form.get('add');
	return typeof picked === 'string' ? { ...text, figures: [...text.figures, blankFigure(picked)] } : text;
}

/** What a page gets back when it was only asked to look. */
export async function lookAt(db: Sequelize, form: FormData, self: number | null) {
	const text = sentText(form);
	const tried = !form.has('add') && !form.has('more');
	return { text, tried, context: await contextFor(db, text, self) };
}

/** Checks a form that is to be kept. */
export async function readForm(db: Sequelize, form: FormData, self: number | null) {
	const text = sentText(form);
	const context = await contextFor(db, text, self);
	return { text, context, content: checkEntry(text, checkContext(context)).content };
}

const numberIn = (form: FormData, name: string): number | undefined => {
	const value = form.get(name);
	return typeof value === 'string' && /^\d{1,9}$/.test(value) ? Number(value) : undefined;
};

/** Sides chosen in the form that merges: fields `choice:PART`. */
function choicesIn(form: FormData): Map<Part, Side> {
	const choices = new Map<Part, Side>();
	for (const [name, value] of form)
		if (name.startsWith('choice:') && (value === 'yours' || value === 'theirs'))
			choices.set(name.slice('choice:'.length), value);
	return choices;
}

/** Saves a draft from the form; with a second save in between, answers with both versions. */
export async function saveForm(db: Sequelize, id: number, person: DeskPerson, form: FormData) {
	const { text, context, content } = await readForm(db, form, id);
	if (!content) return fail(422, { text, context, tried: true });
	const expected = numberIn(form, 'revision') ?? 0;
	const base = numberIn(form, 'base');
	const merging = base === undefined ? {} : { base, choices: choicesIn(form) };
	try {
		await saveDraft(db, id, person, { content, expected, ...merging });
		return { saved: true };
	} catch (problem) {
		if (problem instanceof StaleEdit) {
			const { clashes, number, who } = problem;
			const stale = { clashes, number, who, base: base ?? expected };
			return fail(409, { text: entryText(content), context, tried: true, stale });
		}
		if (problem instanceof Problem)
			return fail(problem.status, { text, context, tried: true, message: problem.detail });
		throw problem;
	}
}

/** The fields of an action's form. */
export function actionFields(form: FormData) {
	const read = (name: string) => {
		const value = form.get(name);
		return typeof value === 'string' ? value : '';
	};
	const poolable = read('poolable');
	return {
		action: read('action'),
		expected: numberIn(form, 'revision') ?? -1,
		note: read('note'),
		reasons: read('reasons').split(/\r?\n/),
		reason: read('reason'),
		locator: read('locator'),
		revision: numberIn(form, 'restore'),
		poolable: poolable === 'yes' ? true : poolable === 'no' ? false : null
	};
}

/** A refused action as its form shows it: what was typed, and what is wrong at which field. */
export function refusedAction(form: FormData, problem: Problem) {
	const values = Object.fromEntries(
		[...form].flatMap(([name, value]) => (typeof value === 'string' ? [[name, value]] : []))
	);
	const errors = Object.fromEntries(problem.errors.map(({ path, message }) => [path, message]));
	return fail(problem.status, {
		refused: { action: values.action ?? '', values, errors },
		message: problem.errors.length > 0 && problem.status === 422 ? undefined : problem.detail
	});
}
