import { and, desc, eq, lt } from 'drizzle-orm';
import type { Page, PageQuery } from '$lib/schema/page';
import type { PlanSummary } from '$lib/schema/plan';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { readCursor } from '../db/cursor';
import { pageOf } from '../db/page';
import { plans, users } from '../db/schema';
import { requireProject } from '../guard';
import { planColumns, planViews } from './plan-view';

/** Issued plans of a project, newest first. */
export async function listPlans(
	actor: Actor,
	projectId: string,
	query: PageQuery
): Promise<Page<PlanSummary>> {
	await requireProject(actor, projectId, 'plan.read');
	const before = query.cursor ? (readCursor(query.cursor, ['string'])[0] as string) : null;
	const rows = await db
		.select(planColumns)
		.from(plans)
		.leftJoin(users, eq(users.id, plans.issuedBy))
		.where(and(eq(plans.projectId, projectId), before ? lt(plans.id, before) : undefined))
		.orderBy(desc(plans.id))
		.limit(query.limit + 1);
	const page = pageOf(
		rows,
		query.limit,
		(row) => row,
		(row) => [row.id]
	);
	return { items: await planViews(page.items), nextCursor: page.nextCursor };
}
