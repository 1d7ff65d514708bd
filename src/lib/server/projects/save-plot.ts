import { and, eq, lte, sql } from 'drizzle-orm';
import type { Plot } from '$lib/core/document';
import { overlapProblem } from '$lib/schema/part-overlaps';
import { turnedBoundary } from '$lib/schema/ring';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { KEPT_REVISIONS } from '../db/kept-revisions';
import { plotRevisions, projects } from '../db/schema';
import { AppError, notFound } from '../errors';
import { requireProject } from '../guard';

/**
 * Saves the plot over the revision that it was made on. A stale revision changes nothing and is answered with the one
 * that stands. Rings are turned the way documents keep them.
 */
export async function savePlot(
	actor: Actor,
	projectId: string,
	document: Plot,
	onRevision: number
): Promise<{ revision: number; updatedAt: string }> {
	await requireProject(actor, projectId, 'plot.edit');
	// Not part of the shape: plots that are stored already must stay readable.
	const overlap = overlapProblem(document.boundary);
	if (overlap) {
		const path = ['document', 'boundary', ...overlap.path].join('.');
		throw new AppError('invalid', 'Land of the boundary is drawn twice.', {
			errors: [{ path, message: overlap.message }]
		});
	}
	const plot = { ...document, boundary: turnedBoundary(document.boundary) };
	const now = new Date();
	const revision = onRevision + 1;
	await db.transaction(async (tx) => {
		const [done] = await tx
			.update(projects)
			.set({ plot, plotRevision: sql`${projects.plotRevision} + 1`, updatedAt: now })
			.where(and(eq(projects.id, projectId), eq(projects.plotRevision, onRevision)));
		if (done.affectedRows === 0) {
			const [row] = await tx
				.select({ revision: projects.plotRevision })
				.from(projects)
				.where(eq(projects.id, projectId));
			if (!row) throw notFound();
			throw new AppError('stale', `The plot stands at revision ${row.revision}, not ${onRevision}.`, {
				currentRevision: row.revision
			});
		}
		await tx
			.insert(plotRevisions)
			.values({ projectId, revision, document: plot, authorId: actor.userId, createdAt: now });
		await tx
			.delete(plotRevisions)
			.where(
				and(eq(plotRevisions.projectId, projectId), lte(plotRevisions.revision, revision - KEPT_REVISIONS))
			);
	});
	return { revision, updatedAt: now.toISOString() };
}
