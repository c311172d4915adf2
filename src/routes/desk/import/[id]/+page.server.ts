import { error, fail, redirect } from '@sveltejs/kit';
import { serverDatabase } from '$lib/server/db/server';
import { done, field, refused } from '$lib/server/forms';
import {
	cancelImport,
	discardImport,
	findImport,
	importDto,
	mapHeadings,
	readImport,
	startImport
} from '$lib/server/intake/imports';
import { COLUMNS } from '$lib/server/intake/mapping';
import { hasRole, requireRole } from '$lib/server/people/roles';
import { readFormData } from '$lib/server/people/signInForm';
import { intake as words } from '$lib/strings/intake';
import type { Actions, PageServerLoad } from './$types';

const IMPORTERS = ['educator', 'administrator'] as const;
/** Name of the field that says which column a heading is, before the heading's number. */
const MAP_FIELD = 'column-';

async function own(id: string) {
	const person = requireRole(IMPORTERS);
	const row = (await findImport(person.id, id)) ?? error(404, 'Unknown import.');
	return { person, row };
}

export const load: PageServerLoad = async ({ params, depends }) => {
	depends('app:import');
	const { person, row } = await own(params.id);
	const answer = row.state === 'preview' ? await readImport(await serverDatabase(), row) : null;
	return {
		import: importDto(row),
		mayPublish: hasRole(person, 'administrator'),
		mayDraft: hasRole(person, 'educator'),
		columns: COLUMNS,
		unreadable: answer && 'unreadable' in answer ? answer.unreadable : null,
		preview: answer && 'preview' in answer ? answer.preview : null
	};
};

export const actions: Actions = {
	map: async (event) => {
		const { row } = await own(event.params.id);
		const form = await readFormData(event);
		const headings = form.getAll('heading').filter((heading) => typeof heading === 'string');
		const mapping = Object.fromEntries(
			headings.slice(0, 100).map((heading, index) => [heading, field(form, `${MAP_FIELD}${index}`)])
		);
		if (row.state === 'preview') await mapHeadings(row, mapping);
		return done('map', words.mapped);
	},
	start: async (event) => {
		const { person, row } = await own(event.params.id);
		const form = await readFormData(event);
		const publish = field(form, 'as') === 'published';
		if (!hasRole(person, publish ? 'administrator' : 'educator')) error(403, 'Your roles do not allow this.');
		const failure = await startImport(await serverDatabase(), row, person, publish);
		if (failure !== null) return refused('start', form, { '': words.startFailures[failure] }, 409);
		redirect(303, event.url.pathname);
	},
	cancel: async (event) => {
		const { row } = await own(event.params.id);
		if (await cancelImport(row)) return done('start', words.cancelled);
		return fail(409, { ...done('start', ''), errors: { '': words.tooLate } });
	},
	discard: async (event) => {
		const { row } = await own(event.params.id);
		if (row.state === 'preview') await discardImport(row);
		redirect(303, '/desk/import');
	}
};
