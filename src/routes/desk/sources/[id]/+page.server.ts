import { error, fail, redirect, type RequestEvent } from '@sveltejs/kit';
import { QUESTIONS } from '$lib/schemas/appraisal';
import { appraisalSchema, reasonSchema, sourceFieldsSchema } from '$lib/schemas/sources';
import { serverDatabase } from '$lib/server/db/server';
import { checkForm, done, field, refused } from '$lib/server/forms';
import { requireRole } from '$lib/server/people/roles';
import { readFormData } from '$lib/server/people/signInForm';
import { MOST_ATTACHMENT_BYTES } from '$lib/server/storage/uploads';
import { attach, attachmentsOf, detach } from '$lib/server/table/attachments';
import { lookUpDoi } from '$lib/server/table/doi';
import type { CslSource } from '$lib/server/table/literatureFiles';
import { fieldsOf, withFields } from '$lib/server/table/sourceFields';
import {
	changeSource,
	findKeptSource,
	removeSource,
	revisionsOfSource,
	type SourceChange
} from '$lib/server/table/sourceRecords';
import { appraisal as appraisalWords } from '$lib/strings/appraisal';
import { sourceDesk as words } from '$lib/strings/sourceDesk';
import type { Actions, PageServerLoad } from './$types';

/** What a form is larger than its file by: its other fields and the marks between them. */
const FORM_ROOM_BYTES = 64 * 1024;

async function kept(id: string) {
	return (await findKeptSource(await serverDatabase(), id)) ?? error(404, 'Unknown source.');
}

export const load: PageServerLoad = async ({ params }) => {
	requireRole('educator');
	const source = await kept(params.id);
	const [files, revisions] = await Promise.all([attachmentsOf(source.id), revisionsOfSource(source.id)]);
	return {
		source,
		fields: fieldsOf(source.csl as CslSource),
		files,
		revisions: revisions.map(({ number, at, who, why, before, after }) => ({
			...{ number, at, who, why },
			parts: (['csl', 'retraction', 'appraisal'] as const).filter(
				(part) => JSON.stringify(before?.[part] ?? null) !== JSON.stringify(after?.[part] ?? null)
			)
		}))
	};
};

/** Changes the source as one of the page's forms asks; a stale edit gets what stands now, and may be sent again. */
async function change(
	event: RequestEvent & { params: { id: string } },
	at: string,
	form: FormData,
	what: SourceChange,
	said: string = words.saved
) {
	const editor = requireRole('educator');
	const expected = Number(field(form, 'revision'));
	const outcome = await changeSource(await serverDatabase(), editor, event.params.id, expected, what);
	if (outcome === null) error(404, 'Unknown source.');
	if (typeof outcome === 'number') return done(at, said);
	const { data } = refused(at, form, { '': words.stale });
	return fail(409, {
		...data,
		values: { ...data.values, revision: String(outcome.revision) },
		current: fieldsOf(outcome.current.csl)
	});
}

export const actions: Actions = {
	save: async (event) => {
		requireRole('educator');
		const form = await readFormData(event);
		const { data, errors } = checkForm(form, sourceFieldsSchema);
		const why = reasonSchema.safeParse(field(form, 'why'));
		if (!data || !why.success)
			return refused('save', form, { ...errors, ...(!why.success && { why: why.error.issues[0].message }) });
		const { csl } = await kept(event.params.id);
		return change(event, 'save', form, { csl: withFields(csl as CslSource, data), why: why.data });
	},
	retract: async (event) => {
		requireRole('educator');
		const form = await readFormData(event);
		const reason = reasonSchema.safeParse(field(form, 'reason'));
		if (!reason.success) return refused('retract', form, { reason: reason.error.issues[0].message });
		const retraction = { reason: reason.data, notice: field(form, 'notice').trim().slice(0, 300) || null };
		return change(event, 'retract', form, { retraction, why: reason.data });
	},
	unretract: async (event) => {
		requireRole('educator');
		const form = await readFormData(event);
		const reason = reasonSchema.safeParse(field(form, 'reason'));
		if (!reason.success) return refused('retract', form, { reason: reason.error.issues[0].message });
		return change(event, 'retract', form, { retraction: null, why: reason.data });
	},
	check: async (event) => {
		requireRole('educator');
		const { doi } = await kept(event.params.id);
		const form = await readFormData(event);
		if (!doi) return refused('retract', form, { '': words.noDoi });
		const answer = await lookUpDoi(doi);
		if (!answer.found) return refused('retract', form, { '': words.doiFailures[answer.reason] });
		if (!answer.retraction) return done('retract', words.noNotice);
		const { doi: notice, date, kind } = answer.retraction;
		const values = { notice, reason: words.noticeReason(kind, date) };
		return { ...done('retract', words.noticeFound(notice, date)), values };
	},
	appraise: async (event) => {
		requireRole('educator');
		const form = await readFormData(event);
		const { data, errors } = checkForm(form, appraisalSchema, []);
		if (!data) {
			const missing = QUESTIONS.filter((question) => field(form, question) === '');
			const words = Object.fromEntries(missing.map((question) => [question, 'Choose an answer.']));
			return refused('appraise', form, { ...errors, ...words });
		}
		const appraisal = { answers: data, note: field(form, 'remarks').trim().slice(0, 5000) };
		return change(event, 'appraise', form, { appraisal, why: appraisalWords.why }, appraisalWords.saved);
	},
	attach: async (event) => {
		const editor = requireRole('educator');
		const tooLarge = () =>
			fail(413, { ...done('attach', ''), errors: { file: words.uploadFailures['too large'] } });
		if (Number(event.request.headers.get('content-length') ?? 0) > MOST_ATTACHMENT_BYTES + FORM_ROOM_BYTES)
			return tooLarge();
		const form = await event.request.formData().catch(() => null);
		if (!form) return tooLarge();
		const file = form.get('file');
		if (!(file instanceof File)) return refused('attach', form, { file: words.uploadFailures.empty });
		const bytes = Buffer.from(await file.arrayBuffer());
		const caption = field(form, 'caption').slice(0, 300);
		const outcome = await attach(editor, event.params.id, { name: file.name, bytes }, caption);
		if (outcome === null) error(404, 'Unknown source.');
		if ('failure' in outcome) return refused('attach', form, { file: words.uploadFailures[outcome.failure] });
		return done('attach', words.attached);
	},
	detach: async (event) => {
		requireRole('educator');
		const form = await readFormData(event);
		if (!(await detach(event.params.id, field(form, 'file')))) error(404, 'Unknown file.');
		return done('attach', words.detached);
	},
	remove: async (event) => {
		const editor = requireRole('educator');
		const form = await readFormData(event);
		const why = reasonSchema.safeParse(field(form, 'why'));
		if (!why.success) return refused('remove', form, { why: why.error.issues[0].message });
		const expected = Number(field(form, 'revision'));
		const outcome = await removeSource(await serverDatabase(), editor, event.params.id, expected, why.data);
		if (outcome === null) error(404, 'Unknown source.');
		if (outcome === true) redirect(303, '/sources');
		const sentence = outcome === false ? words.inUse : words.stale;
		return refused('remove', form, { '': sentence }, 409);
	}
};
