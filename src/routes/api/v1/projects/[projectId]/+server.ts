import { answer, endpoint, noContent } from '$lib/server/api/endpoint';
import { apiCalls } from '$lib/server/api/table';
import { changeProject } from '$lib/server/projects/change-project';
import { deleteProject } from '$lib/server/projects/delete-project';
import { getProject } from '$lib/server/projects/get-project';

export const GET = endpoint(apiCalls.getProject, async ({ actor, params }) =>
	answer(await getProject(actor, params.projectId))
);

export const PATCH = endpoint(apiCalls.changeProject, async ({ actor, params, body }) =>
	answer(await changeProject(actor, params.projectId, body))
);

export const DELETE = endpoint(apiCalls.deleteProject, async ({ actor, params }) => {
	await deleteProject(actor, params.projectId);
	return noContent();
});
