import { asc, eq } from 'drizzle-orm';
import type { TrackerModel } from '$lib/core/document';
import { modelLibrary } from '$lib/schema/model-library';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { trackerModels } from '../db/schema';
import { requireProject } from '../guard';

/** The library and the own models of the project's team. */
export async function modelsForProject(actor: Actor, projectId: string): Promise<TrackerModel[]> {
	const { teamId } = await requireProject(actor, projectId, 'model.read');
	return [...modelLibrary, ...(await teamModels(teamId))];
}

/** A team's own models, oldest first. The caller has checked that the actor may read them. */
export async function teamModels(teamId: string): Promise<TrackerModel[]> {
	const rows = await db
		.select({ document: trackerModels.document })
		.from(trackerModels)
		.where(eq(trackerModels.teamId, teamId))
		.orderBy(asc(trackerModels.id));
	return rows.map((row) => row.document);
}
