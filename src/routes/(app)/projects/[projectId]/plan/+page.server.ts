import { error } from '@sveltejs/kit';
import { can } from '$lib/access';
import { orPageError } from '$lib/server/errors';
import { requireUser } from '$lib/server/guard';
import { draftPlan } from '$lib/server/plans/draft-plan';
import type { PageServerLoad } from './$types';

/** The draft of what would be issued now, for those who issue; crew reads what was issued. */
export const load: PageServerLoad = async (event) => {
	const actor = requireUser(event);
	event.depends('app:plan');
	const { project, layout } = await event.parent();
	if (!can(project.role, 'plan.read')) {
		error(
			403,
			'Plans are for the project’s owner, its designers and its crew, who build from them. As a client you see Plot, Trackers, Shade and Sensors.'
		);
	}
	if (!can(project.role, 'plan.issue')) return { draft: null };
	return { draft: await orPageError(draftPlan(actor, project.id, layout.id)) };
};
