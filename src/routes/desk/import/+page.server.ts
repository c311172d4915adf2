import { fail, redirect } from '@sveltejs/kit';
import { done, refused } from '$lib/server/forms';
import { listImports, takeUpload } from '$lib/server/intake/imports';
import { MOST_FILE_BYTES } from '$lib/server/intake/limits';
import { COLUMNS, NEEDED } from '$lib/server/intake/mapping';
import { requireRole } from '$lib/server/people/roles';
import { intake as words } from '$lib/strings/intake';
import type { Actions, PageServerLoad } from './$types';

/** Who may import: educators make drafts; an administrator may publish at once. */
const IMPORTERS = ['educator', 'administrator'] as const;
/** What a form is larger than its file by. */
const FORM_ROOM_BYTES = 16 * 1024;

export const load: PageServerLoad = async () => {
	const person = requireRole(IMPORTERS);
	return {
		imports: await listImports(person.id),
		columns: COLUMNS.map((name) => ({ name, needed: NEEDED.includes(name) }))
	};
};

export const actions: Actions = {
	upload: async ({ request }) => {
		const person = requireRole(IMPORTERS);
		const tooLarge = () =>
			fail(413, {
				...done('upload', ''),
				errors: { file: words.unreadable.tooLarge }
			});
		if (Number(request.headers.get('content-length') ?? 0) > MOST_FILE_BYTES + FORM_ROOM_BYTES)
			return tooLarge();
		const form = await request.formData().catch(() => null);
		if (!form) return tooLarge();
		const file = form.get('file');
		if (!(file instanceof File)) return refused('upload', form, { file: words.unreadable.empty });
		const taken = await takeUpload(person, { name: file.name, bytes: Buffer.from(await file.arrayBuffer()) });
		if ('failure' in taken) return refused('upload', form, { file: taken.failure });
		redirect(303, `/desk/import/${taken.id}`);
	}
};
