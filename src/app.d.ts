import type { Preferences } from '$lib/schemas/preferences';

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
		}
	}
}

export {};
