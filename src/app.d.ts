import type { Scope } from '$lib/schema/account';
import type { Actor } from '$lib/server/auth/actor';
import type { SessionUser } from '$lib/server/auth/session';

declare global {
	namespace App {
		interface Locals {
			/** Names this request in the log, on the error page and in problem answers. */
			requestId: string;
			/** Who acts, by cookie or token; null when nobody is signed in. */
			actor: Actor | null;
			user: SessionUser | null;
			/** Set when the request came with the sign-in cookie. */
			sessionId: string | null;
			/** Set when the request came with a personal token: what it may do. */
			token: { id: string; scopes: Scope[]; expiresAt: Date | null } | null;
		}
		interface Error {
			message: string;
			/** To be told to whoever looks after this copy. */
			reference?: string;
		}
	}
}

export {};
