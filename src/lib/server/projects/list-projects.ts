import { and, desc, eq, inArray, lt, or } from 'drizzle-orm';
import { teamWideRoles, type Role } from '$lib/access';
import { DEFAULT_PAGE_SIZE, type Page, type PageQuery } from '$lib/schema/page';
import type { ProjectSummary } from '$lib/schema/project';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { readCursor } from '../db/cursor';
import { pageOf } from '../db/page';
import { layouts, projectMembers, projects, teamMembers, teams } from '../db/schema';
import { projectsWhere } from '../guard';

/** Projects that the actor may see, last changed first. */
export async function listProjects(
	actor: Actor,
	query: PageQuery = { limit: DEFAULT_PAGE_SIZE }
): Promise<Page<ProjectSummary>> {
	const after = query.cursor ? readCursor(query.cursor, ['number', 'string']) : null;
	const [beforeMs, beforeId] = (after ?? [0, '']) as [number, string];
	const rows = await db
		.select({
			id: projects.id,
			name: projects.name,
			place: projects.place,
			teamId: projects.teamId,
			teamName: teams.name,
			teamRole: teamMembers.role,
			projectRole: projectMembers.role,
			updatedAt: projects.updatedAt
		})
		.from(projects)
		.innerJoin(teams, eq(teams.id, projects.teamId))
		.leftJoin(
			teamMembers,
			and(
				eq(teamMembers.teamId, projects.teamId),
				eq(teamMembers.userId, actor.userId),
				inArray(teamMembers.role, teamWideRoles)
			)
		)
		.leftJoin(
			projectMembers,
			and(eq(projectMembers.projectId, projects.id), eq(projectMembers.userId, actor.userId))
		)
		.where(
			and(
				projectsWhere(actor, 'project.read'),
				after
					? or(
							lt(projects.updatedAt, new Date(beforeMs)),
							and(eq(projects.updatedAt, new Date(beforeMs)), lt(projects.id, beforeId))
						)
					: undefined
			)
		)
		.orderBy(desc(projects.updatedAt), desc(projects.id))
		.limit(query.limit + 1);
	const counts = await trackerCounts(rows.map((row) => row.id));
	return pageOf(
		rows,
		query.limit,
		(row): ProjectSummary => ({
			id: row.id,
			name: row.name,
			place: row.place,
			teamId: row.teamId,
			teamName: row.teamName,
			role: (row.teamRole ?? row.projectRole) as Role,
			trackerCount: counts.get(row.id) ?? 0,
			updatedAt: row.updatedAt.toISOString()
		}),
		(row) => [row.updatedAt.getTime(), row.id]
	);
}

/** Trackers of each project's layout that was changed last. */
async function trackerCounts(projectIds: string[]): Promise<Map<string, number>> {
	if (projectIds.length === 0) return new Map();
	const rows = await db
		.select({ projectId: layouts.projectId, count: layouts.trackerCount })
		.from(layouts)
		.where(inArray(layouts.projectId, projectIds))
		.orderBy(layouts.updatedAt);
	return new Map(rows.map((row) => [row.projectId, row.count]));
}
