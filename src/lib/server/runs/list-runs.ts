import { and, desc, eq, lt } from 'drizzle-orm';
import type { Page } from '$lib/schema/page';
import type { Run, RunListQuery } from '$lib/schema/run';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { readCursor } from '../db/cursor';
import { pageOf } from '../db/page';
import { runs } from '../db/schema';
import { requireProject } from '../guard';
import { runColumns, runView } from './run-view';

/** Runs of a project, newest first. */
export async function listRuns(actor: Actor, projectId: string, query: RunListQuery): Promise<Page<Run>> {
	await requireProject(actor, projectId, 'run.read');
	const before = query.cursor ? (readCursor(query.cursor, ['string'])[0] as string) : null;
	const rows = await db
		.select(runColumns)
		.from(runs)
		.where(
			and(
				eq(runs.projectId, projectId),
				query.layoutId ? eq(runs.layoutId, query.layoutId) : undefined,
				query.kind ? eq(runs.kind, query.kind) : undefined,
				before ? lt(runs.id, before) : undefined
			)
		)
		.orderBy(desc(runs.id))
		.limit(query.limit + 1);
	const page = pageOf(
		rows,
		query.limit,
		(row) => row,
		(row) => [row.id]
	);
	return { items: await Promise.all(page.items.map(runView)), nextCursor: page.nextCursor };
}
