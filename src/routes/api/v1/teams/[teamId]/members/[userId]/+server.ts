import { endpoint, noContent } from '$lib/server/api/endpoint';
import { apiCalls } from '$lib/server/api/table';
import { removeMember } from '$lib/server/teams/remove-member';

export const DELETE = endpoint(apiCalls.removeMember, async ({ actor, params }) => {
	await removeMember(actor, params.teamId, params.userId);
	return noContent();
});
