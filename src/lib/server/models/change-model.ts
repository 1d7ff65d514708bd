import { eq } from 'drizzle-orm';
import type { TrackerModel } from '$lib/core/document';
import type { NewTrackerModel } from '$lib/schema/tracker-model';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { trackerModels } from '../db/schema';
import { findModelToEdit } from './find-model';

/** Describes a model anew. Layouts keep the model as they were saved with, so that old results still hold. */
export async function changeModel(
	actor: Actor,
	modelId: string,
	given: NewTrackerModel
): Promise<TrackerModel> {
	await findModelToEdit(actor, modelId);
	const document: TrackerModel = { id: modelId, ...given };
	await db
		.update(trackerModels)
		.set({ document, updatedAt: new Date() })
		.where(eq(trackerModels.id, modelId));
	return document;
}
