/** The demo's people. Invented; their addresses end in `.test`, which no mail server serves. */
import { eq, inArray } from 'drizzle-orm';
import type { Role } from '$lib/access';
import { hashPassword } from '../auth/password';
import { db } from '../db';
import { newId } from '../db/ids';
import { teamMembers, teams, users } from '../db/schema';
import { demoEmailOf as emailOf, demoPassword } from '../env';

export interface DemoPeople {
	teamId: string;
	/** User id by role. Crew and client belong to no team: they are put on the demo's project. */
	userIds: Record<Role, string>;
}

const names: Record<Role, string> = {
	owner: 'Ottavia Rinaldi',
	designer: 'Dario Klein',
	crew: 'Carla Bergström',
	client: 'Clemens Aurich'
};

/** Makes the four people and their team, or finds those that are there. */
export async function seedPeople(): Promise<DemoPeople> {
	const wanted = Object.keys(names) as Role[];
	const present = await db
		.select()
		.from(users)
		.where(inArray(users.email, wanted.map(emailOf)));
	const missing = wanted.filter((role) => !present.some((user) => user.email === emailOf(role)));
	const passwordHash = missing.length > 0 ? await hashPassword(demoPassword()) : '';
	const made = missing.map((role) => ({
		id: newId(),
		email: emailOf(role),
		name: names[role],
		passwordHash,
		createdAt: new Date()
	}));
	const people = [...present, ...made];
	const idOf = (role: Role) => people.find((user) => user.email === emailOf(role))!.id;
	const userIds = Object.fromEntries(wanted.map((role) => [role, idOf(role)])) as Record<Role, string>;

	const [team] = await db
		.select({ id: teamMembers.teamId })
		.from(teamMembers)
		.where(eq(teamMembers.userId, userIds.owner));
	const teamId = team?.id ?? newId();
	await db.transaction(async (tx) => {
		if (made.length > 0) await tx.insert(users).values(made);
		if (team) return;
		const createdAt = new Date();
		await tx.insert(teams).values({ id: teamId, name: 'Demo Yard (invented)', createdAt });
		await tx.insert(teamMembers).values([
			{ teamId, userId: userIds.owner, role: 'owner', createdAt },
			{ teamId, userId: userIds.designer, role: 'designer', createdAt }
		]);
	});
	return { teamId, userIds };
}
