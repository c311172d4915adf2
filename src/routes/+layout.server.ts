import { readSettings } from '$lib/server/people/settings';
import type { LayoutServerLoad } from './$types';

export const load: LayoutServerLoad = async ({ locals }) => {
	const { user, preferences } = locals;
	return {
		preferences,
		installation: (await readSettings()).name,
		viewer: user && { name: user.name, email: user.email, roles: user.roles }
	};
};
