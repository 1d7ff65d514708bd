import type { TrackerModel } from '$lib/core/document';
import { modelLibrary } from '$lib/schema/model-library';
import type { Page, PageQuery } from '$lib/schema/page';
import type { Actor } from '../auth/actor';
import { readCursor } from '../db/cursor';
import { pageOf } from '../db/page';
import { requireTeam } from '../guard';
import { teamModels } from './models-for-project';

/** The library first, then the team's own, oldest first. */
export async function listModels(
	actor: Actor,
	teamId: string,
	query: PageQuery
): Promise<Page<TrackerModel>> {
	await requireTeam(actor, teamId, 'model.read');
	const all = [...modelLibrary, ...(await teamModels(teamId))];
	const after = query.cursor ? (readCursor(query.cursor, ['string'])[0] as string) : null;
	const from = after === null ? 0 : all.findIndex((model) => model.id === after) + 1;
	return pageOf(
		all.slice(from, from + query.limit + 1),
		query.limit,
		(model) => model,
		(model) => [model.id]
	);
}
