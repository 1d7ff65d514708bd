import { redirect } from '@sveltejs/kit';
import { can } from '$lib/access';
import { newProjectSchema } from '$lib/schema';
import { requireUser } from '$lib/server/guard';
import { answerForm } from '$lib/server/http/read-form';
import { createProject } from '$lib/server/projects/create-project';
import { teamsOf } from '$lib/server/teams/teams-of';
import { newProjectFormSchema } from '../project-form';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const teams = await teamsOf(requireUser(event));
	return { teams: teams.filter((team) => can(team.role, 'project.create')) };
};

export const actions: Actions = {
	default: async (event) => {
		const actor = requireUser(event);
		return answerForm(event, newProjectFormSchema, async ({ teamId, ...form }) => {
			const wish = newProjectSchema.parse({ ...form, ...(teamId ? { teamId } : {}) });
			const project = await createProject(actor, wish);
			redirect(303, `/projects/${project.id}/plot`);
		});
	}
};
