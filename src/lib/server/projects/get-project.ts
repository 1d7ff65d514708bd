import { eq } from 'drizzle-orm';
import type { Project } from '$lib/schema/project';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { projects } from '../db/schema';
import { notFound } from '../errors';
import { requireProject } from '../guard';
import { projectView } from './project-view';

export async function getProject(actor: Actor, projectId: string): Promise<Project> {
	const { role } = await requireProject(actor, projectId, 'project.read');
	const [row] = await db
		.select({
			id: projects.id,
			teamId: projects.teamId,
			name: projects.name,
			notes: projects.notes,
			place: projects.place,
			winterRule: projects.winterRule,
			createdAt: projects.createdAt,
			updatedAt: projects.updatedAt
		})
		.from(projects)
		.where(eq(projects.id, projectId));
	if (!row) throw notFound();
	return projectView(row, role);
}
