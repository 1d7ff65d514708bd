import { requireUser } from '$lib/server/guard';
import { orPageError } from '$lib/server/errors';
import { openProject } from '$lib/server/projects/open-project';
import type { LayoutServerLoad } from './$types';

export const load: LayoutServerLoad = async (event) => {
	const actor = requireUser(event);
	event.depends('app:project');
	const layoutId = event.url.searchParams.get('layout');
	const opened = await orPageError(openProject(actor, event.params.projectId, layoutId));
	return { ...opened, userId: actor.userId };
};
