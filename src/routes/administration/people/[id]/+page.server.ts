import { error } from '@sveltejs/kit';
import { rolesSchema } from '$lib/schemas/people';
import { checkForm, done, refused } from '$lib/server/forms';
import { deactivate, reactivate, setRoles, type ChangeOutcome } from '$lib/server/people/accounts';
import { recordAudit } from '$lib/server/people/audit';
import { findPerson } from '$lib/server/people/directory';
import { makeResetLink } from '$lib/server/people/links';
import { requireRole } from '$lib/server/people/roles';
import { removeFactor } from '$lib/server/people/secondFactor';
import { endSessions, listDevices } from '$lib/server/people/sessions';
import { readFormData } from '$lib/server/people/signInForm';
import { administration } from '$lib/strings/administration';
import { z } from 'zod';
import type { Actions, PageServerLoad } from './$types';

const words = administration.person;
const UNKNOWN = 'There is no such person.';

/** The person of the address. */
async function known(id: string) {
	return (await findPerson(id)) ?? error(404, UNKNOWN);
}

/** Answers a change of one form of the page. */
function answer(at: string, form: FormData, outcome: ChangeOutcome) {
	if (outcome === 'unknown') error(404, UNKNOWN);
	return outcome === 'done'
		? done(at, administration.saved)
		: refused(at, form, { '': words.lastAdministrator }, 409);
}

export const load: PageServerLoad = async ({ params, setHeaders }) => {
	requireRole('administrator');
	setHeaders({ 'cache-control': 'no-store' });
	const person = await known(params.id);
	return { person, devices: (await listDevices(person.id)).length };
};

export const actions: Actions = {
	roles: async (event) => {
		requireRole('administrator');
		const form = await readFormData(event);
		const { data, errors } = checkForm(form, z.object({ roles: rolesSchema }), ['roles']);
		if (!data) return refused('roles', form, errors);
		return answer('roles', form, await setRoles(event.params.id, data.roles));
	},
	deactivate: async (event) => {
		requireRole('administrator');
		return answer('account', new FormData(), await deactivate(event.params.id));
	},
	reactivate: async (event) => {
		requireRole('administrator');
		return answer('account', new FormData(), await reactivate(event.params.id));
	},
	factor: async ({ params }) => {
		requireRole('administrator');
		if (!(await removeFactor(params.id))) error(404, UNKNOWN);
		return done('factor', administration.saved);
	},
	reset: async ({ params }) => {
		requireRole('administrator');
		const made = (await makeResetLink(params.id)) ?? error(404, UNKNOWN);
		return { ...done('reset', ''), made };
	},
	devices: async ({ params }) => {
		requireRole('administrator');
		const person = await known(params.id);
		const count = await endSessions(person.id, null);
		await recordAudit({ action: 'all devices signed out', subject: person.email });
		return done('devices', words.signedOut(count));
	}
};
