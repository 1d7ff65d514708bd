import { and, eq, gt, isNull, sql } from 'drizzle-orm';
import type { Role } from '$lib/access';
import type { Actor } from '../auth/actor';
import { hashToken } from '../auth/tokens';
import { db } from '../db';
import { invitations, projectMembers, projects, teamMembers, teams, users } from '../db/schema';
import { AppError, notFound } from '../errors';
import { note } from './note';

const open = (secret: string) =>
	and(
		eq(invitations.tokenHash, hashToken(secret)),
		isNull(invitations.acceptedAt),
		gt(invitations.expiresAt, new Date())
	);

export interface InvitationOffer {
	email: string;
	role: Role;
	teamName: string;
	projectName: string | null;
}

/** What the link of an invitation offers; for whoever holds the link. */
export async function readInvitation(secret: string): Promise<InvitationOffer> {
	const [row] = await db
		.select({
			email: invitations.email,
			role: invitations.role,
			teamName: teams.name,
			projectName: projects.name
		})
		.from(invitations)
		.innerJoin(teams, eq(teams.id, invitations.teamId))
		.leftJoin(projects, eq(projects.id, invitations.projectId))
		.where(open(secret));
	if (!row) throw gone();
	return row;
}

const gone = () =>
	new AppError(
		'not_found',
		'This invitation was accepted already, withdrawn, or is older than two weeks: ask for a new one.'
	);

/**
 * Joins by the link of an invitation, which works once and only for the address it was sent to.
 * @returns the project that was joined, or null when it was a team
 */
export async function acceptInvitation(actor: Actor, secret: string): Promise<{ projectId: string | null }> {
	return db.transaction(async (tx) => {
		const [row] = await tx.select().from(invitations).where(open(secret)).for('update');
		if (!row) throw gone();
		const [user] = await tx.select().from(users).where(eq(users.id, actor.userId));
		if (!user) throw notFound();
		if (user.email !== row.email)
			throw new AppError(
				'not_allowed',
				`This invitation was sent to ${row.email} and you are signed in as ${user.email}: sign in with that address.`
			);
		const member = { userId: actor.userId, role: row.role, createdAt: new Date() };
		// Who is in already keeps the place they have.
		if (row.projectId === null)
			await tx
				.insert(teamMembers)
				.values({ teamId: row.teamId, ...member })
				.onDuplicateKeyUpdate({ set: { userId: sql`user_id` } });
		else
			await tx
				.insert(projectMembers)
				.values({ projectId: row.projectId, ...member })
				.onDuplicateKeyUpdate({ set: { userId: sql`user_id` } });
		await tx.update(invitations).set({ acceptedAt: new Date() }).where(eq(invitations.id, row.id));
		await note(tx, actor, 'invitation.accept', row.id, { teamId: row.teamId, projectId: row.projectId });
		return { projectId: row.projectId };
	});
}
