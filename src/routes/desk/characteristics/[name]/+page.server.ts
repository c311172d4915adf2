import { error, fail, redirect } from '@sveltejs/kit';
import { characteristicText, checkCharacteristic, type CharacteristicText } from '$lib/entry/characteristic';
import { Source } from '$lib/server/db/models/literature';
import { Problem } from '$lib/server/api/problem';
import { serverDatabase } from '$lib/server/db/server';
import { requireRole } from '$lib/server/people/roles';
import { actOnCharacteristic } from '$lib/server/table/characteristicActions';
import { readCharacteristic, saveCharacteristic } from '$lib/server/table/characteristicDesk';
import { readCharacteristicPage } from '$lib/server/table/characteristicPage';
import { actionFields, refusedAction } from '$lib/server/table/deskForm';
import { sourcesById } from '$lib/server/table/sources';
import type { Actions, PageServerLoad } from './$types';

const existing = async (name: string) =>
	(await readCharacteristic(name)) ?? error(404, 'There is no such characteristic.');

export const load: PageServerLoad = async ({ params }) => {
	const person = requireRole('educator');
	const page = await readCharacteristicPage(await existing(params.name), person);
	const ids = `${page.inForce.sourceIds};${page.content.sourceIds}`.split(';').filter(Boolean);
	return { ...page, text: characteristicText(page.content), sources: await sourcesById([...new Set(ids)]) };
};

export const actions: Actions = {
	save: async ({ request, params }) => {
		const person = requireRole('educator');
		const now = await existing(params.name);
		const form = await request.formData();
		const { expected } = actionFields(form);
		const text = Object.fromEntries(
			Object.keys(characteristicText(now.content)).map((field) => {
				const value = form.get(field);
				return [field, typeof value === 'string' ? value : ''];
			})
		) as CharacteristicText;
		const known = new Set((await Source.findAll({ attributes: ['id'] })).map(({ id }) => id));
		const { content, remarks } = checkCharacteristic(text, now.kind, (id) => known.has(id));
		if (!content) return fail(422, { text, remarks });
		try {
			await saveCharacteristic(await serverDatabase(), { name: params.name, person, expected }, content);
		} catch (problem) {
			if (!(problem instanceof Problem)) throw problem;
			// What was saved meanwhile stands beside what was typed; sending again means that the typed one shall stand.
			const theirs = problem.errors.map(({ path, message }) => ({
				level: 'warning' as const,
				path,
				message
			}));
			const fresh = await existing(params.name);
			return fail(problem.status, { text, remarks: theirs, message: problem.detail, expected: fresh.number });
		}
		return { done: true };
	},
	act: async ({ request, params }) => {
		const person = requireRole('educator');
		await existing(params.name);
		const form = await request.formData();
		let tableRevision: number | null;
		try {
			const fields = { ...actionFields(form), name: params.name, person };
			tableRevision = await actOnCharacteristic(await serverDatabase(), fields);
		} catch (problem) {
			if (problem instanceof Problem) return refusedAction(form, problem);
			throw problem;
		}
		if (tableRevision !== null) redirect(303, `/table/revisions#revision-${tableRevision}`);
		return { done: true };
	}
};
