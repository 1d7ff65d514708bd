import { answer, endpoint, noContent } from '$lib/server/api/endpoint';
import { apiCalls } from '$lib/server/api/table';
import { deleteLayout } from '$lib/server/layouts/delete-layout';
import { getLayout } from '$lib/server/layouts/get-layout';
import { renameLayout } from '$lib/server/layouts/rename-layout';
import { saveLayout } from '$lib/server/layouts/save-layout';

export const GET = endpoint(apiCalls.getLayout, async ({ actor, params }) => {
	const layout = await getLayout(actor, params.layoutId);
	return answer(layout, { revision: layout.revision });
});

export const PUT = endpoint(apiCalls.saveLayout, async ({ actor, params, body, revision }) => {
	const layout = await saveLayout(actor, params.layoutId, body.document, revision);
	return answer(layout, { revision: layout.revision });
});

export const PATCH = endpoint(apiCalls.renameLayout, async ({ actor, params, body }) => {
	const layout = await renameLayout(actor, params.layoutId, body.name);
	return answer(layout, { revision: layout.revision });
});

export const DELETE = endpoint(apiCalls.deleteLayout, async ({ actor, params }) => {
	await deleteLayout(actor, params.layoutId);
	return noContent();
});
