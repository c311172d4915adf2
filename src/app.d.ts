declare global {
	namespace App {
		interface Error {
			message: string;
			/** Finds the whole error in the server's log. */
			id?: string;
		}
		interface Locals {
			requestId: string;
			preferences: import('$lib/schemas/preferences').Preferences;
		}
	}
}

export {};
