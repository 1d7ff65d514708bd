import { eq } from 'drizzle-orm';
import type { Plot } from '$lib/core/document';
import { readPlot } from '$lib/schema/document-version';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { projects } from '../db/schema';
import { notFound } from '../errors';
import { requireProject } from '../guard';

export async function getPlot(
	actor: Actor,
	projectId: string
): Promise<{ document: Plot; revision: number; updatedAt: string }> {
	await requireProject(actor, projectId, 'project.read');
	const [row] = await db
		.select({ plot: projects.plot, revision: projects.plotRevision, updatedAt: projects.updatedAt })
		.from(projects)
		.where(eq(projects.id, projectId));
	if (!row) throw notFound();
	return { document: readPlot(row.plot), revision: row.revision, updatedAt: row.updatedAt.toISOString() };
}
