import { answer, endpoint } from '$lib/server/api/endpoint';
import { apiCalls } from '$lib/server/api/table';
import { listRuns } from '$lib/server/runs/list-runs';
import { startRun } from '$lib/server/runs/start-run';

export const GET = endpoint(apiCalls.listRuns, async ({ actor, params, query }) =>
	answer(await listRuns(actor, params.projectId, query))
);

export const POST = endpoint(apiCalls.startRun, async ({ actor, params, body }) => {
	const run = await startRun(actor, params.projectId, body);
	return answer(run, { status: 202, location: `/api/v1/runs/${run.id}` });
});
