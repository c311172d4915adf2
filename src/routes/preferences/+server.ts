import { error, redirect, type RequestHandler } from '@sveltejs/kit';
import { changedPreferences } from '$lib/schemas/preferences';
import { PREFERENCES_COOKIE } from '$lib/server/hooks/preferences';
import { ownAddress } from '$lib/server/ownAddress';

const KEPT_SECONDS = 365 * 24 * 60 * 60;

/** Keeps a visitor's preferences in a cookie and goes back to the page they came from. */
export const POST: RequestHandler = async ({ request, cookies, url, locals }) => {
	const form = await request.formData().catch(() => error(400, 'This is not the form of the preferences.'));
	const chosen = changedPreferences(locals.preferences, form);
	if (chosen) {
		cookies.set(PREFERENCES_COOKIE, JSON.stringify(chosen), {
			path: '/',
			maxAge: KEPT_SECONDS,
			httpOnly: true,
			sameSite: 'lax',
			// Kit's default would have browsers drop the cookie on a clinic's own network without https.
			secure: url.protocol === 'https:'
		});
	}
	redirect(303, ownAddress(form.get('back'), url.origin));
};
