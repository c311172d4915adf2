import { error } from '@sveltejs/kit';
import { tokenSchema } from '$lib/schemas/people';
import { checkForm, done, field, refused } from '$lib/server/forms';
import { requireUser } from '$lib/server/people/roles';
import { readFormData } from '$lib/server/people/signInForm';
import { listTokens, makeToken, revokeToken } from '$lib/server/people/tokens';
import { account as words } from '$lib/strings/account';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ setHeaders }) => {
	const user = requireUser();
	setHeaders({ 'cache-control': 'no-store' });
	return { tokens: await listTokens(user.id) };
};

export const actions: Actions = {
	make: async (event) => {
		const user = requireUser();
		const form = await readFormData(event);
		const { data, errors } = checkForm(form, tokenSchema, ['scopes']);
		if (!data) return refused('make', form, errors);
		const token = await makeToken(user, data.name, data.scopes, data.days);
		if (token === null) return refused('make', form, { '': words.tokens.tooMany });
		return { ...done('make', ''), token };
	},
	revoke: async (event) => {
		const user = requireUser();
		const form = await readFormData(event);
		const id = Number(field(form, 'id'));
		// The token of somebody else is not there for this person.
		if (!Number.isSafeInteger(id) || !(await revokeToken(user, id))) error(404, 'You have no such token.');
		return done('revoke', words.tokens.revoked);
	}
};
