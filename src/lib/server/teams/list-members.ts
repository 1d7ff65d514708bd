import { and, asc, eq } from 'drizzle-orm';
import type { Member } from '$lib/schema/account';
import type { Page, PageQuery } from '$lib/schema/page';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { readCursor } from '../db/cursor';
import { pageOf } from '../db/page';
import { projectMembers, projects, teamMembers, users } from '../db/schema';
import { requireProject, requireTeam } from '../guard';

const person = { userId: users.id, name: users.name, email: users.email };

async function ofTeam(teamId: string): Promise<Member[]> {
	const rows = await db
		.select({ ...person, role: teamMembers.role })
		.from(teamMembers)
		.innerJoin(users, eq(users.id, teamMembers.userId))
		.where(eq(teamMembers.teamId, teamId))
		.orderBy(asc(users.name), asc(users.id));
	return rows.map((row) => ({ ...row, projectId: null, projectName: null }));
}

async function ofProjects(teamId: string, projectId?: string): Promise<Member[]> {
	return db
		.select({ ...person, role: projectMembers.role, projectId: projects.id, projectName: projects.name })
		.from(projectMembers)
		.innerJoin(users, eq(users.id, projectMembers.userId))
		.innerJoin(projects, eq(projects.id, projectMembers.projectId))
		.where(and(eq(projects.teamId, teamId), projectId === undefined ? undefined : eq(projects.id, projectId)))
		.orderBy(asc(projects.name), asc(projects.id), asc(users.name), asc(users.id));
}

/** Members of the whole team by name, then those of its projects by project. */
export async function listMembers(actor: Actor, teamId: string, query: PageQuery): Promise<Page<Member>> {
	await requireTeam(actor, teamId, 'team.read');
	const all = [...(await ofTeam(teamId)), ...(await ofProjects(teamId))];
	const from = query.cursor ? (readCursor(query.cursor, ['number'])[0] as number) : 0;
	const rows = all.slice(from, from + query.limit + 1).map((member, i) => ({ member, index: from + i + 1 }));
	return pageOf(
		rows,
		query.limit,
		({ member }) => member,
		({ index }) => [index]
	);
}

/** Who can see a project: its team's owners and designers, and those who were put on it. */
export async function listProjectPeople(actor: Actor, projectId: string): Promise<Member[]> {
	const { teamId } = await requireProject(actor, projectId, 'project.invite');
	const team = (await ofTeam(teamId)).filter(({ role }) => role === 'owner' || role === 'designer');
	return [...team, ...(await ofProjects(teamId, projectId))];
}
