import type { Executor } from '../db';
import { newId } from '../db/ids';
import { teamMembers, teams } from '../db/schema';

/** A team with its first owner. */
export async function insertTeam(executor: Executor, ownerId: string, name: string): Promise<string> {
	const teamId = newId();
	const createdAt = new Date();
	await executor.insert(teams).values({ id: teamId, name, createdAt });
	await executor.insert(teamMembers).values({ teamId, userId: ownerId, role: 'owner', createdAt });
	return teamId;
}
