import { answer, endpoint } from '$lib/server/api/endpoint';
import { apiCalls } from '$lib/server/api/table';
import { origin } from '$lib/server/env';
import { invite } from '$lib/server/teams/invite';
import { listInvitations } from '$lib/server/teams/list-invitations';

export const GET = endpoint(apiCalls.listInvitations, async ({ actor, params, query }) =>
	answer(await listInvitations(actor, params.teamId, query))
);

export const POST = endpoint(apiCalls.invite, async ({ actor, params, body, event }) =>
	answer(await invite(actor, params.teamId, body, origin() ?? event.url.origin), { status: 201 })
);
