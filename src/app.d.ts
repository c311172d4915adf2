import type { Preferences } from '$lib/schemas/preferences';

declare global {
	namespace App {
		interface Error {
			message: string;
			/** Finds the whole error in the server's log. */
			id?: string;
		}
		interface Locals {
			requestId: string;
			preferences: Preferences;
		}
	}
}

export {};
