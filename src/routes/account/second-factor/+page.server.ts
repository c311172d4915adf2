import { done, field, refused } from '$lib/server/forms';
import { codeLimit } from '$lib/server/people/limits';
import { ownPasswordErrors } from '$lib/server/people/ownPassword';
import { requireUser } from '$lib/server/people/roles';
import {
	beginFactor,
	confirmFactor,
	recoveryCodesLeft,
	removeFactor,
	renewRecoveryCodes
} from '$lib/server/people/secondFactor';
import { readFormData } from '$lib/server/people/signInForm';
import { account as words } from '$lib/strings/account';
import { signIn } from '$lib/strings/people';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ setHeaders }) => {
	const user = requireUser();
	setHeaders({ 'cache-control': 'no-store' });
	return { on: user.secondFactor, left: await recoveryCodesLeft(user.id) };
};

export const actions: Actions = {
	begin: async (event) => {
		const user = requireUser();
		const form = await readFormData(event);
		const errors = await ownPasswordErrors(user.id, form);
		if (Object.keys(errors).length > 0) return refused('begin', form, errors);
		return { ...done('begin', ''), enrolment: await beginFactor(user.id) };
	},
	confirm: async (event) => {
		const user = requireUser();
		const form = await readFormData(event);
		const seconds = await codeLimit.take(user.id);
		if (seconds > 0) return refused('confirm', form, { '': signIn.wait(seconds) }, 429);
		const codes = await confirmFactor(user.id, field(form, 'code'));
		if (!codes) {
			const failure = refused('confirm', form, { code: words.factor.wrong });
			return { ...failure.data, enrolment: user.secondFactor ? null : await beginFactor(user.id) };
		}
		event.locals.user = { ...user, secondFactor: true };
		return { ...done('confirm', words.factor.on), codes };
	},
	renew: async (event) => {
		const user = requireUser();
		const form = await readFormData(event);
		const errors = await ownPasswordErrors(user.id, form);
		if (Object.keys(errors).length > 0) return refused('renew', form, errors);
		return { ...done('renew', ''), codes: await renewRecoveryCodes(user) };
	},
	remove: async (event) => {
		const user = requireUser();
		const form = await readFormData(event);
		const errors = await ownPasswordErrors(user.id, form);
		if (Object.keys(errors).length > 0) return refused('remove', form, errors);
		await removeFactor(user.id);
		event.locals.user = { ...user, secondFactor: false };
		return done('remove', words.factor.removed);
	}
};
