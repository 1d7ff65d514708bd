import { and, desc, eq, lt } from 'drizzle-orm';
import type { Page, PageQuery } from '$lib/schema/page';
import type { LayoutRevision } from '$lib/schema/project';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { readCursor } from '../db/cursor';
import { pageOf } from '../db/page';
import { layoutRevisions, users } from '../db/schema';
import { findLayout } from './find-layout';

/** Saved revisions of a layout, newest first. */
export async function listLayoutRevisions(
	actor: Actor,
	layoutId: string,
	query: PageQuery
): Promise<Page<LayoutRevision>> {
	await findLayout(actor, layoutId, 'layout.read');
	const before = query.cursor ? (readCursor(query.cursor, ['number'])[0] as number) : null;
	const rows = await db
		.select({
			revision: layoutRevisions.revision,
			trackerCount: layoutRevisions.trackerCount,
			savedBy: users.name,
			authorId: layoutRevisions.authorId,
			savedAt: layoutRevisions.createdAt
		})
		.from(layoutRevisions)
		.leftJoin(users, eq(users.id, layoutRevisions.authorId))
		.where(
			and(
				eq(layoutRevisions.layoutId, layoutId),
				before === null ? undefined : lt(layoutRevisions.revision, before)
			)
		)
		.orderBy(desc(layoutRevisions.revision))
		.limit(query.limit + 1);
	return pageOf(
		rows,
		query.limit,
		({ authorId, ...row }): LayoutRevision => ({
			...row,
			savedByYou: authorId === actor.userId,
			savedAt: row.savedAt.toISOString()
		}),
		(row) => [row.revision]
	);
}
