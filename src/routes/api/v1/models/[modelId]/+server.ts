import { answer, endpoint, noContent } from '$lib/server/api/endpoint';
import { apiCalls } from '$lib/server/api/table';
import { changeModel } from '$lib/server/models/change-model';
import { deleteModel } from '$lib/server/models/delete-model';

export const PUT = endpoint(apiCalls.changeModel, async ({ actor, params, body }) =>
	answer(await changeModel(actor, params.modelId, body))
);

export const DELETE = endpoint(apiCalls.deleteModel, async ({ actor, params }) => {
	await deleteModel(actor, params.modelId);
	return noContent();
});
