import { asc, eq } from 'drizzle-orm';
import type { Me } from '$lib/schema/account';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { teamMembers, teams, users } from '../db/schema';
import { notFound } from '../errors';

/** Who the actor is, and the teams with the role in each. */
export async function describeMe(actor: Actor): Promise<Me> {
	const [user] = await db
		.select({ id: users.id, name: users.name, email: users.email })
		.from(users)
		.where(eq(users.id, actor.userId));
	if (!user) throw notFound();
	const mine = await db
		.select({ id: teams.id, name: teams.name, role: teamMembers.role })
		.from(teamMembers)
		.innerJoin(teams, eq(teams.id, teamMembers.teamId))
		.where(eq(teamMembers.userId, actor.userId))
		.orderBy(asc(teams.id));
	return { ...user, teams: mine };
}
