import type { OpenProject } from '$lib/schema/project';
import { can } from '$lib/access';
import type { Actor } from '../auth/actor';
import { notFound } from '../errors';
import { getLayout } from '../layouts/get-layout';
import { allLayouts } from '../layouts/list-layouts';
import { modelsForProject } from '../models/models-for-project';
import { listPlans } from '../plans/list-plans';
import { latestRun } from '../runs/latest-run';
import { getPlot } from './get-plot';
import { getProject } from './get-project';

/** Plans that the pages of a project open with. */
const PLANS_SHOWN = 50;

/**
 * Everything that the pages of a project open with.
 * @param layoutId which layout; without it the one that was changed last
 */
export async function openProject(
	actor: Actor,
	projectId: string,
	layoutId?: string | null
): Promise<OpenProject> {
	const project = await getProject(actor, projectId);
	const [plot, layouts, models] = await Promise.all([
		getPlot(actor, projectId),
		allLayouts(actor, projectId),
		modelsForProject(actor, projectId)
	]);
	const chosen = layoutId
		? layouts.find((layout) => layout.id === layoutId)
		: layouts.reduce((last, layout) => (layout.updatedAt > last.updatedAt ? layout : last), layouts[0]);
	if (!chosen) throw notFound();
	const [layout, shade, mounts, answers, plans] = await Promise.all([
		getLayout(actor, chosen.id),
		latestRun(actor, chosen.id, 'shade'),
		latestRun(actor, chosen.id, 'mounts'),
		latestRun(actor, chosen.id, 'answers'),
		can(project.role, 'plan.read') ? listPlans(actor, projectId, { limit: PLANS_SHOWN }) : null
	]);
	return {
		project,
		plot: { document: plot.document, revision: plot.revision },
		layouts,
		layout: { id: layout.id, name: layout.name, revision: layout.revision, document: layout.document },
		models,
		runs: { shade, mounts, answers },
		plans: plans?.items ?? []
	};
}
