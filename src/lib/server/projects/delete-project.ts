import { eq } from 'drizzle-orm';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { projects } from '../db/schema';
import { requireProject } from '../guard';
import { stopRunsOf } from '../runs/stop-runs';

/** Deletes a project with its layouts, runs and plans. Runs that work are stopped first. */
export async function deleteProject(actor: Actor, projectId: string): Promise<void> {
	await requireProject(actor, projectId, 'project.delete');
	await stopRunsOf(projectId);
	await db.delete(projects).where(eq(projects.id, projectId));
}
