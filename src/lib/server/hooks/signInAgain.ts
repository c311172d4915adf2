import type { Handle } from '@sveltejs/kit';
import { keptFields, valuesOf } from '../people/keptForm';

/**
 * A form that comes without a sign-in, because it has expired or ended meanwhile, loses nothing:
 * - sent by the page's script, it gets a failed action `{ signInAgain: true, values }`. The page keeps what is typed, and the layout asks
 *   to sign in in another tab and to send again.
 * - sent by the browser itself, it is sent on (307 keeps method and body) to /sign-in/again, which carries what was typed through the
 *   sign-in and then offers to send it where it was meant to go.
 * Works for every action that begins with requireUser or requireRole; a page needs nothing for it.
 */
export const signInAgain: Handle = async ({ event, resolve }) => {
	const response = await resolve(event);
	if (!event.locals.signInNeeded) return response;
	const { url, request } = event;
	if (request.headers.get('x-sveltekit-action') === 'true') {
		const form = request.bodyUsed ? new FormData() : await request.formData().catch(() => new FormData());
		const failure = { type: 'failure', status: 401, data: actionData(valuesOf(keptFields(form).fields)) };
		return Response.json(failure, { headers: { 'cache-control': 'no-store' } });
	}
	const to = new URLSearchParams({ to: url.pathname + url.search });
	return new Response(null, { status: 307, headers: { location: `/sign-in/again?/carry&${to}` } });
};

/**
 * `{ signInAgain: true, values }` as kit sends the data of an action: a flat list in which objects and lists hold the places of their
 * parts (devalue's format).
 */
function actionData(values: Record<string, string | string[]>): string {
	const flat: unknown[] = [{ signInAgain: 1, values: 2 }, true, {}];
	const add = (value: unknown) => flat.push(value) - 1;
	const places = Object.entries(values).map(([name, value]) => [
		name,
		add(typeof value === 'string' ? value : value.map(add))
	]);
	flat[2] = Object.fromEntries(places) as unknown;
	return JSON.stringify(flat);
}
