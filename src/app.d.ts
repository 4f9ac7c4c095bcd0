import type { SessionEnd, SignedInPerson } from '$lib/schemas/people';

declare global {
	namespace App {
		interface Error {
			message: string;
			/** Ties what the user sees to the log. */
			id?: string;
			code?: string;
		}
		interface Locals {
			/** Nobody is signed in when null. */
			person: SignedInPerson | null;
			sessionId: string | null;
			/** Why the session that came along lets nobody in; null where none came, or it does. */
			sessionEnd: SessionEnd | null;
			requestId: string;
		}
	}
}

export {};
