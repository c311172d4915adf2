import { done, field, refused } from '$lib/server/forms';
import { setPassword } from '$lib/server/people/accounts';
import { passwordErrors } from '$lib/server/people/newPasswordForm';
import { ownPasswordErrors } from '$lib/server/people/ownPassword';
import { requireUser } from '$lib/server/people/roles';
import { readFormData } from '$lib/server/people/signInForm';
import { account as words } from '$lib/strings/account';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = () => ({ email: requireUser().email });

export const actions: Actions = {
	default: async (event) => {
		const user = requireUser();
		const form = await readFormData(event);
		const password = field(form, 'password');
		const errors = {
			...(await passwordErrors(password, [user.name, user.email])),
			...(await ownPasswordErrors(user.id, form))
		};
		if (Object.keys(errors).length > 0) return refused('password', form, errors);
		await setPassword(user.id, password, user.handle, 'password changed');
		return done('password', words.password.done);
	}
};
