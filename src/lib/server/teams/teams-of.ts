import { asc, eq } from 'drizzle-orm';
import type { Role } from '$lib/access';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { teamMembers, teams } from '../db/schema';

/** The teams that the actor is a member of, oldest first. */
export function teamsOf(actor: Actor): Promise<{ id: string; name: string; role: Role }[]> {
	return db
		.select({ id: teams.id, name: teams.name, role: teamMembers.role })
		.from(teamMembers)
		.innerJoin(teams, eq(teams.id, teamMembers.teamId))
		.where(eq(teamMembers.userId, actor.userId))
		.orderBy(asc(teams.id));
}
