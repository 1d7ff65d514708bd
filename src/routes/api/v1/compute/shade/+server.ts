import { answer, endpoint } from '$lib/server/api/endpoint';
import { apiCalls } from '$lib/server/api/table';
import { calculate } from '$lib/server/compute/calculate';

export const POST = endpoint(apiCalls.computeShade, async ({ body }) =>
	answer({ tables: await calculate({ kind: 'shade-scene', scene: body }) })
);
