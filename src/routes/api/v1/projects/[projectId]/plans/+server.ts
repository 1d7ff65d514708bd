import { answer, endpoint } from '$lib/server/api/endpoint';
import { apiCalls } from '$lib/server/api/table';
import { getPlan } from '$lib/server/plans/get-plan';
import { issuePlan } from '$lib/server/plans/issue-plan';
import { listPlans } from '$lib/server/plans/list-plans';

export const GET = endpoint(apiCalls.listPlans, async ({ actor, params, query }) =>
	answer(await listPlans(actor, params.projectId, query))
);

export const POST = endpoint(apiCalls.issuePlan, async ({ actor, params, body }) => {
	const { id } = await issuePlan(actor, params.projectId, body);
	return answer(await getPlan(actor, id), { status: 201, location: `/api/v1/plans/${id}` });
});
