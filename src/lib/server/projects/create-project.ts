import { and, eq, inArray } from 'drizzle-orm';
import type { z } from 'zod';
import { rolesThatCan } from '$lib/access';
import { emptyLayout } from '$lib/schema/layout';
import { emptyPlot } from '$lib/schema/plot';
import type { newProjectSchema, Project } from '$lib/schema/project';
import { defaultWinterRule } from '$lib/schema/winter-rule';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { newId } from '../db/ids';
import { plotRevisions, projects, teamMembers } from '../db/schema';
import { AppError } from '../errors';
import { requireTeam } from '../guard';
import { insertLayout } from '../layouts/insert-layout';
import { findTimeZone } from './find-time-zone';
import { projectView } from './project-view';

/** The team that a project goes to when none was named: the only one in which the actor may open projects. */
async function onlyTeam(actor: Actor): Promise<string> {
	const rows = await db
		.select({ teamId: teamMembers.teamId })
		.from(teamMembers)
		.where(
			and(
				eq(teamMembers.userId, actor.userId),
				inArray(teamMembers.role, [...rolesThatCan('project.create')])
			)
		);
	if (rows.length === 0) {
		throw new AppError('not_allowed', 'You are in no team in which you may open a project.');
	}
	if (rows.length > 1) {
		throw new AppError('invalid', 'You may open projects in several teams: say in which.', {
			errors: [{ path: 'teamId', message: `Give one of ${rows.map((row) => row.teamId).join(', ')}.` }]
		});
	}
	return rows[0].teamId;
}

/** Opens a project at a place with an empty plot and a first layout. The time zone is found when none is given. */
export async function createProject(
	actor: Actor,
	wish: z.output<typeof newProjectSchema>,
	id = newId()
): Promise<Project> {
	const teamId = wish.teamId ?? (await onlyTeam(actor));
	const role = await requireTeam(actor, teamId, 'project.create');
	const now = new Date();
	const { place } = wish;
	const plot = emptyPlot();
	const row = {
		id,
		teamId,
		name: wish.name,
		notes: wish.notes ?? '',
		place: { ...place, timeZone: place.timeZone ?? findTimeZone(place.latitudeDeg, place.longitudeDeg) },
		winterRule: wish.winterRule ?? defaultWinterRule,
		plot,
		plotRevision: 1,
		createdAt: now,
		updatedAt: now
	};
	await db.transaction(async (tx) => {
		await tx.insert(projects).values(row);
		await tx
			.insert(plotRevisions)
			.values({ projectId: id, revision: 1, document: plot, authorId: actor.userId, createdAt: now });
		await insertLayout(tx, actor, id, 'Layout 1', emptyLayout());
	});
	return projectView(row, role);
}
