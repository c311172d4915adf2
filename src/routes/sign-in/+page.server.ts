import { redirect } from '@sveltejs/kit';
import { field } from '$lib/server/forms';
import { ownAddress } from '$lib/server/ownAddress';
import { stopWaiting, waitsForCode } from '$lib/server/people/signIn';
import { codeStep, passwordStep, readFormData } from '$lib/server/people/signInForm';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const { url } = event;
	return {
		to: ownAddress(url.searchParams.get('to'), url.origin),
		waiting: await waitsForCode(event),
		plain: url.protocol === 'http:' && url.hostname !== 'localhost' && url.hostname !== '127.0.0.1'
	};
};

export const actions: Actions = {
	password: async (event) => {
		const form = await readFormData(event);
		const step = await passwordStep(event, form);
		if (typeof step !== 'string') return step;
		const to = ownAddress(form.get('to'), event.url.origin);
		redirect(303, step === 'signed in' ? to : `/sign-in?${new URLSearchParams({ to })}`);
	},
	code: async (event) => {
		const form = await readFormData(event);
		const step = await codeStep(event, form);
		if (typeof step !== 'string') return step;
		redirect(303, ownAddress(form.get('to'), event.url.origin));
	},
	other: async (event) => {
		const form = await readFormData(event);
		stopWaiting(event);
		redirect(303, `/sign-in?${new URLSearchParams({ to: field(form, 'to') })}`);
	}
};
