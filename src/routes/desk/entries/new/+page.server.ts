import { fail, redirect } from '@sveltejs/kit';
import { emptyEntry } from '$lib/entry/content';
import { serverDatabase } from '$lib/server/db/server';
import { requireRole } from '$lib/server/people/roles';
import { contextFor } from '$lib/server/table/deskContext';
import { lookAt, readForm, sourceSuggestions } from '$lib/server/table/deskForm';
import { createDraft } from '$lib/server/table/entryDrafts';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ url }) => {
	requireRole('educator');
	const read = (name: string, usual: string) => (url.searchParams.get(name) ?? usual).slice(0, 200);
	const blank = emptyEntry();
	const text = {
		...blank,
		...{ source: read('source', ''), tooth: read('tooth', 'maxillary-first-molar'), root: read('root', '') }
	};
	return {
		text,
		context: await contextFor(await serverDatabase(), text, null),
		sources: await sourceSuggestions()
	};
};

export const actions: Actions = {
	check: async ({ request }) => {
		requireRole('educator');
		return lookAt(await serverDatabase(), await request.formData(), null);
	},
	save: async ({ request }) => {
		const person = requireRole('educator');
		const db = await serverDatabase();
		const { text, context, content } = await readForm(db, await request.formData(), null);
		if (!content) return fail(422, { text, context, tried: true });
		redirect(303, `/desk/entries/${await createDraft(db, content, person)}?saved`);
	}
};
