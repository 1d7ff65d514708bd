import { eq } from 'drizzle-orm';
import type { z } from 'zod';
import type { Project, projectChangeSchema } from '$lib/schema/project';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { projects } from '../db/schema';
import { requireProject } from '../guard';
import { getProject } from './get-project';

/** Changes what was given and leaves the rest. */
export async function changeProject(
	actor: Actor,
	projectId: string,
	change: z.output<typeof projectChangeSchema>
): Promise<Project> {
	await requireProject(actor, projectId, 'project.edit');
	await db
		.update(projects)
		.set({ ...change, updatedAt: new Date() })
		.where(eq(projects.id, projectId));
	return getProject(actor, projectId);
}
