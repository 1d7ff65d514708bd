import { answer, endpoint } from '$lib/server/api/endpoint';
import { apiCalls } from '$lib/server/api/table';
import { listMembers } from '$lib/server/teams/list-members';

export const GET = endpoint(apiCalls.listMembers, async ({ actor, params, query }) =>
	answer(await listMembers(actor, params.teamId, query))
);
