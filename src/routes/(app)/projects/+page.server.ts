import { can } from '$lib/access';
import { pageQuerySchema } from '$lib/schema';
import { orPageError } from '$lib/server/errors';
import { requireUser } from '$lib/server/guard';
import { listProjects } from '$lib/server/projects/list-projects';
import { projectThumbnails } from '$lib/server/projects/project-thumbnails';
import { teamsOf } from '$lib/server/teams/teams-of';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const actor = requireUser(event);
	const query = pageQuerySchema.parse({
		limit: '24',
		cursor: event.url.searchParams.get('after')?.slice(0, 200)
	});
	const [projects, teams] = await Promise.all([orPageError(listProjects(actor, query)), teamsOf(actor)]);
	const thumbnails = await projectThumbnails(
		actor,
		projects.items.map((project) => project.id)
	);
	return {
		projects: projects.items.map((project) => ({
			...project,
			thumbnail: thumbnails.get(project.id) ?? null
		})),
		nextCursor: projects.nextCursor,
		mayCreate: teams.some((team) => can(team.role, 'project.create')),
		severalTeams: teams.length > 1
	};
};
