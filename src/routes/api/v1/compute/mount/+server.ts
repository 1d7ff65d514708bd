import { answer, endpoint } from '$lib/server/api/endpoint';
import { apiCalls } from '$lib/server/api/table';
import { calculate } from '$lib/server/compute/calculate';

export const POST = endpoint(apiCalls.computeMount, async ({ actor, body }) =>
	answer({ steps: await calculate(actor, { kind: 'mount-scene', scene: body }) })
);
