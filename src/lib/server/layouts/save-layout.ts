import { and, eq, lte, sql } from 'drizzle-orm';
import type { Layout } from '$lib/core/document';
import type { LayoutSummary } from '$lib/schema/project';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { KEPT_REVISIONS } from '../db/kept-revisions';
import { layoutRevisions, layouts, projects } from '../db/schema';
import { AppError, notFound } from '../errors';
import { findLayout } from './find-layout';
import { layoutSummary, summaryColumns } from './layout-summary';

/** Saves a layout over the revision that it was made on; a stale revision changes nothing. */
export async function saveLayout(
	actor: Actor,
	layoutId: string,
	document: Layout,
	onRevision: number
): Promise<LayoutSummary> {
	const { projectId } = await findLayout(actor, layoutId, 'layout.edit');
	const now = new Date();
	const revision = onRevision + 1;
	const trackerCount = document.trackers.length;
	return db.transaction(async (tx) => {
		const [done] = await tx
			.update(layouts)
			.set({ document, trackerCount, revision: sql`${layouts.revision} + 1`, updatedAt: now })
			.where(and(eq(layouts.id, layoutId), eq(layouts.revision, onRevision)));
		const [row] = await tx.select(summaryColumns).from(layouts).where(eq(layouts.id, layoutId));
		if (!row) throw notFound();
		if (done.affectedRows === 0) {
			throw new AppError('stale', `The layout stands at revision ${row.revision}, not ${onRevision}.`, {
				currentRevision: row.revision
			});
		}
		await tx
			.insert(layoutRevisions)
			.values({ layoutId, revision, document, trackerCount, authorId: actor.userId, createdAt: now });
		await tx
			.delete(layoutRevisions)
			.where(
				and(eq(layoutRevisions.layoutId, layoutId), lte(layoutRevisions.revision, revision - KEPT_REVISIONS))
			);
		await tx.update(projects).set({ updatedAt: now }).where(eq(projects.id, projectId));
		return layoutSummary(row);
	});
}
