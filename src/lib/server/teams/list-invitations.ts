import { and, desc, eq, gt, isNull, lt } from 'drizzle-orm';
import type { Invitation } from '$lib/schema/account';
import type { Page, PageQuery } from '$lib/schema/page';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { readCursor } from '../db/cursor';
import { pageOf } from '../db/page';
import { invitations } from '../db/schema';
import { requireProject, requireTeam } from '../guard';
import { invitationView } from './invitation-view';

const waiting = () => and(isNull(invitations.acceptedAt), gt(invitations.expiresAt, new Date()));

/** Invitations of a team and its projects that wait for an answer, newest first. */
export async function listInvitations(
	actor: Actor,
	teamId: string,
	query: PageQuery
): Promise<Page<Invitation>> {
	await requireTeam(actor, teamId, 'team.read');
	const before = query.cursor ? (readCursor(query.cursor, ['string'])[0] as string) : null;
	const rows = await db
		.select()
		.from(invitations)
		.where(
			and(eq(invitations.teamId, teamId), waiting(), before === null ? undefined : lt(invitations.id, before))
		)
		.orderBy(desc(invitations.id))
		.limit(query.limit + 1);
	return pageOf(rows, query.limit, invitationView, (row) => [row.id]);
}

/** Those of one project. */
export async function listProjectInvitations(actor: Actor, projectId: string): Promise<Invitation[]> {
	await requireProject(actor, projectId, 'project.invite');
	const rows = await db
		.select()
		.from(invitations)
		.where(and(eq(invitations.projectId, projectId), waiting()))
		.orderBy(desc(invitations.id));
	return rows.map(invitationView);
}
