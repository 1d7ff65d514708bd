import { answer, endpoint } from '$lib/server/api/endpoint';
import { apiCalls } from '$lib/server/api/table';
import { calculate } from '$lib/server/compute/calculate';

export const POST = endpoint(apiCalls.computeSun, async ({ actor, body }) =>
	answer({ positions: await calculate(actor, { kind: 'sun', request: body }) })
);
