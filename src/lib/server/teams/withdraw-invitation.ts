import { and, eq, isNull } from 'drizzle-orm';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { invitations } from '../db/schema';
import { notFound } from '../errors';
import { requireProject, requireTeam } from '../guard';
import { note } from './note';

/** Takes back an invitation that nobody has answered; its link holds no longer. */
export async function withdrawInvitation(actor: Actor, invitationId: string): Promise<void> {
	const [row] = await db.select().from(invitations).where(eq(invitations.id, invitationId));
	if (!row) throw notFound();
	if (row.projectId === null) await requireTeam(actor, row.teamId, 'team.manage');
	else await requireProject(actor, row.projectId, 'project.invite');
	await db.transaction(async (tx) => {
		const [done] = await tx
			.delete(invitations)
			.where(and(eq(invitations.id, invitationId), isNull(invitations.acceptedAt)));
		if (done.affectedRows === 0) throw notFound();
		await note(tx, actor, 'invitation.withdraw', invitationId, { email: row.email });
	});
}
