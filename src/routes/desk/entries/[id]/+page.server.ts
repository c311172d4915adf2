import { error, redirect } from '@sveltejs/kit';
import { ACTIONS, type Action } from '$lib/entry/workflow';
import { Problem } from '$lib/server/api/problem';
import { serverDatabase } from '$lib/server/db/server';
import { requireRole } from '$lib/server/people/roles';
import { act } from '$lib/server/table/deskActions';
import { existingEntry } from '$lib/server/table/deskEntry';
import { readEntryPage } from '$lib/server/table/deskEntryPage';
import { actionFields, lookAt, refusedAction, saveForm } from '$lib/server/table/deskForm';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ params, url }) => {
	const person = requireRole('educator');
	const db = await serverDatabase();
	const page = await found(readEntryPage(db, params.id, person, url.searchParams.has('effect')));
	return { ...page, saved: url.searchParams.has('saved') };
};

export const actions: Actions = {
	check: async ({ request, params }) => {
		requireRole('educator');
		const { id } = await found(existingEntry(params.id));
		return lookAt(await serverDatabase(), await request.formData(), id);
	},
	save: async ({ request, params }) => {
		const person = requireRole('educator');
		const { id } = await found(existingEntry(params.id));
		return saveForm(await serverDatabase(), id, person, await request.formData());
	},
	act: async ({ request, params }) => {
		const person = requireRole('educator');
		const { id } = await found(existingEntry(params.id));
		const form = await request.formData();
		const { action, ...fields } = actionFields(form);
		if (!isAction(action)) error(400, 'There is no such action.');
		let tableRevision: number | null;
		try {
			tableRevision = await act(await serverDatabase(), { ...fields, action, id, person });
		} catch (problem) {
			if (problem instanceof Problem) return refusedAction(form, problem);
			throw problem;
		}
		// What changes the table leads to what it changed.
		if (tableRevision !== null) redirect(303, `/table/revisions#revision-${tableRevision}`);
		return { done: true };
	}
};

const isAction = (name: string): name is Exclude<Action, 'save'> =>
	name !== 'save' && (ACTIONS as readonly string[]).includes(name);

/** An unknown id is kit's own 404. */
async function found<Result>(work: Promise<Result>): Promise<Result> {
	try {
		return await work;
	} catch (problem) {
		if (problem instanceof Problem && problem.status === 404) error(404, problem.detail);
		throw problem;
	}
}
