import { answer, endpoint } from '$lib/server/api/endpoint';
import { apiCalls } from '$lib/server/api/table';
import { getRun } from '$lib/server/runs/get-run';

export const GET = endpoint(apiCalls.getRun, async ({ actor, params }) =>
	answer(await getRun(actor, params.runId))
);
