import { answer, endpoint } from '$lib/server/api/endpoint';
import { apiCalls } from '$lib/server/api/table';
import { listLayoutRevisions } from '$lib/server/layouts/list-layout-revisions';

export const GET = endpoint(apiCalls.listLayoutRevisions, async ({ actor, params, query }) =>
	answer(await listLayoutRevisions(actor, params.layoutId, query))
);
