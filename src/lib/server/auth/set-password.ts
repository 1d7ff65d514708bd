import { and, eq, gt } from 'drizzle-orm';
import { db } from '../db';
import { passwordResets, users } from '../db/schema';
import { AppError } from '../errors';
import { hashPassword } from './password';
import { closeAllSessions } from './session';
import { hashToken } from './tokens';

const holds = (secret: string) =>
	and(eq(passwordResets.tokenHash, hashToken(secret)), gt(passwordResets.expiresAt, new Date()));

/** Whether the link of a letter can still be used. */
export async function resetHolds(secret: string): Promise<boolean> {
	const rows = await db.select({ userId: passwordResets.userId }).from(passwordResets).where(holds(secret));
	return rows.length > 0;
}

/** Sets a new password by the link of a letter, which works once, and ends every session of that person. */
export async function setPassword(secret: string, password: string): Promise<void> {
	const passwordHash = await hashPassword(password);
	const userId = await db.transaction(async (tx) => {
		const [reset] = await tx.select().from(passwordResets).where(holds(secret)).for('update');
		if (!reset)
			throw new AppError(
				'not_found',
				'This link was used already or is older than an hour: ask for a new letter.'
			);
		await tx.update(users).set({ passwordHash }).where(eq(users.id, reset.userId));
		await tx.delete(passwordResets).where(eq(passwordResets.userId, reset.userId));
		return reset.userId;
	});
	await closeAllSessions(userId);
}
