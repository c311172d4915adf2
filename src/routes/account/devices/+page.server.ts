import { error } from '@sveltejs/kit';
import { done, field } from '$lib/server/forms';
import { recordAudit } from '$lib/server/people/audit';
import { requireUser } from '$lib/server/people/roles';
import { endDevice, endSessions, listDevices } from '$lib/server/people/sessions';
import { readFormData } from '$lib/server/people/signInForm';
import { account as words } from '$lib/strings/account';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async () => {
	const user = requireUser();
	const devices = await listDevices(user.id);
	return { devices: devices.map((device) => ({ ...device, here: device.handle === user.handle })) };
};

export const actions: Actions = {
	end: async (event) => {
		const user = requireUser();
		const form = await readFormData(event);
		// The device of somebody else is not there for this person.
		if (!(await endDevice(user.id, field(form, 'device')))) error(404, 'You have no such device.');
		await recordAudit({ action: 'device signed out', subject: user.email });
		return done('devices', words.devices.ended);
	},
	others: async () => {
		const user = requireUser();
		await endSessions(user.id, user.handle);
		await recordAudit({ action: 'all devices signed out', subject: user.email });
		return done('devices', words.devices.ended);
	}
};
