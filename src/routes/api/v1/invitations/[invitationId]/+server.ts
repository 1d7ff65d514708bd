import { endpoint, noContent } from '$lib/server/api/endpoint';
import { apiCalls } from '$lib/server/api/table';
import { withdrawInvitation } from '$lib/server/teams/withdraw-invitation';

export const DELETE = endpoint(apiCalls.withdrawInvitation, async ({ actor, params }) => {
	await withdrawInvitation(actor, params.invitationId);
	return noContent();
});
