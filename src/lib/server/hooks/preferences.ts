import type { Handle } from '@sveltejs/kit';
import { readPreferences, type Preferences } from '$lib/schemas/preferences';

/** Name of the cookie that keeps a visitor's preferences on the device. */
export const PREFERENCES_COOKIE = 'preferences';

/** Reads the preferences cookie and writes the chosen theme into the page's first tag, so that no page flashes. */
export const preferences: Handle = async ({ event, resolve }) => {
	event.locals.preferences = preferencesOf(event.cookies.get(PREFERENCES_COOKIE));
	const { theme } = event.locals.preferences;
	return resolve(event, {
		transformPageChunk: ({ html }) => html.replace('%watersmeet.theme%', theme)
	});
};

/** Preferences from a cookie's text; whatever cannot be read counts as unset. */
function preferencesOf(text: string | undefined): Preferences {
	try {
		return readPreferences(JSON.parse(text ?? '{}'));
	} catch {
		// A cookie that somebody has spoilt is no reason to fail.
		return readPreferences({});
	}
}
