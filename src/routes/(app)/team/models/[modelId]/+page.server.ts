import { error } from '@sveltejs/kit';
import { can } from '$lib/access';
import { MAX_PAGE_SIZE } from '$lib/schema';
import { orPageError } from '$lib/server/errors';
import { requireUser } from '$lib/server/guard';
import { listModels } from '$lib/server/models/list-models';
import { teamsOf } from '$lib/server/teams/teams-of';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const actor = requireUser(event);
	const teams = (await teamsOf(actor)).filter((each) => can(each.role, 'model.edit'));
	const wanted = event.url.searchParams.get('team');
	const team = wanted ? teams.find((each) => each.id === wanted) : teams[0];
	if (!team) error(404, 'There is nothing at this address, or it is not yours to see.');
	const { items } = await orPageError(listModels(actor, team.id, { limit: MAX_PAGE_SIZE }));
	const isNew = event.params.modelId === 'new';
	const from = isNew ? (event.url.searchParams.get('from') ?? items[0].id) : event.params.modelId;
	const model = items.find((each) => each.id === from);
	if (!model) error(404, 'There is nothing at this address, or it is not yours to see.');
	return { team, model, isNew };
};
