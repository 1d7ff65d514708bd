import { eq } from 'drizzle-orm';
import type { PlanSummary } from '$lib/schema/plan';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { plans, users } from '../db/schema';
import { notFound } from '../errors';
import { requireProject } from '../guard';
import { planColumns, planViews } from './plan-view';

export async function getPlan(actor: Actor, planId: string): Promise<PlanSummary> {
	const [row] = await db
		.select(planColumns)
		.from(plans)
		.leftJoin(users, eq(users.id, plans.issuedBy))
		.where(eq(plans.id, planId));
	if (!row) throw notFound();
	await requireProject(actor, row.projectId, 'plan.read');
	return (await planViews([row]))[0];
}
