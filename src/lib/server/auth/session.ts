/** Lucia's sessions in MariaDB. */
import { DrizzleMySQLAdapter } from '@lucia-auth/adapter-drizzle';
import { Lucia, TimeSpan } from 'lucia';
import type { Cookies } from '@sveltejs/kit';
import { db } from '../db';
import { sessions, users } from '../db/schema';
import { origin } from '../env';

export interface SessionUser {
	id: string;
	email: string;
	name: string;
}

declare module 'lucia' {
	interface Register {
		Lucia: ReturnType<typeof make>;
		DatabaseUserAttributes: { email: string; name: string; passwordHash: string; createdAt: Date };
	}
}

function make(secure: boolean) {
	return new Lucia(new DrizzleMySQLAdapter(db, sessions, users), {
		sessionExpiresIn: new TimeSpan(30, 'd'),
		// A browser drops a `secure` cookie that comes over plain http, which is what a copy on loopback speaks.
		sessionCookie: { name: 'tiltyard_session', attributes: { secure, sameSite: 'lax', path: '/' } },
		getUserAttributes: ({ email, name }) => ({ email, name })
	});
}

let lucia: ReturnType<typeof make> | undefined;

export function sessionService() {
	lucia ??= make(origin()?.startsWith('https://') ?? false);
	return lucia;
}

/** Signs a person in on this browser. */
export async function openSession(userId: string, cookies: Cookies): Promise<void> {
	const service = sessionService();
	const session = await service.createSession(userId, {});
	const cookie = service.createSessionCookie(session.id);
	cookies.set(cookie.name, cookie.value, { path: '/', ...cookie.attributes });
}

/** Who sits at this browser; renews the cookie when the session was prolonged, takes it away when it has ended. */
export async function readSession(
	cookies: Cookies
): Promise<{ sessionId: string; user: SessionUser } | null> {
	const service = sessionService();
	const sessionId = cookies.get(service.sessionCookieName);
	if (!sessionId) return null;
	const { session, user } = await service.validateSession(sessionId);
	if (!session) {
		dropCookie(cookies);
		return null;
	}
	if (session.fresh) {
		const cookie = service.createSessionCookie(session.id);
		cookies.set(cookie.name, cookie.value, { path: '/', ...cookie.attributes });
	}
	return { sessionId: session.id, user: { id: user.id, email: user.email, name: user.name } };
}

/** Signs out: the session ends on the server too. */
export async function closeSession(sessionId: string, cookies: Cookies): Promise<void> {
	await sessionService().invalidateSession(sessionId);
	dropCookie(cookies);
}

/** Ends every session of a person, wherever it is open. */
export async function closeAllSessions(userId: string): Promise<void> {
	await sessionService().invalidateUserSessions(userId);
}

function dropCookie(cookies: Cookies): void {
	const cookie = sessionService().createBlankSessionCookie();
	cookies.set(cookie.name, cookie.value, { path: '/', ...cookie.attributes });
}
