import { answer, endpoint } from '$lib/server/api/endpoint';
import { apiCalls } from '$lib/server/api/table';
import { createModel } from '$lib/server/models/create-model';
import { listModels } from '$lib/server/models/list-models';

export const GET = endpoint(apiCalls.listModels, async ({ actor, params, query }) =>
	answer(await listModels(actor, params.teamId, query))
);

export const POST = endpoint(apiCalls.createModel, async ({ actor, params, body }) =>
	answer(await createModel(actor, params.teamId, body), { status: 201 })
);
