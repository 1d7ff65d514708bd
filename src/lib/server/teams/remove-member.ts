import { and, eq, inArray } from 'drizzle-orm';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { projectMembers, projects, teamMembers } from '../db/schema';
import { AppError, notFound } from '../errors';
import { requireProject, requireTeam } from '../guard';
import { note } from './note';

/** Takes somebody out of a team and all its projects. A team keeps at least one owner. */
export async function removeMember(actor: Actor, teamId: string, userId: string): Promise<void> {
	await requireTeam(actor, teamId, 'team.manage');
	await db.transaction(async (tx) => {
		// Locked, so that two owners can't take each other out at the same moment.
		const owners = await tx
			.select({ userId: teamMembers.userId })
			.from(teamMembers)
			.where(and(eq(teamMembers.teamId, teamId), eq(teamMembers.role, 'owner')))
			.for('update');
		if (owners.length === 1 && owners[0].userId === userId)
			throw new AppError('conflict', 'A team keeps at least one owner: make somebody else owner first.');
		const [fromTeam] = await tx
			.delete(teamMembers)
			.where(and(eq(teamMembers.teamId, teamId), eq(teamMembers.userId, userId)));
		const [fromProjects] = await tx
			.delete(projectMembers)
			.where(
				and(
					eq(projectMembers.userId, userId),
					inArray(
						projectMembers.projectId,
						tx.select({ id: projects.id }).from(projects).where(eq(projects.teamId, teamId))
					)
				)
			);
		if (fromTeam.affectedRows + fromProjects.affectedRows === 0) throw notFound();
		await note(tx, actor, 'member.remove', teamId, { userId });
	});
}

/** Takes somebody off one project; who sees it through the team goes on seeing it. */
export async function removeFromProject(actor: Actor, projectId: string, userId: string): Promise<void> {
	await requireProject(actor, projectId, 'project.invite');
	await db.transaction(async (tx) => {
		const [done] = await tx
			.delete(projectMembers)
			.where(and(eq(projectMembers.projectId, projectId), eq(projectMembers.userId, userId)));
		if (done.affectedRows === 0) throw notFound();
		await note(tx, actor, 'project-member.remove', projectId, { userId });
	});
}
