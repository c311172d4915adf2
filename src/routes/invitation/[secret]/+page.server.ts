import { redirect } from '@sveltejs/kit';
import { nameSchema } from '$lib/schemas/people';
import { checkForm, field, refused } from '$lib/server/forms';
import { accept, findInvitation } from '$lib/server/people/invitations';
import { linkLimit } from '$lib/server/people/limits';
import { passwordErrors } from '$lib/server/people/newPasswordForm';
import { enter } from '$lib/server/people/signIn';
import { readFormData } from '$lib/server/people/signInForm';
import { invitation as words, signIn } from '$lib/strings/people';
import { z } from 'zod';
import type { Actions, PageServerLoad } from './$types';

const schema = z.object({ name: nameSchema });

export const load: PageServerLoad = async ({ params, setHeaders }) => {
	setHeaders({ 'cache-control': 'no-store' });
	return { invitation: await findInvitation(params.secret) };
};

export const actions: Actions = {
	default: async (event) => {
		const form = await readFormData(event);
		const seconds = await linkLimit.take(event.getClientAddress());
		if (seconds > 0) return refused('accept', form, { '': signIn.wait(seconds) }, 429);
		const invitation = await findInvitation(event.params.secret);
		if (!invitation) return refused('accept', form, { '': words.deadLead });
		const { data, errors } = checkForm(form, schema);
		const password = field(form, 'password');
		const wrong = { ...errors, ...(await passwordErrors(password, [field(form, 'name'), invitation.email])) };
		if (!data || Object.keys(wrong).length > 0) return refused('accept', form, wrong);
		const person = await accept(event.params.secret, data.name, password);
		if (!person) return refused('accept', form, { '': words.deadLead });
		await enter(event, person);
		redirect(303, '/account');
	}
};
