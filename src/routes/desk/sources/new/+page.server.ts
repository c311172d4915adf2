import { fail, redirect } from '@sveltejs/kit';
import { reasonSchema, sourceFieldsSchema } from '$lib/schemas/sources';
import { PASTED_FORMATS } from '$lib/schemas/terms';
import { environment } from '$lib/server/config';
import { serverDatabase } from '$lib/server/db/server';
import { checkForm, done, field, refused } from '$lib/server/forms';
import { requireRole } from '$lib/server/people/roles';
import { readFormData } from '$lib/server/people/signInForm';
import { readCitation } from '$lib/server/table/citations';
import { lookUpDoi } from '$lib/server/table/doi';
import { findDuplicates } from '$lib/server/table/duplicates';
import { proposeSource } from '$lib/server/table/newSource';
import { fieldsOf, withFields } from '$lib/server/table/sourceFields';
import { createSource } from '$lib/server/table/sourceRecords';
import { sourceDesk as words } from '$lib/strings/sourceDesk';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = () => {
	requireRole('educator');
	return { canLookUp: environment.CROSSREF_URL !== undefined, empty: fieldsOf({ id: '' }) };
};

export const actions: Actions = {
	doi: async (event) => {
		requireRole('educator');
		const form = await readFormData(event);
		const answer = await lookUpDoi(field(form, 'doi'));
		if (!answer.found) return refused('doi', form, { doi: words.doiFailures[answer.reason] });
		const proposal = await proposeSource(await serverDatabase(), answer.csl, answer.retraction);
		return { ...done('doi', words.checkBefore), proposal };
	},
	paste: async (event) => {
		requireRole('educator');
		const form = await readFormData(event);
		const format = PASTED_FORMATS.find((one) => one === field(form, 'format')) ?? 'bibtex';
		const answer = readCitation(field(form, 'text'), format);
		if ('failure' in answer) return refused('paste', form, { text: words.pasteFailures[answer.failure] });
		return {
			...done('paste', words.checkBefore),
			proposal: await proposeSource(await serverDatabase(), answer.csl)
		};
	},
	save: async (event) => {
		const editor = requireRole('educator');
		const form = await readFormData(event);
		const { data, errors } = checkForm(form, sourceFieldsSchema);
		const retract = field(form, 'retract') === 'yes';
		const reason = retract ? reasonSchema.safeParse(field(form, 'reason')) : null;
		const reasonError = reason && !reason.success ? { reason: reason.error.issues[0].message } : null;
		if (!data || reasonError) return refused('save', form, { ...errors, ...reasonError });
		const db = await serverDatabase();
		const csl = withFields({ id: '' }, data);
		const duplicates = await findDuplicates(db, csl);
		if (duplicates.length > 0 && field(form, 'anyway') !== 'yes') {
			const { data: outcome } = refused('save', form, { '': words.duplicateChoose });
			return fail(409, { ...outcome, duplicates });
		}
		const notice = field(form, 'notice').trim() || null;
		const id = await createSource(
			db,
			editor,
			csl,
			field(form, 'why').trim() || words.whyAdded,
			reason?.success ? { reason: reason.data, notice } : null
		);
		redirect(303, `/desk/sources/${encodeURIComponent(id)}`);
	}
};
