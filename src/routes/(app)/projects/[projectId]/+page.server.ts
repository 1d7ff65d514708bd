import { redirect } from '@sveltejs/kit';
import { can } from '$lib/access';
import { requireUser } from '$lib/server/guard';
import type { PageServerLoad } from './$types';

/** A project opens where its work is: at the plot, at the trackers, or on site for those who build from it. */
export const load: PageServerLoad = async (event) => {
	requireUser(event);
	const { project, plot, layout } = await event.parent();
	const builds = !can(project.role, 'layout.edit') && can(project.role, 'plan.read');
	const step = builds ? 'site' : plot.document.boundary.length ? 'trackers' : 'plot';
	redirect(303, `/projects/${project.id}/${step}?layout=${layout.id}`);
};
