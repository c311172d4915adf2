import { error } from '@sveltejs/kit';
import { emailSchema, rolesSchema } from '$lib/schemas/people';
import { checkForm, done, field, refused } from '$lib/server/forms';
import { mailRoute } from '$lib/server/mail/transport';
import { invite, listInvitations, revoke, sendAgain } from '$lib/server/people/invitations';
import { invitationLimit } from '$lib/server/people/limits';
import { requireRole } from '$lib/server/people/roles';
import { readFormData } from '$lib/server/people/signInForm';
import { administration } from '$lib/strings/administration';
import { z } from 'zod';
import type { Actions, PageServerLoad } from './$types';

const words = administration.invitations;
const schema = z.object({ email: emailSchema, roles: rolesSchema });

/** A link goes on the screen only where no mail carries it. */
const shown = (link: string) => (mailRoute() === 'none' ? link : null);

/** The invitation's id of a form. */
function idOf(form: FormData): number {
	const id = Number(field(form, 'id'));
	return Number.isSafeInteger(id) ? id : error(404, 'There is no such invitation.');
}

export const load: PageServerLoad = async ({ setHeaders }) => {
	requireRole('administrator');
	setHeaders({ 'cache-control': 'no-store' });
	return { invitations: await listInvitations() };
};

export const actions: Actions = {
	invite: async (event) => {
		const user = requireRole('administrator');
		const form = await readFormData(event);
		const { data, errors } = checkForm(form, schema, ['roles']);
		if (!data) return refused('invite', form, errors);
		if ((await invitationLimit.take(user.id)) > 0) return refused('invite', form, { '': words.wait }, 429);
		const outcome = await invite(user, data.email, data.roles);
		if (outcome === 'has an account') return refused('invite', form, { email: words.hasAccount }, 409);
		if (outcome === 'invited already') return refused('invite', form, { email: words.invitedAlready }, 409);
		return { ...done('invite', words.sent(data.email)), link: shown(outcome.link) };
	},
	again: async (event) => {
		const user = requireRole('administrator');
		const form = await readFormData(event);
		if ((await invitationLimit.take(user.id)) > 0) return refused('pending', form, { '': words.wait }, 429);
		const sent = (await sendAgain(user, idOf(form))) ?? error(404, 'There is no such invitation.');
		return { ...done('pending', words.sentAgain), link: shown(sent.link) };
	},
	revoke: async (event) => {
		requireRole('administrator');
		const form = await readFormData(event);
		if (!(await revoke(idOf(form)))) error(404, 'There is no such invitation.');
		return done('pending', words.revoked);
	}
};
