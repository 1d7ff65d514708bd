import { and, asc, eq, gt } from 'drizzle-orm';
import type { Page, PageQuery } from '$lib/schema/page';
import type { LayoutSummary } from '$lib/schema/project';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { readCursor } from '../db/cursor';
import { pageOf } from '../db/page';
import { layouts } from '../db/schema';
import { requireProject } from '../guard';
import { layoutSummary, summaryColumns } from './layout-summary';

/** Layouts of a project, oldest first. */
export async function listLayouts(
	actor: Actor,
	projectId: string,
	query: PageQuery
): Promise<Page<LayoutSummary>> {
	await requireProject(actor, projectId, 'layout.read');
	const after = query.cursor ? (readCursor(query.cursor, ['string'])[0] as string) : null;
	const rows = await db
		.select(summaryColumns)
		.from(layouts)
		.where(and(eq(layouts.projectId, projectId), after ? gt(layouts.id, after) : undefined))
		.orderBy(asc(layouts.id))
		.limit(query.limit + 1);
	return pageOf(rows, query.limit, layoutSummary, (row) => [row.id]);
}

/** All of them, for the pages: a project has few. */
export async function allLayouts(actor: Actor, projectId: string): Promise<LayoutSummary[]> {
	await requireProject(actor, projectId, 'layout.read');
	const rows = await db
		.select(summaryColumns)
		.from(layouts)
		.where(eq(layouts.projectId, projectId))
		.orderBy(asc(layouts.id));
	return rows.map(layoutSummary);
}
