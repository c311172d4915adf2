import { redirect } from '@sveltejs/kit';
import { emailSchema, nameSchema } from '$lib/schemas/people';
import { checkForm, field, refused } from '$lib/server/forms';
import { administratorIds } from '$lib/server/people/accounts';
import { linkLimit } from '$lib/server/people/limits';
import { setUp } from '$lib/server/people/links';
import { passwordErrors } from '$lib/server/people/newPasswordForm';
import { enter } from '$lib/server/people/signIn';
import { readFormData } from '$lib/server/people/signInForm';
import { setUp as words, signIn } from '$lib/strings/people';
import { z } from 'zod';
import type { Actions, PageServerLoad } from './$types';

const schema = z.object({ email: emailSchema, name: nameSchema });

export const load: PageServerLoad = async ({ url }) => ({
	done: (await administratorIds()).length > 0,
	key: url.searchParams.get('key') ?? ''
});

export const actions: Actions = {
	default: async (event) => {
		const form = await readFormData(event);
		const { data, errors } = checkForm(form, schema);
		const password = field(form, 'password');
		const key = field(form, 'key').trim();
		const wrong = {
			...errors,
			...(await passwordErrors(password, [field(form, 'name'), field(form, 'email')]))
		};
		if (!data || Object.keys(wrong).length > 0) return refused('set-up', form, wrong);
		const seconds = await linkLimit.take(event.getClientAddress());
		if (seconds > 0) return refused('set-up', form, { '': signIn.wait(seconds) }, 429);
		const person = await setUp(key, { ...data, password });
		if (!person) return refused('set-up', form, { key: words.wrongKey });
		await enter(event, person);
		redirect(303, '/administration/invitations');
	}
};
