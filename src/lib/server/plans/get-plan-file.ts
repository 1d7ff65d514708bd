import { and, eq } from 'drizzle-orm';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { planFiles, plans } from '../db/schema';
import { notFound } from '../errors';
import { requireProject } from '../guard';

export interface PlanFile {
	name: string;
	mediaType: string;
	sha256: string;
	bytes: Buffer;
}

/** One file of a plan, byte for byte as issued. */
export async function getPlanFile(actor: Actor, planId: string, name: string): Promise<PlanFile> {
	const [plan] = await db.select({ projectId: plans.projectId }).from(plans).where(eq(plans.id, planId));
	if (!plan) throw notFound();
	await requireProject(actor, plan.projectId, 'plan.read');
	const [file] = await db
		.select({
			name: planFiles.name,
			mediaType: planFiles.mediaType,
			sha256: planFiles.sha256,
			bytes: planFiles.bytes
		})
		.from(planFiles)
		.where(and(eq(planFiles.planId, planId), eq(planFiles.name, name)));
	if (!file) throw notFound();
	return file;
}
