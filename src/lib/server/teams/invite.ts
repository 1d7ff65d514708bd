import { eq } from 'drizzle-orm';
import { projectRoles, roleNames, teamWideRoles, type Role } from '$lib/access';
import type { Invitation } from '$lib/schema/account';
import type { Actor } from '../auth/actor';
import { countAttempt } from '../auth/attempts';
import { hashToken, newSecret } from '../auth/tokens';
import { db } from '../db';
import { newId } from '../db/ids';
import { invitations, projects, teams, users } from '../db/schema';
import { AppError, notFound } from '../errors';
import { requireProject, requireTeam } from '../guard';
import { requireMail, sendLetter } from '../mail';
import { invitationView } from './invitation-view';
import { note } from './note';

const validDays = 14;

export interface InvitationWish {
	email: string;
	role: Role;
	/** Left out: into the whole team. */
	projectId?: string;
}

/**
 * Asks somebody by e-mail to join the team (as owner or designer) or one project (as designer, crew or client).
 * @param home the address of this copy, for the link
 */
export async function invite(
	actor: Actor,
	teamId: string,
	wish: InvitationWish,
	home: string
): Promise<Invitation> {
	const projectName = await requireRight(actor, teamId, wish);
	await requireMail();
	await countAttempt('invite', actor.userId);
	const [{ team }] = await db.select({ team: teams.name }).from(teams).where(eq(teams.id, teamId));
	const [{ host }] = await db.select({ host: users.name }).from(users).where(eq(users.id, actor.userId));
	const secret = newSecret();
	const now = new Date();
	const row = {
		id: newId(),
		tokenHash: hashToken(secret),
		email: wish.email,
		role: wish.role,
		teamId,
		projectId: wish.projectId ?? null,
		invitedBy: actor.userId,
		expiresAt: new Date(now.getTime() + validDays * 86_400_000),
		acceptedAt: null,
		createdAt: now
	};
	await db.transaction(async (tx) => {
		await tx.insert(invitations).values(row);
		await note(tx, actor, 'invitation.create', row.id, { teamId, ...wish });
	});
	const what = projectName === null ? `the team ${team}` : `the project ${projectName} of ${team}`;
	await sendLetter({
		to: wish.email,
		subject: `${host} asks you to join ${projectName ?? team} on Tiltyard`,
		text: `Hello,

${host} asks you to join ${what} as ${roleNames[wish.role].toLowerCase()}. Open this link within ${validDays} days:

${home}/join/${secret}

If you do not know what this is about, leave the letter alone: nothing happens.`
	});
	return invitationView(row);
}

/** @returns the project's name, or null for an invitation into the team */
async function requireRight(actor: Actor, teamId: string, wish: InvitationWish): Promise<string | null> {
	const fitting: readonly Role[] = wish.projectId === undefined ? teamWideRoles : projectRoles;
	if (wish.projectId === undefined) await requireTeam(actor, teamId, 'team.manage');
	else {
		const access = await requireProject(actor, wish.projectId, 'project.invite');
		if (access.teamId !== teamId) throw notFound();
	}
	if (!fitting.includes(wish.role)) {
		const message = `Into ${wish.projectId === undefined ? 'a team' : 'a project'} people are invited as ${fitting.join(' or ')}.`;
		throw new AppError('invalid', message, { errors: [{ path: 'role', message }] });
	}
	if (wish.projectId === undefined) return null;
	const [row] = await db
		.select({ name: projects.name })
		.from(projects)
		.where(eq(projects.id, wish.projectId));
	return row.name;
}
