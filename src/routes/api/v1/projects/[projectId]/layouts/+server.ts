import { answer, endpoint } from '$lib/server/api/endpoint';
import { apiCalls } from '$lib/server/api/table';
import { createLayout } from '$lib/server/layouts/create-layout';
import { listLayouts } from '$lib/server/layouts/list-layouts';

export const GET = endpoint(apiCalls.listLayouts, async ({ actor, params, query }) =>
	answer(await listLayouts(actor, params.projectId, query))
);

export const POST = endpoint(apiCalls.createLayout, async ({ actor, params, body }) => {
	const layout = await createLayout(actor, params.projectId, body);
	return answer(layout, {
		status: 201,
		revision: layout.revision,
		location: `/api/v1/layouts/${layout.id}`
	});
});
