import { emailSchema, nameSchema } from '$lib/schemas/people';
import { checkForm, done, refused } from '$lib/server/forms';
import { changeName } from '$lib/server/people/accounts';
import { emailChangeLimit } from '$lib/server/people/limits';
import { askEmailChange } from '$lib/server/people/links';
import { ownPasswordErrors } from '$lib/server/people/ownPassword';
import { requireUser } from '$lib/server/people/roles';
import { readFormData } from '$lib/server/people/signInForm';
import { account as words } from '$lib/strings/account';
import { signIn } from '$lib/strings/people';
import { z } from 'zod';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = () => {
	const { name, email, roles } = requireUser();
	return { me: { name, email, roles } };
};

export const actions: Actions = {
	name: async (event) => {
		const user = requireUser();
		const form = await readFormData(event);
		const { data, errors } = checkForm(form, z.object({ name: nameSchema }));
		if (!data) return refused('name', form, errors);
		await changeName(user.id, data.name);
		event.locals.user = { ...user, name: data.name };
		return done('name', words.saved);
	},
	email: async (event) => {
		const user = requireUser();
		const form = await readFormData(event);
		const { data, errors } = checkForm(form, z.object({ email: emailSchema }));
		const wrong = { ...errors, ...(await ownPasswordErrors(user.id, form)) };
		if (!data || Object.keys(wrong).length > 0) return refused('email', form, wrong);
		const seconds = await emailChangeLimit.take(user.id);
		if (seconds > 0) return refused('email', form, { '': signIn.wait(seconds) }, 429);
		await askEmailChange(user.id, data.email);
		return done('email', words.profile.emailSent(data.email));
	}
};
