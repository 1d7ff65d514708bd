import { eq } from 'drizzle-orm';
import type { Actor } from './actor';
import { db } from '../db';
import { users } from '../db/schema';

/** The name that others see on plans, revisions and member lists from now on. */
export async function changeName(actor: Actor, name: string): Promise<void> {
	await db.update(users).set({ name }).where(eq(users.id, actor.userId));
}
