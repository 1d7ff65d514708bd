import { answer, endpoint } from '$lib/server/api/endpoint';
import { apiCalls } from '$lib/server/api/table';
import { calculate } from '$lib/server/compute/calculate';

export const POST = endpoint(apiCalls.computeFieldLoss, async ({ body }) =>
	answer(await calculate({ kind: 'field-loss', request: body }))
);
