import { eq, lt } from 'drizzle-orm';
import { db } from '../db';
import { passwordResets, users } from '../db/schema';
import { logger } from '../log';
import { requireMail, sendLetter } from '../mail';
import { countAttempt } from './attempts';
import { hashToken, newSecret } from './tokens';

/** How long a link in a letter holds. */
const validMinutes = 60;

/**
 * Sends a link for setting a new password, if the address has an account. Neither the answer nor its delay tells
 * whether it has: the letter goes out afterwards.
 * @param home the address of this copy, for the link
 */
export async function requestReset(email: string, host: string, home: string): Promise<void> {
	await requireMail();
	await countAttempt('reset-host', host);
	await countAttempt('reset', email);
	const now = new Date();
	await db.delete(passwordResets).where(lt(passwordResets.expiresAt, now));
	const [user] = await db.select().from(users).where(eq(users.email, email));
	if (!user) return;
	const secret = newSecret();
	await db.transaction(async (tx) => {
		// Only the newest letter counts.
		await tx.delete(passwordResets).where(eq(passwordResets.userId, user.id));
		await tx.insert(passwordResets).values({
			tokenHash: hashToken(secret),
			userId: user.id,
			expiresAt: new Date(now.getTime() + validMinutes * 60_000),
			createdAt: now
		});
	});
	void sendLetter({
		to: user.email,
		subject: 'Set a new password for Tiltyard',
		text: `Hello ${user.name},

somebody, most likely you, asked to set a new password for this address. Open this link within the hour:

${home}/reset/${secret}

It works once and signs you out everywhere. If it was not you, leave this letter alone: nothing changes.`
	}).catch((error: unknown) => logger.error({ error }, 'the reset letter could not be sent'));
}
