import { redirect } from '@sveltejs/kit';
import { field, refused } from '$lib/server/forms';
import { linkLimit } from '$lib/server/people/limits';
import { personOfReset, resetPassword } from '$lib/server/people/links';
import { passwordErrors } from '$lib/server/people/newPasswordForm';
import { afterReset } from '$lib/server/people/signIn';
import { readFormData } from '$lib/server/people/signInForm';
import { reset as words, signIn } from '$lib/strings/people';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ params, setHeaders }) => {
	setHeaders({ 'cache-control': 'no-store' });
	return { email: (await personOfReset(params.secret))?.email ?? null };
};

export const actions: Actions = {
	default: async (event) => {
		const form = await readFormData(event);
		const seconds = await linkLimit.take(event.getClientAddress());
		if (seconds > 0) return refused('new', form, { '': signIn.wait(seconds) }, 429);
		const owner = await personOfReset(event.params.secret);
		if (!owner) return refused('new', form, { '': words.deadLead });
		const password = field(form, 'password');
		const errors = await passwordErrors(password, [owner.name, owner.email]);
		if (errors.password) return refused('new', form, errors);
		const person = await resetPassword(event.params.secret, password);
		if (!person) return refused('new', form, { '': words.deadLead });
		// A mailbox replaces the password, not the second factor.
		redirect(303, (await afterReset(event, person)) === 'signed in' ? '/account' : '/sign-in?to=%2Faccount');
	}
};
