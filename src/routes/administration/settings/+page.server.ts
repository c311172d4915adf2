import { settingsSchema } from '$lib/schemas/people';
import { done, field, refused } from '$lib/server/forms';
import { requireRole } from '$lib/server/people/roles';
import { changeSettings, readSettings } from '$lib/server/people/settings';
import { readFormData } from '$lib/server/people/signInForm';
import { administration } from '$lib/strings/administration';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async () => {
	requireRole('administrator');
	return { settings: await readSettings() };
};

export const actions: Actions = {
	default: async (event) => {
		requireRole('administrator');
		const form = await readFormData(event);
		const result = settingsSchema.safeParse({
			name: field(form, 'name'),
			tableOpen: form.get('tableOpen') === 'on'
		});
		if (!result.success) return refused('settings', form, { name: result.error.issues[0].message });
		await changeSettings(result.data);
		return done('settings', administration.saved);
	}
};
