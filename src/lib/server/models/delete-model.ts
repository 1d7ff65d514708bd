import { eq } from 'drizzle-orm';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { trackerModels } from '../db/schema';
import { findModelToEdit } from './find-model';

export async function deleteModel(actor: Actor, modelId: string): Promise<void> {
	await findModelToEdit(actor, modelId);
	await db.delete(trackerModels).where(eq(trackerModels.id, modelId));
}
