import { answer, endpoint } from '$lib/server/api/endpoint';
import { apiCalls } from '$lib/server/api/table';
import { cancelRun } from '$lib/server/runs/cancel-run';

export const POST = endpoint(apiCalls.cancelRun, async ({ actor, params }) =>
	answer(await cancelRun(actor, params.runId))
);
