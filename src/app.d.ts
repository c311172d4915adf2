import type { Preferences } from '$lib/schemas/preferences';
import type { Role } from '$lib/schemas/terms';
import type { SignedIn } from '$lib/server/people/roles';

declare global {
	namespace App {
		interface Error {
			message: string;
			/** Finds the whole error in the server's log. */
			id?: string;
		}
		interface PageState {
			/** How many changes of the estimator's page lie before this one in the browser's history. */
			changes?: number;
		}
		interface Locals {
			requestId: string;
			preferences: Preferences;
			/** Who makes the request; null for a visitor. */
			user: SignedIn | null;
			/** Set by requireUser when a form came without a sign-in, so that what was typed is carried through it. */
			signInNeeded?: boolean;
		}
		interface PageData {
			/** Who looks at the page; null for a visitor. */
			viewer: { name: string; email: string; roles: Role[] } | null;
			/** The installation's name, empty if it has none. */
			installation: string;
		}
		interface PageData {
			/** From the root layout; absent where even that failed. */
			preferences?: Preferences;
		}
	}
}

export {};
