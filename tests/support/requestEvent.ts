import type { RequestEvent } from '@sveltejs/kit';
import { readPreferences } from '../../src/lib/schemas/preferences';

/** As much of kit's event as endpoints and hooks read, from a request; `more` adds what a test is about. */
export function requestEvent(request: Request, more: Partial<RequestEvent> = {}): RequestEvent {
	return {
		request,
		url: new URL(request.url),
		locals: { preferences: readPreferences({}) } as App.Locals,
		getClientAddress: () => '192.0.2.1',
		...more
	} as RequestEvent;
}
