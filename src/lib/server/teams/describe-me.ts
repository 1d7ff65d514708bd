import { eq } from 'drizzle-orm';
import type { Me } from '$lib/schema/account';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { users } from '../db/schema';
import { notFound } from '../errors';
import { teamsOf } from './teams-of';

/** Who the actor is, and the teams with the role in each. */
export async function describeMe(actor: Actor): Promise<Me> {
	const [user] = await db
		.select({ id: users.id, name: users.name, email: users.email })
		.from(users)
		.where(eq(users.id, actor.userId));
	if (!user) throw notFound();
	return { ...user, teams: await teamsOf(actor) };
}
