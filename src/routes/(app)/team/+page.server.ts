import { can } from '$lib/access';
import { DEFAULT_PAGE_SIZE, MAX_PAGE_SIZE } from '$lib/schema';
import { origin } from '$lib/server/env';
import { orPageError } from '$lib/server/errors';
import { requireUser } from '$lib/server/guard';
import { answerForm } from '$lib/server/http/read-form';
import { deleteModel } from '$lib/server/models/delete-model';
import { listModels } from '$lib/server/models/list-models';
import { listProjects } from '$lib/server/projects/list-projects';
import { invite } from '$lib/server/teams/invite';
import { listInvitations } from '$lib/server/teams/list-invitations';
import { listMembers } from '$lib/server/teams/list-members';
import { removeFromProject, removeMember } from '$lib/server/teams/remove-member';
import { teamsOf } from '$lib/server/teams/teams-of';
import { withdrawInvitation } from '$lib/server/teams/withdraw-invitation';
import { invitationFormSchema, inviteFormSchema, memberFormSchema, modelFormSchema } from './team-forms';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const actor = requireUser(event);
	const teams = (await teamsOf(actor)).filter((team) => can(team.role, 'team.read'));
	const wanted = event.url.searchParams.get('team');
	const team = teams.find((each) => each.id === wanted) ?? teams[0] ?? null;
	if (!team) return { teams, team, members: [], invitations: [], models: [], projects: [] };
	const [members, invitations, models, projects] = await orPageError(
		Promise.all([
			listMembers(actor, team.id, { limit: MAX_PAGE_SIZE }),
			listInvitations(actor, team.id, { limit: DEFAULT_PAGE_SIZE }),
			listModels(actor, team.id, { limit: MAX_PAGE_SIZE }),
			listProjects(actor, { limit: MAX_PAGE_SIZE })
		])
	);
	return {
		teams,
		team,
		members: members.items,
		invitations: invitations.items,
		models: models.items,
		projects: projects.items
			.filter((project) => project.teamId === team.id)
			.map(({ id, name }) => ({ id, name }))
	};
};

export const actions: Actions = {
	invite: (event) =>
		answerForm(event, inviteFormSchema, async ({ teamId, ...wish }) => {
			await invite(requireUser(event), teamId, wish, origin() ?? event.url.origin);
		}),
	withdraw: (event) =>
		answerForm(event, invitationFormSchema, ({ invitationId }) =>
			withdrawInvitation(requireUser(event), invitationId)
		),
	remove: (event) =>
		answerForm(event, memberFormSchema, ({ teamId, userId, projectId }) =>
			projectId
				? removeFromProject(requireUser(event), projectId, userId)
				: removeMember(requireUser(event), teamId, userId)
		),
	deleteModel: (event) =>
		answerForm(event, modelFormSchema, ({ modelId }) => deleteModel(requireUser(event), modelId))
};
