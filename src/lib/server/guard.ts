/** Who may pass. Strangers are told "not found"; members whose role is too small are told so. */
import { redirect, type RequestEvent } from '@sveltejs/kit';
import { and, eq, inArray, or, sql, type SQL } from 'drizzle-orm';
import { can, roleNames, rolesThatCan, teamWideRoles, type Action, type Role } from '$lib/access';
import type { Actor } from './auth/actor';
import { db, type Executor } from './db';
import { projectMembers, projects, teamMembers } from './db/schema';
import { AppError, notFound } from './errors';

/** The signed-in person. Pages send others to the sign-in page and back afterwards; the API answers 401. */
export function requireUser(event: Pick<RequestEvent, 'locals' | 'url'>): Actor {
	if (event.locals.actor) return event.locals.actor;
	if (event.url.pathname.startsWith('/api/'))
		throw new AppError('unauthorised', 'Sign in, or send a personal token as "Authorization: Bearer …".');
	redirect(303, `/sign-in?next=${encodeURIComponent(event.url.pathname + event.url.search)}`);
}

const isTeamWide = (role: Role): boolean => (teamWideRoles as readonly Role[]).includes(role);

export interface ProjectAccess {
	role: Role;
	teamId: string;
}

/** The actor's role on a project: team-wide roles first, then the place on the project. null for strangers. */
export async function projectAccess(
	actor: Actor,
	projectId: string,
	executor: Executor = db
): Promise<ProjectAccess | null> {
	const [row] = await executor
		.select({ teamId: projects.teamId, teamRole: teamMembers.role, projectRole: projectMembers.role })
		.from(projects)
		.leftJoin(teamMembers, and(eq(teamMembers.teamId, projects.teamId), eq(teamMembers.userId, actor.userId)))
		.leftJoin(
			projectMembers,
			and(eq(projectMembers.projectId, projects.id), eq(projectMembers.userId, actor.userId))
		)
		.where(eq(projects.id, projectId));
	if (!row) return null;
	const role = row.teamRole && isTeamWide(row.teamRole) ? row.teamRole : row.projectRole;
	return role ? { role, teamId: row.teamId } : null;
}

/** Lets through who may do it on this project; throws `not_found` or `not_allowed` for the rest. */
export async function requireProject(
	actor: Actor,
	projectId: string,
	action: Action,
	executor: Executor = db
): Promise<ProjectAccess> {
	const access = await projectAccess(actor, projectId, executor);
	if (!access) throw notFound();
	refuseUnless(access.role, action);
	return access;
}

/** Lets through who may do it in this team. */
export async function requireTeam(
	actor: Actor,
	teamId: string,
	action: Action,
	executor: Executor = db
): Promise<Role> {
	const [row] = await executor
		.select({ role: teamMembers.role })
		.from(teamMembers)
		.where(and(eq(teamMembers.teamId, teamId), eq(teamMembers.userId, actor.userId)));
	if (!row) throw notFound();
	refuseUnless(row.role, action);
	return row.role;
}

function refuseUnless(role: Role, action: Action): void {
	if (can(role, action)) return;
	const who = rolesThatCan(action).map((each) => roleNames[each].toLowerCase());
	throw new AppError(
		'not_allowed',
		`Your role here is ${roleNames[role].toLowerCase()}; this takes ${who.join(' or ')}. Ask the project's owner.`
	);
}

/** A WHERE condition on `projects`: the ones on which the actor may do this. */
export function projectsWhere(actor: Actor, action: Action): SQL {
	const allowed = rolesThatCan(action);
	const teamWide = teamWideRoles.filter((role) => allowed.includes(role));
	const inTeam = db
		.select({ id: teamMembers.teamId })
		.from(teamMembers)
		.where(and(eq(teamMembers.userId, actor.userId), inArray(teamMembers.role, teamWide)));
	const onProject = db
		.select({ id: projectMembers.projectId })
		.from(projectMembers)
		.where(and(eq(projectMembers.userId, actor.userId), inArray(projectMembers.role, [...allowed])));
	return or(inArray(projects.teamId, inTeam), inArray(projects.id, onProject)) ?? sql`false`;
}
