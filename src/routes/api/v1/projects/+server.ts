import { answer, endpoint } from '$lib/server/api/endpoint';
import { apiCalls } from '$lib/server/api/table';
import { createProject } from '$lib/server/projects/create-project';
import { listProjects } from '$lib/server/projects/list-projects';

export const GET = endpoint(apiCalls.listProjects, async ({ actor, query }) =>
	answer(await listProjects(actor, query))
);

export const POST = endpoint(apiCalls.createProject, async ({ actor, body }) => {
	const project = await createProject(actor, body);
	return answer(project, { status: 201, location: `/api/v1/projects/${project.id}` });
});
