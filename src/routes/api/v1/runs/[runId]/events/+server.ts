import { endpoint } from '$lib/server/api/endpoint';
import { apiCalls } from '$lib/server/api/table';
import { followRun } from '$lib/server/runs/follow-run';

export const GET = endpoint(
	apiCalls.followRun,
	async ({ actor, params }) =>
		new Response(await followRun(actor, params.runId), {
			headers: {
				'content-type': 'text/event-stream',
				'cache-control': 'no-store',
				// Asks a proxy in front not to gather the events.
				'x-accel-buffering': 'no'
			}
		})
);
