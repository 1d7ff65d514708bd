import { desc, eq } from 'drizzle-orm';
import type { Place, TrackerModel } from '$lib/core';
import type { PegRow } from '$lib/schema/peg-row';
import type { PlanSummary } from '$lib/schema/plan';
import type { PlanContent } from '$lib/sheets';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { plans, users } from '../db/schema';
import { requireProject } from '../guard';
import { planColumns, planViews } from './plan-view';

/** The plan that a crew builds from, as it was issued: nothing of the layout's later changes. */
export interface ValidPlan {
	plan: PlanSummary;
	rows: PegRow[];
	models: TrackerModel[];
	place: Place;
	setBackM: number;
	openPoints: string[];
	supersedes: string | null;
	layoutName: string;
}

/** The last issued plan of a project with its trackers; null while none is issued. */
export async function validPlan(actor: Actor, projectId: string): Promise<ValidPlan | null> {
	await requireProject(actor, projectId, 'plan.read');
	const [row] = await db
		.select({ ...planColumns, snapshot: plans.snapshot })
		.from(plans)
		.leftJoin(users, eq(users.id, plans.issuedBy))
		.where(eq(plans.projectId, projectId))
		.orderBy(desc(plans.id))
		.limit(1);
	if (!row) return null;
	const { snapshot, ...told } = row;
	const content = snapshot.content as PlanContent;
	const used = new Set(content.rows.map((each) => each.modelId));
	return {
		plan: (await planViews([told]))[0],
		rows: content.rows,
		models: content.layout.models.filter((model) => used.has(model.id)),
		place: content.place,
		setBackM: content.plot.setBackM,
		openPoints: content.openPoints,
		supersedes: content.heading.supersedes,
		layoutName: content.heading.layoutName
	};
}
