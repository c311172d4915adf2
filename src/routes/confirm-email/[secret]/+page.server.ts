import { done, refused } from '$lib/server/forms';
import { linkLimit } from '$lib/server/people/limits';
import { confirmEmail, findLink } from '$lib/server/people/links';
import { readFormData } from '$lib/server/people/signInForm';
import { confirmEmail as words, signIn } from '$lib/strings/people';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ params, setHeaders }) => {
	setHeaders({ 'cache-control': 'no-store' });
	return { email: (await findLink('email-change', params.secret))?.email ?? null };
};

export const actions: Actions = {
	default: async (event) => {
		const form = await readFormData(event);
		const seconds = await linkLimit.take(event.getClientAddress());
		if (seconds > 0) return refused('confirm', form, { '': signIn.wait(seconds) }, 429);
		const email = await confirmEmail(event.params.secret);
		return email ? done('confirm', words.done(email)) : refused('confirm', form, { '': words.deadLead });
	}
};
