import { and, desc, inArray } from 'drizzle-orm';
import type { PlanPoint } from '$lib/core';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { layouts, projects } from '../db/schema';
import { projectsWhere } from '../guard';

/** What a card of the project list draws: rings and feet of trackers, local metres. */
export interface Thumbnail {
	boundary: PlanPoint[][];
	trackers: PlanPoint[];
}

/** More dots than this are not told apart on a card. */
const DOTS = 400;

/** The plot and the layout changed last of each project, as far as the actor may see them. */
export async function projectThumbnails(actor: Actor, projectIds: string[]): Promise<Map<string, Thumbnail>> {
	if (projectIds.length === 0) return new Map();
	const seen = await db
		.select({ id: projects.id, plot: projects.plot })
		.from(projects)
		.where(and(inArray(projects.id, projectIds), projectsWhere(actor, 'project.read')));
	if (seen.length === 0) return new Map();
	const documents = await db
		.select({ projectId: layouts.projectId, document: layouts.document })
		.from(layouts)
		.where(
			inArray(
				layouts.projectId,
				seen.map((row) => row.id)
			)
		)
		.orderBy(desc(layouts.updatedAt));
	return new Map(
		seen.map(({ id, plot }) => {
			const trackers = documents.find((row) => row.projectId === id)?.document.trackers ?? [];
			const every = Math.max(1, Math.ceil(trackers.length / DOTS));
			return [
				id,
				{
					boundary: plot.boundary.flatMap((part) => [part.outer, ...part.holes]),
					trackers: trackers
						.filter((_, index) => index % every === 0)
						.map((tracker): PlanPoint => [tracker.eastM, tracker.northM])
				}
			];
		})
	);
}
