import { error, type RequestEvent } from '@sveltejs/kit';
import { mailQuerySchema } from '$lib/schemas/people';
import type { Mail } from '$lib/server/db/models/mail';
import { done, field } from '$lib/server/forms';
import { listMail } from '$lib/server/mail/outbox';
import { dropMail, retryMail } from '$lib/server/mail/queue';
import { fromCursor, pageQuery } from '$lib/server/pageQuery';
import { inTransaction } from '$lib/server/people/accounts';
import { recordAudit } from '$lib/server/people/audit';
import { requireRole } from '$lib/server/people/roles';
import { readFormData } from '$lib/server/people/signInForm';
import { administration } from '$lib/strings/administration';
import type { Actions, PageServerLoad } from './$types';

const words = administration.mail;

export const load: PageServerLoad = async ({ url }) => {
	requireRole('administrator');
	const query = pageQuery(url.searchParams, mailQuerySchema);
	return { query, ...(await fromCursor(query, ({ state, cursor }) => listMail(state, cursor))) };
};

/** Does something to the mail of a form, with its line in the audit log. */
async function change(event: RequestEvent, work: typeof retryMail, action: 'mail retried' | 'mail dropped') {
	const id = Number(field(await readFormData(event), 'id'));
	const mail: Mail | null = Number.isSafeInteger(id)
		? await inTransaction(async (transaction) => {
				const changed = await work(id, transaction);
				if (changed)
					await recordAudit({ action, subject: changed.recipient, detail: changed.kind }, transaction);
				return changed;
			})
		: null;
	if (!mail) error(404, 'There is no such mail, or nothing is left of it to send.');
}

export const actions: Actions = {
	retry: async (event) => {
		requireRole('administrator');
		await change(event, retryMail, 'mail retried');
		return done('mail', words.retried);
	},
	drop: async (event) => {
		requireRole('administrator');
		await change(event, dropMail, 'mail dropped');
		return done('mail', words.dropped);
	}
};
