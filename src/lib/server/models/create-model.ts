import { count, eq } from 'drizzle-orm';
import type { TrackerModel } from '$lib/core/document';
import type { NewTrackerModel } from '$lib/schema/tracker-model';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { newId } from '../db/ids';
import { trackerModels } from '../db/schema';
import { AppError } from '../errors';
import { requireTeam } from '../guard';

const MAX_MODELS = 500;

export async function createModel(
	actor: Actor,
	teamId: string,
	given: NewTrackerModel
): Promise<TrackerModel> {
	await requireTeam(actor, teamId, 'model.edit');
	const [{ held }] = await db
		.select({ held: count() })
		.from(trackerModels)
		.where(eq(trackerModels.teamId, teamId));
	if (held >= MAX_MODELS) {
		throw new AppError('conflict', `A team keeps at most ${MAX_MODELS} tracker models: delete one first.`);
	}
	const document: TrackerModel = { id: newId(), ...given };
	const now = new Date();
	await db
		.insert(trackerModels)
		.values({ id: document.id, teamId, document, createdAt: now, updatedAt: now });
	return document;
}
