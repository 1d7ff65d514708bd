import { answer, endpoint } from '$lib/server/api/endpoint';
import { apiCalls } from '$lib/server/api/table';
import { calculate } from '$lib/server/compute/calculate';

export const POST = endpoint(apiCalls.computeShade, async ({ actor, body }) =>
	answer({ tables: await calculate(actor, { kind: 'shade-scene', scene: body }) })
);
