import { eq } from 'drizzle-orm';
import type { Actor } from './actor';
import { db } from '../db';
import { users } from '../db/schema';
import { AppError, notFound } from '../errors';
import { countAttempt, forgiveAttempts } from './attempts';
import { hashPassword, passwordFits } from './password';
import { closeAllSessions } from './session';

/**
 * Sets a new password for who knows the present one, and ends every session of that person: the caller opens a new one
 * for this browser.
 * @param host where the request came from
 */
export async function changePassword(
	actor: Actor,
	current: string,
	next: string,
	host: string
): Promise<void> {
	const [user] = await db.select().from(users).where(eq(users.id, actor.userId));
	if (!user) throw notFound();
	const who = `${user.email} ${host}`;
	await countAttempt('sign-in', who);
	if (!(await passwordFits(user.passwordHash, current)))
		throw new AppError('invalid', 'The password was not changed.', {
			errors: [{ path: 'current', message: 'This is not your present password: check it and type it again.' }]
		});
	await forgiveAttempts('sign-in', who);
	await db
		.update(users)
		.set({ passwordHash: await hashPassword(next) })
		.where(eq(users.id, actor.userId));
	await closeAllSessions(actor.userId);
}
