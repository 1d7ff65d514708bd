import { eq } from 'drizzle-orm';
import type { Actor } from '../auth/actor';
import { db } from '../db';
import { trackerModels } from '../db/schema';
import { notFound } from '../errors';
import { requireTeam } from '../guard';

/** Lets through who may change this model; the library belongs to nobody and is never found here. */
export async function findModelToEdit(actor: Actor, modelId: string): Promise<void> {
	const [row] = await db
		.select({ teamId: trackerModels.teamId })
		.from(trackerModels)
		.where(eq(trackerModels.id, modelId));
	if (!row) throw notFound();
	await requireTeam(actor, row.teamId, 'model.edit');
}
