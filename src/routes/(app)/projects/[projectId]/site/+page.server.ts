import { error } from '@sveltejs/kit';
import { can } from '$lib/access';
import { orPageError } from '$lib/server/errors';
import { requireUser } from '$lib/server/guard';
import { validPlan } from '$lib/server/plans/valid-plan';
import type { PageServerLoad } from './$types';

/** What the crew builds from: the last issued plan as it was issued. */
export const load: PageServerLoad = async (event) => {
	const actor = requireUser(event);
	const { project } = await event.parent();
	if (!can(project.role, 'plan.read')) {
		error(
			403,
			'Site is for the project’s crew, its owner and its designers. As a client you see Plot, Trackers, Shade and Sensors.'
		);
	}
	return { valid: await orPageError(validPlan(actor, project.id)) };
};
