import type { Handle } from '@sveltejs/kit';
import { preferencesSchema, type Preferences } from '$lib/schemas/preferences';

/** Name of the cookie that keeps a visitor's preferences on the device. */
export const PREFERENCES_COOKIE = 'preferences';

/** Reads the preferences cookie and writes the chosen theme into the page's first tag, so that no page flashes. */
export const preferences: Handle = async ({ event, resolve }) => {
	event.locals.preferences = readPreferences(event.cookies.get(PREFERENCES_COOKIE));
	const { theme } = event.locals.preferences;
	return resolve(event, {
		transformPageChunk: ({ html }) => html.replace('%watersmeet.theme%', theme)
	});
};

/** Preferences from a cookie's text; whatever cannot be read counts as unset. */
function readPreferences(text: string | undefined): Preferences {
	let value: unknown = {};
	try {
		value = JSON.parse(text ?? '{}');
	} catch {
		// A cookie that somebody has spoilt is no reason to fail.
	}
	const result = preferencesSchema.safeParse(value);
	return result.success ? result.data : preferencesSchema.parse({});
}
