import { answer, endpoint } from '$lib/server/api/endpoint';
import { apiCalls } from '$lib/server/api/table';
import { getPlan } from '$lib/server/plans/get-plan';

export const GET = endpoint(apiCalls.getPlan, async ({ actor, params }) =>
	answer(await getPlan(actor, params.planId))
);
