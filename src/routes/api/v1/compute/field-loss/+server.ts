import { answer, endpoint } from '$lib/server/api/endpoint';
import { apiCalls } from '$lib/server/api/table';
import { calculate } from '$lib/server/compute/calculate';

export const POST = endpoint(apiCalls.computeFieldLoss, async ({ actor, body }) =>
	answer(await calculate(actor, { kind: 'field-loss', request: body }))
);
