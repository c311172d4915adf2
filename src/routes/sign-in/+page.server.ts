import { redirect } from '@sveltejs/kit';
import { ownAddress } from '$lib/server/ownAddress';
import { stopWaiting, waitsForCode } from '$lib/server/people/signIn';
import { codeStep, passwordStep, readFormData } from '$lib/server/people/signInForm';
import type { Actions, PageServerLoad } from './$types';

/** Where the sign-in leads. */
const onward = (url: URL) => ownAddress(url.searchParams.get('to'), url.origin);
/** This page, with where it leads. */
const here = (url: URL) => `/sign-in?${new URLSearchParams({ to: onward(url) })}`;

export const load: PageServerLoad = async (event) => {
	const { url } = event;
	return {
		to: onward(url),
		waiting: await waitsForCode(event),
		plain: url.protocol === 'http:' && url.hostname !== 'localhost' && url.hostname !== '127.0.0.1'
	};
};

export const actions: Actions = {
	password: async (event) => {
		const form = await readFormData(event);
		const step = await passwordStep(event, form);
		if (typeof step !== 'string') return step;
		redirect(303, step === 'signed in' ? onward(event.url) : here(event.url));
	},
	code: async (event) => {
		const form = await readFormData(event);
		const step = await codeStep(event, form);
		if (typeof step !== 'string') return step;
		redirect(303, onward(event.url));
	},
	other: (event) => {
		stopWaiting(event);
		redirect(303, here(event.url));
	}
};
