import { fail, redirect, type RequestEvent } from '@sveltejs/kit';
import { ownAddress } from '$lib/server/ownAddress';
import { keptFields, packForm, unpackForm, type KeptForm } from '$lib/server/people/keptForm';
import { stopWaiting, waitsForCode } from '$lib/server/people/signIn';
import { codeStep, passwordStep, readFormData } from '$lib/server/people/signInForm';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const { url, request } = event;
	const to = ownAddress(url.searchParams.get('to'), url.origin);
	// Opened as a page there is nothing to carry.
	if (request.method === 'GET') redirect(303, `/sign-in?${new URLSearchParams({ to })}`);
	return { to, waiting: await waitsForCode(event) };
};

/** What every step of this page hands to the next: what was typed, and the text that carries it. */
function carried(kept: KeptForm | null) {
	return { kept, packed: kept ? packForm(kept) : '' };
}

type Step = (event: RequestEvent, form: FormData) => ReturnType<typeof passwordStep>;

/** A step of the sign-in that carries what was typed along, whatever comes of it. */
const carrying = (step: Step) => async (event: RequestEvent) => {
	const form = await readFormData(event);
	const kept = carried(unpackForm(form.get('kept')));
	form.delete('kept');
	const result = await step(event, form);
	return typeof result === 'string' ? kept : fail(result.status, { ...result.data, ...kept });
};

export const actions: Actions = {
	/** A form that was sent elsewhere without a sign-in arrives here (hooks/signInAgain.ts). */
	carry: async (event) => carried(keptFields(await readFormData(event))),
	password: carrying(passwordStep),
	code: carrying(codeStep),
	other: carrying((event) => {
		stopWaiting(event);
		return Promise.resolve('code needed' as const);
	})
};
